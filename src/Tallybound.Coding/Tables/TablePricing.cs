using System.Buffers;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Tables;

/// <summary>What a prefix code's table costs in each format, and the cheapest one.</summary>
public static class TablePricing
{
    private const int DenseLimit = 256;

    /// <summary>The cheapest legal format for code lengths; ties go to the first in <see cref="TableFormat"/>.</summary>
    /// <param name="denseLengths">One length a symbol of the alphabet, 0 for a symbol not in use; at least one in use, none above 127.</param>
    /// <exception cref="ArgumentException">No symbol is in use.</exception>
    public static (long TableBits, TableFormat Format) Cheapest(ReadOnlySpan<byte> denseLengths)
    {
        (long TableBits, TableFormat Format) best = (long.MaxValue, default);
        for (TableFormat format = TableFormat.Flat; format <= TableFormat.Sparse; format++)
        {
            if (TryPrice(format, denseLengths, out long bits) && bits < best.TableBits) best = (bits, format);
        }
        return best.TableBits < long.MaxValue ? best : throw new ArgumentException("No symbol is in use, so there is no table.", nameof(denseLengths));
    }

    /// <summary>The price of one format; parameter as for <see cref="Cheapest"/>.</summary>
    /// <returns>False, and 0 bits, where the format cannot hold these lengths, and where no symbol is in use.</returns>
    public static bool TryPrice(TableFormat format, ReadOnlySpan<byte> denseLengths, out long bits)
    {
        bits = 0;
        int longest = FlatTable.Longest(denseLengths);
        if (longest is 0 or > 127) return false;
        switch (format)
        {
            case TableFormat.Flat:
                bits = FlatTable.Bits(denseLengths.Length, longest);
                return true;
            case TableFormat.Rfc1951DynamicHeader:
                if (!Rfc1951DynamicHeader.IsLegal(denseLengths)) return false;
                var counter = default(BitCounter);
                Rfc1951DynamicHeader.Encode(denseLengths, ref counter);
                bits = counter.Bits;
                return true;
            case TableFormat.Rfc8878HuffmanWeights:
                return Rfc8878HuffmanWeights.TryPrice(denseLengths, out bits);
            case TableFormat.Sparse:
                bits = SparseBits(denseLengths);
                return true;
            default:
                return false;
        }
    }

    /// <summary>The cheapest legal format for code lengths of a large alphabet.</summary>
    /// <param name="symbols">Symbols in use, ascending, at least one.</param>
    /// <param name="lengths">Their lengths, 1 to 127.</param>
    /// <param name="alphabetSize">A, above the last symbol.</param>
    public static (long TableBits, TableFormat Format) CheapestSparse(ReadOnlySpan<int> symbols, ReadOnlySpan<byte> lengths, long alphabetSize)
    {
        if (alphabetSize <= DenseLimit)
        {
            Span<byte> dense = stackalloc byte[(int)alphabetSize];
            dense.Clear();
            for (int i = 0; i < symbols.Length; i++) dense[symbols[i]] = lengths[i];
            return Cheapest(dense);
        }
        long sparse = SparseTable.Bits(symbols, lengths), flat = FlatTable.Bits(alphabetSize, FlatTable.Longest(lengths));
        return flat <= sparse ? (flat, TableFormat.Flat) : (sparse, TableFormat.Sparse);
    }

    private static long SparseBits(ReadOnlySpan<byte> denseLengths)
    {
        int inUse = denseLengths.Length - denseLengths.Count((byte)0);
        if (inUse <= DenseLimit) return SparseBits(denseLengths, stackalloc int[inUse], stackalloc byte[inUse]);
        int[] symbols = ArrayPool<int>.Shared.Rent(inUse);
        byte[] lengths = ArrayPool<byte>.Shared.Rent(inUse);
        try
        {
            return SparseBits(denseLengths, symbols.AsSpan(0, inUse), lengths.AsSpan(0, inUse));
        }
        finally
        {
            ArrayPool<int>.Shared.Return(symbols);
            ArrayPool<byte>.Shared.Return(lengths);
        }
    }

    private static long SparseBits(ReadOnlySpan<byte> denseLengths, Span<int> symbols, Span<byte> lengths)
    {
        int at = 0;
        for (int symbol = 0; symbol < denseLengths.Length; symbol++)
        {
            if (denseLengths[symbol] == 0) continue;
            symbols[at] = symbol;
            lengths[at++] = denseLengths[symbol];
        }
        return SparseTable.Bits(symbols, lengths);
    }
}
