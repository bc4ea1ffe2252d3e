using System.Numerics;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;

namespace Tallybound.Coding.Tables;

/// <summary>A table for large alphabets of which little is in use: Elias δ of the number of symbols in use, δ(first symbol + 1), δ of every gap; 7 bits for the longest
/// length; an inner Huffman code (at most 15 bits) over the lengths 1 to the longest, its lengths at 4 bits each; then one inner word a symbol, none where all lengths are equal.</summary>
public static partial class SparseTable
{
    private const int InnerLimit = CanonicalWords.LongestWord, InnerLengthBits = 4, LongestLength = 127;

    /// <summary>Bits of the table in closed form: no word is written.</summary>
    /// <param name="symbols">Symbols in use, ascending, at least one.</param>
    /// <param name="lengths">Their lengths, 1 to 127 each.</param>
    /// <exception cref="ArgumentException">No symbol is in use, the spans differ in length, or a length is outside 1…127.</exception>
    public static long Bits(ReadOnlySpan<int> symbols, ReadOnlySpan<byte> lengths)
    {
        Check(symbols, lengths);
        Span<long> histogram = stackalloc long[256];
        CountLengths(lengths, histogram);
        return EliasDelta.Length(symbols.Length) + EliasDelta.Length(symbols[0] + 1L) + GapBits(symbols) + LengthsBits(histogram);
    }

    /// <summary>Bits of the table when only the number of symbols of each length is known: which symbol has which makes no difference to the price.</summary>
    /// <param name="symbols">Symbols in use, ascending, at least one.</param>
    /// <param name="lengthHistogram">How many symbols have each length, indexed by length, none at 0 or above 127.</param>
    /// <exception cref="ArgumentException">No symbol is in use, or a length is outside 1…127.</exception>
    public static long BitsByHistogram(ReadOnlySpan<int> symbols, ReadOnlySpan<long> lengthHistogram)
    {
        if (symbols.IsEmpty) throw new ArgumentException("No symbol is in use; a sparse table needs one.", nameof(symbols));
        CheckLengths(lengthHistogram);
        return EliasDelta.Length(symbols.Length) + EliasDelta.Length(symbols[0] + 1L) + GapBits(symbols) + LengthsBits(lengthHistogram);
    }

    /// <summary>Writes the table; parameters as for <see cref="Bits"/>.</summary>
    public static void Encode<TSink>(ReadOnlySpan<int> symbols, ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        Check(symbols, lengths);
        EliasDelta.Encode(symbols.Length, ref sink);
        EliasDelta.Encode(symbols[0] + 1L, ref sink);
        for (int i = 1; i < symbols.Length; i++) EliasDelta.Encode((long)symbols[i] - symbols[i - 1], ref sink);
        Span<long> histogram = stackalloc long[256];
        CountLengths(lengths, histogram);
        int longest = Longest(histogram);
        Span<byte> inner = stackalloc byte[longest];
        LengthLimited.TryLengths(histogram.Slice(1, longest), InnerLimit, inner);
        sink.Write((ulong)longest, FlatTable.LongestBits);
        foreach (byte length in inner) sink.Write(length, InnerLengthBits);
        if (longest - inner.Count((byte)0) == 1) return;
        Span<ushort> words = stackalloc ushort[longest];
        CanonicalWords.Assign(inner, words);
        foreach (byte length in lengths) sink.Write(words[length - 1], inner[length - 1]);
    }

    /// <summary>Reads a table.</summary>
    /// <exception cref="InvalidDataException">The bits end early or make no table.</exception>
    public static (int[] Symbols, byte[] Lengths) Decode(ref BitReader reader)
    {
        long inUse = EliasDelta.Decode(ref reader);
        if (inUse > Array.MaxLength) throw new InvalidDataException($"The table names {inUse} symbols.");
        var symbols = new List<int>();
        long symbol = -1;
        for (long i = 0; i < inUse; i++)
        {
            symbol += EliasDelta.Decode(ref reader);
            if (symbol is < 0 or > int.MaxValue) throw new InvalidDataException($"Symbol {symbol} is outside the alphabet.");
            symbols.Add((int)symbol);
        }
        byte[] lengths = new byte[symbols.Count];
        DecodeLengths(ref reader, lengths);
        return ([.. symbols], lengths);
    }

