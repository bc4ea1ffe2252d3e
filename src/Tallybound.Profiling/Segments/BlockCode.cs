using Tallybound.Coding.Bits;

namespace Tallybound.Profiling.Segments;

/// <summary>The canonical words of one table (RFC 1951 §3.2.2: by length, then symbol), to write and read symbols of a block with.</summary>
internal sealed class BlockCode
{
    private const int LongestWord = 63;

    private readonly byte[] lengths;
    private readonly ulong[] words;
    private readonly byte[] symbolsByWord;
    private readonly int[] wordsOfLength = new int[LongestWord + 1];

    /// <exception cref="InvalidDataException">The lengths are no prefix code, or one is above 63 bits.</exception>
    public BlockCode(ReadOnlySpan<byte> lengths)
    {
        this.lengths = lengths.ToArray();
        words = new ulong[lengths.Length];
        foreach (byte length in lengths)
        {
            if (length > LongestWord) throw new InvalidDataException($"A word has {length} bits; a block's has at most {LongestWord}.");
            if (length > 0) wordsOfLength[length]++;
        }
        symbolsByWord = new byte[lengths.Length];
        ulong word = 0;
        int at = 0;
        for (int length = 1; length <= LongestWord; length++)
        {
            word <<= 1;
            if (wordsOfLength[length] == 0) continue;
            for (int symbol = 0; symbol < lengths.Length; symbol++)
            {
                if (lengths[symbol] != length) continue;
                symbolsByWord[at++] = (byte)symbol;
                words[symbol] = word++;
            }
            if (word > 1UL << length) throw new InvalidDataException($"There are too many words of up to {length} bits.");
        }
    }

    /// <summary>Writes symbols that all have a word.</summary>
    public void Encode(ReadOnlySpan<byte> symbols, BitWriter sink)
    {
        foreach (byte symbol in symbols) sink.Write(words[symbol], lengths[symbol]);
    }

    /// <summary>Reads as many symbols as there is room for.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or are no word.</exception>
    public void Decode(ref BitReader reader, scoped Span<byte> symbols)
    {
        foreach (ref byte symbol in symbols) symbol = symbolsByWord[Find(ref reader)];
    }

    /// <summary>Place among all words in their order: words of one length are consecutive numbers.</summary>
    private int Find(ref BitReader reader)
    {
        ulong word = 0, first = 0;
        int place = 0;
        for (int length = 1; length <= LongestWord; length++)
        {
            word = (word << 1) | reader.Read(1);
            first <<= 1;
            if (word - first < (ulong)wordsOfLength[length]) return place + (int)(word - first);
            place += wordsOfLength[length];
            first += (ulong)wordsOfLength[length];
        }
        throw new InvalidDataException("The bits are no word of the table.");
    }
}
