using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>The code words that lengths stand for: handed out by (length, symbol), each one more than the last, as in RFC 1951 §3.2.2.</summary>
/// <remarks>Binary. Lengths and the alphabet are all that a decoder needs. The Kraft sum may stay below 1 (one symbol alone, or words kept back); above 1 there is no such code.</remarks>
public sealed class CanonicalCode
{
    /// <summary>Longest word.</summary>
    public const int LongestWord = 63;

    private readonly byte[] lengths;
    private readonly ulong[] words;

    // By length: the first word, its rank among all symbols in use, and how many words there are.
    private readonly ulong[] firstWords = new ulong[LongestWord + 2];
    private readonly int[] firstRanks = new int[LongestWord + 2];
    private readonly int[] counts = new int[LongestWord + 2];
    private readonly int[] symbolsByRank;

    /// <summary>Assigns the words.</summary>
    /// <param name="lengths">One length a symbol, 0 for a symbol without a word, none above 63.</param>
    /// <exception cref="ArgumentException">A length is above 63, or the lengths are too short for a code that can be decoded.</exception>
    public CanonicalCode(ReadOnlySpan<byte> lengths)
    {
        this.lengths = lengths.ToArray();
        words = new ulong[lengths.Length];
        foreach (byte length in lengths)
        {
            if (length > LongestWord) throw new ArgumentException($"A word of {length} bits was asked for; this code allows {LongestWord}.", nameof(lengths));
            if (length > 0) counts[length]++;
        }
        ulong word = 0;
        int rank = 0;
        for (int length = 1; length <= LongestWord; length++)
        {
            word <<= 1;
            (firstWords[length], firstRanks[length]) = (word, rank);
            word += (ulong)counts[length];
            rank += counts[length];
            if (word > 1UL << length) throw new ArgumentException($"The lengths up to {length} bits need {word} words; there are {1UL << length}.", nameof(lengths));
        }
        symbolsByRank = new int[rank];
        Assign();
    }

    /// <summary>Symbols of the alphabet.</summary>
    public int AlphabetSize => lengths.Length;

    /// <summary>Length of a symbol's word in bits; 0: it has none.</summary>
    public int Length(int symbol) => lengths[symbol];

    /// <summary>A symbol's word, in the low <see cref="Length"/> bits; its first bit is the highest of them.</summary>
    public ulong Word(int symbol) => words[symbol];

    /// <summary>Writes the words of symbols one after the other.</summary>
    /// <exception cref="ArgumentException">A symbol has no word; the symbols before it are written.</exception>
    public void Encode<TSink>(ReadOnlySpan<int> symbols, ref TSink sink)
        where TSink : IBitSink
    {
        foreach (int symbol in symbols)
        {
            if ((uint)symbol >= (uint)lengths.Length || lengths[symbol] == 0) throw new ArgumentException($"Symbol {symbol} has no word in this code.", nameof(symbols));
            sink.Write(words[symbol], lengths[symbol]);
        }
    }

    /// <summary>Reads as many symbols as there is room for.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or are no word of this code.</exception>
    public void Decode(ref BitReader reader, scoped Span<int> symbols)
    {
        foreach (ref int symbol in symbols) symbol = DecodeOne(ref reader);
    }

    private int DecodeOne(ref BitReader reader)
    {
        ulong word = 0;
        for (int length = 1; length <= LongestWord; length++)
        {
            word = (word << 1) | reader.Read(1);
            ulong place = word - firstWords[length];
            if (word >= firstWords[length] && place < (ulong)counts[length]) return symbolsByRank[firstRanks[length] + (int)place];
        }
        throw new InvalidDataException("The bits are no word of this code.");
    }

    private void Assign()
    {
        Span<int> next = stackalloc int[LongestWord + 2];
        next.Clear();
        for (int symbol = 0; symbol < lengths.Length; symbol++)
        {
            int length = lengths[symbol];
            if (length == 0) continue;
            int place = next[length]++;
            words[symbol] = firstWords[length] + (ulong)place;
            symbolsByRank[firstRanks[length] + place] = symbol;
        }
    }
}
