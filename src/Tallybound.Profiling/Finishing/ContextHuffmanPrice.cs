using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Finishing;

/// <summary>Prices one Huffman table a previous symbol: every context's payload, and every context's table in one format for all.</summary>
/// <remarks>The table begins with a map of the contexts in use, a bit a symbol of the alphabet. The first symbol has no context and is sent plain.</remarks>
internal sealed class ContextHuffmanPrice
{
    private readonly List<byte[]> tables = [];
    private readonly long[] counts = new long[256];
    private int alphabetSize;
    private int used;

    /// <summary>Bits of the coded symbols, the first one's plain bits not among them.</summary>
    public long PayloadBits { get; private set; }

    /// <summary>Greatest code length.</summary>
    public int LongestCode { get; private set; }

    /// <summary>Begins a source.</summary>
    /// <param name="alphabet">Symbols of the alphabet, at most 256.</param>
    public void Begin(int alphabet) => (alphabetSize, used, PayloadBits, LongestCode) = (alphabet, 0, 0, 0);

    /// <summary>Adds a context in use.</summary>
    public void AddContext(ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        Span<long> row = counts.AsSpan(0, alphabetSize);
        row.Clear();
        for (int i = 0; i < symbols.Length; i++) row[symbols[i]] = fold0[i] + fold1[i];
        if (used == tables.Count) tables.Add(new byte[256]);
        Span<byte> lengths = tables[used++].AsSpan(0, alphabetSize);
        Huffman.Lengths(row, lengths);
        PayloadBits += Huffman.PayloadDigits(row, lengths);
        foreach (byte length in lengths) LongestCode = Math.Max(LongestCode, length);
    }

    /// <summary>The cheapest format in which every context's table can be sent, and its bits, the map of contexts included.</summary>
    public (long Bits, TableFormat Format) Tables()
    {
        // Formats that suit few symbols come first, so that the others are given up early.
        ReadOnlySpan<TableFormat> formats = [TableFormat.Sparse, TableFormat.Rfc1951DynamicHeader, TableFormat.Rfc8878HuffmanWeights, TableFormat.Flat];
        (long Bits, TableFormat Format) best = (long.MaxValue, TableFormat.Sparse);
        foreach (TableFormat format in formats)
        {
            if (TryPrice(format, best.Bits, out long bits) && bits < best.Bits) best = (bits, format);
        }
        return (best.Bits + alphabetSize, best.Format);
    }

    private bool TryPrice(TableFormat format, long limit, out long sum)
    {
        sum = 0;
        for (int context = 0; context < used; context++)
        {
            if (!TablePricing.TryPrice(format, tables[context].AsSpan(0, alphabetSize), out long bits)) return false;
            sum += bits;
            if (sum >= limit) return false;
        }
        return true;
    }
}
