using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Finishing;

/// <summary>Prices one Huffman table a previous symbol: every context's payload, and every context's table in one format for all.</summary>
/// <remarks>The table begins with a map of the contexts in use, a bit a symbol of the alphabet. The first symbol has no context and is sent plain.
/// The tables of all contexts are kept side by side, symbols in use and their lengths, until the formats are priced.</remarks>
internal sealed class ContextHuffmanPrice
{
    private readonly long[] counts = new long[256];
    private readonly byte[] dense = new byte[256];
    private readonly List<int> starts = [];
    private int[] symbolsInUse = new int[1024];
    private byte[] lengthsInUse = new byte[1024];
    private int alphabetSize;
    private int end;

    /// <summary>Bits of the coded symbols, the first one's plain bits not among them.</summary>
    public long PayloadBits { get; private set; }

    /// <summary>Greatest code length.</summary>
    public int LongestCode { get; private set; }

    /// <summary>Begins a source.</summary>
    /// <param name="alphabet">Symbols of the alphabet, at most 256.</param>
    public void Begin(int alphabet)
    {
        (alphabetSize, end, PayloadBits, LongestCode) = (alphabet, 0, 0, 0);
        starts.Clear();
    }

    /// <summary>Adds a context in use.</summary>
    public void AddContext(ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        starts.Add(end);
        if (symbolsInUse.Length < end + symbols.Length)
        {
            Array.Resize(ref symbolsInUse, 2 * (end + symbols.Length));
            Array.Resize(ref lengthsInUse, 2 * (end + symbols.Length));
        }
        Span<byte> lengths = lengthsInUse.AsSpan(end, symbols.Length);
        Span<long> row = counts.AsSpan(0, symbols.Length);
        for (int i = 0; i < row.Length; i++) row[i] = fold0[i] + fold1[i];
        // Symbols that do not occur change no length, so the code is built over those that do.
        if (row.Length == 1) lengths[0] = 1;
        else Huffman.Lengths(row, lengths);
        PayloadBits += Huffman.PayloadDigits(row, lengths);
        foreach (byte length in lengths) LongestCode = Math.Max(LongestCode, length);
        symbols.CopyTo(symbolsInUse.AsSpan(end));
        end += symbols.Length;
    }

    /// <summary>The cheapest format in which every context's table can be sent, and its bits, the map of contexts included; ties go to the first in <see cref="TableFormat"/>.</summary>
    public (long Bits, TableFormat Format) Tables()
    {
        // The sparse format suits few symbols and is quick to price; the others are given up as soon as they pass it.
        (long Bits, TableFormat Format) best = (SparseBits(), TableFormat.Sparse);
        foreach (TableFormat format in (ReadOnlySpan<TableFormat>)[TableFormat.Rfc8878HuffmanWeights, TableFormat.Rfc1951DynamicHeader, TableFormat.Flat])
        {
            if (TryPrice(format, best.Bits, out long bits)) best = (bits, format);
        }
        return (best.Bits + alphabetSize, best.Format);
    }

    private long SparseBits()
    {
        long sum = 0;
        for (int context = 0; context < starts.Count; context++)
        {
            System.Range range = RangeOf(context);
            sum += SparseTable.Bits(symbolsInUse.AsSpan()[range], lengthsInUse.AsSpan()[range]);
        }
        return sum;
    }

    /// <summary>The sum over contexts; false where a context's table cannot be sent so, or the sum passes the limit.</summary>
    private bool TryPrice(TableFormat format, long limit, out long sum)
    {
        sum = 0;
        for (int context = 0; context < starts.Count; context++)
        {
            System.Range range = RangeOf(context);
            Span<byte> lengths = dense.AsSpan(0, alphabetSize);
            lengths.Clear();
            for (int i = range.Start.Value; i < range.End.Value; i++) lengths[symbolsInUse[i]] = lengthsInUse[i];
            if (!TablePricing.TryPrice(format, lengths, out long bits)) return false;
            sum += bits;
            if (sum > limit) return false;
        }
        return true;
    }

    private System.Range RangeOf(int context) => new(starts[context], context + 1 < starts.Count ? starts[context + 1] : end);
}