    /// <summary>Bits from the longest length on: inner lengths and inner words, from the number of symbols of each length.</summary>
    internal static long LengthsBits(ReadOnlySpan<long> histogram)
    {
        int longest = Longest(histogram);
        Span<byte> inner = stackalloc byte[longest];
        ReadOnlySpan<long> counts = histogram.Slice(1, longest);
        LengthLimited.TryLengths(counts, InnerLimit, inner);
        bool allEqual = longest - inner.Count((byte)0) == 1;
        return FlatTable.LongestBits + (InnerLengthBits * longest) + (allEqual ? 0 : Huffman.PayloadDigits(counts, inner));
    }

    private static long GapBits(ReadOnlySpan<int> symbols)
    {
        Span<long> gapsBySize = stackalloc long[32];
        gapsBySize.Clear();
        for (int i = 1; i < symbols.Length; i++) gapsBySize[BitOperations.Log2((uint)(symbols[i] - symbols[i - 1]))]++;
        long bits = 0;
        for (int size = 0; size < 32; size++) bits += gapsBySize[size] * EliasDelta.Length(1L << size);
        return bits;
    }

    private static void DecodeLengths(ref BitReader reader, Span<byte> lengths)
    {
        int longest = (int)reader.Read(FlatTable.LongestBits);
        Span<byte> inner = stackalloc byte[longest];
        for (int i = 0; i < longest; i++) inner[i] = (byte)reader.Read(InnerLengthBits);
        int inUse = longest - inner.Count((byte)0);
        if (inUse == 0) throw new InvalidDataException("The table's inner code has no word.");
        if (inUse == 1)
        {
            lengths.Fill((byte)(inner.IndexOfAnyExcept((byte)0) + 1));
            return;
        }
        CanonicalWords.RequireRoom(inner);
        Span<ushort> words = stackalloc ushort[longest];
        CanonicalWords.Assign(inner, words);
        for (int i = 0; i < lengths.Length; i++)
        {
            ulong word = 0;
            int found = -1;
            for (int bits = 1; bits <= InnerLimit && found < 0; bits++)
            {
                word = (word << 1) | reader.Read(1);
                found = CanonicalWords.Find(inner, words, word, bits);
            }
            if (found < 0) throw new InvalidDataException("The table holds a word that its inner code does not have.");
            lengths[i] = (byte)(found + 1);
        }
    }

    private static void Check(ReadOnlySpan<int> symbols, ReadOnlySpan<byte> lengths)
    {
        if (symbols.IsEmpty) throw new ArgumentException("No symbol is in use; a sparse table needs one.", nameof(symbols));
        if (symbols.Length != lengths.Length) throw new ArgumentException($"There are {symbols.Length} symbols and {lengths.Length} lengths.", nameof(lengths));
    }

    private static void CountLengths(ReadOnlySpan<byte> lengths, Span<long> histogram)
    {
        histogram.Clear();
        foreach (byte length in lengths) histogram[length]++;
        CheckLengths(histogram);
    }

    private static void CheckLengths(ReadOnlySpan<long> histogram)
    {
        int longest = Longest(histogram);
        if (histogram[0] > 0 || longest > LongestLength) throw new ArgumentException($"Lengths reach from {(histogram[0] > 0 ? 0 : 1)} to {longest}; a sparse table allows 1 to {LongestLength}.");
    }

    private static int Longest(ReadOnlySpan<long> histogram) => histogram.LastIndexOfAnyExcept(0L);
}
