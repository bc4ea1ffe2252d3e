using Tallybound.Coding.Bits;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>Tables inside a stream of table blocks, in any format that holds code lengths: the very serialisers that prices are made of.</summary>
/// <remarks>The formats of the two RFCs pack the least significant bit first and may ask for a byte boundary; they are written apart, and their bits then follow in order.</remarks>
internal static class TableTransport
{
    /// <summary>No table of 256 lengths takes more bits in a format that is written apart.</summary>
    private const int MostBitsApart = 8192;

    /// <summary>Writes a table.</summary>
    /// <param name="format">A format that can hold the lengths.</param>
    /// <param name="lengths">One length a symbol, 0 for a symbol not in use.</param>
    /// <param name="sink">Takes as many bits as <see cref="TablePricing.TryPrice"/> says.</param>
    public static void Encode(TableFormat format, ReadOnlySpan<byte> lengths, BitWriter sink)
    {
        if (format == TableFormat.Flat)
        {
            FlatTable.Encode(lengths, ref sink);
            return;
        }
        if (format == TableFormat.Sparse)
        {
            EncodeSparse(lengths, sink);
            return;
        }
        var apart = new LowBitWriter();
        if (format == TableFormat.Rfc1951DynamicHeader) Rfc1951DynamicHeader.Encode(lengths, ref apart);
        else Rfc8878HuffmanWeights.Encode(lengths, ref apart);
        var reader = new LowBitReader(apart.ToArray());
        for (long i = apart.Bits; i > 0; i--) sink.Write(reader.Read(1), 1);
    }

    /// <summary>Reads a table.</summary>
    /// <param name="format">The format it was written in.</param>
    /// <param name="reader">Stands at the table before, behind it after.</param>
    /// <param name="bitsLeft">Bits from there to the end of the stream.</param>
    /// <param name="lengths">Takes one length a symbol of the alphabet.</param>
    /// <exception cref="InvalidDataException">The bits end early or make no table of this alphabet.</exception>
    public static void Decode(TableFormat format, ref BitReader reader, long bitsLeft, Span<byte> lengths)
    {
        if (format == TableFormat.Flat)
        {
            FlatTable.Decode(ref reader, lengths);
            return;
        }
        if (format == TableFormat.Sparse)
        {
            DecodeSparse(ref reader, lengths);
            return;
        }
        BitReader ahead = reader;
        var apart = new LowBitWriter();
        for (long i = Math.Min(bitsLeft, MostBitsApart); i > 0; i--) apart.Write(ahead.Read(1), 1);
        var apartReader = new LowBitReader(apart.ToArray());
        if (format == TableFormat.Rfc1951DynamicHeader) Rfc1951DynamicHeader.Decode(ref apartReader, lengths);
        else Rfc8878HuffmanWeights.Decode(ref apartReader, lengths);
        for (long i = apartReader.Position; i > 0; i--) reader.Read(1);
    }

    private static void EncodeSparse(ReadOnlySpan<byte> lengths, BitWriter sink)
    {
        Span<int> symbols = stackalloc int[lengths.Length];
        Span<byte> used = stackalloc byte[lengths.Length];
        int inUse = 0;
        for (int symbol = 0; symbol < lengths.Length; symbol++)
        {
            if (lengths[symbol] == 0) continue;
            symbols[inUse] = symbol;
            used[inUse++] = lengths[symbol];
        }
        SparseTable.Encode(symbols[..inUse], used[..inUse], ref sink);
    }

    private static void DecodeSparse(ref BitReader reader, Span<byte> lengths)
    {
        (int[] symbols, byte[] used) = SparseTable.Decode(ref reader);
        if (symbols[^1] >= lengths.Length) throw new InvalidDataException($"The table has a word for symbol {symbols[^1]}; the alphabet has {lengths.Length}.");
        lengths.Clear();
        for (int i = 0; i < symbols.Length; i++) lengths[symbols[i]] = used[i];
    }
}
