using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Tables;

public sealed class DenseTableTests
{
    [Fact]
    public void A_flat_table_reads_back_and_is_priced_as_written() =>
        CodeLengths.Counts.Select(CodeLengths.Free).Sample(lengths =>
        {
            var writer = new BitWriter();
            FlatTable.Encode(lengths, ref writer);
            var reader = new BitReader(writer.ToArray());
            byte[] read = new byte[lengths.Length];
            FlatTable.Decode(ref reader, read);
            return read.SequenceEqual(lengths) && writer.Bits == Price(TableFormat.Flat, lengths);
        });

    [Fact]
    public void A_sparse_table_reads_back_and_is_priced_as_written() =>
        CodeLengths.Counts.Select(CodeLengths.Free).Sample(lengths =>
        {
            int[] symbols = [.. Enumerable.Range(0, lengths.Length).Where(symbol => lengths[symbol] > 0)];
            byte[] inUse = [.. symbols.Select(symbol => lengths[symbol])];
            var writer = new BitWriter();
            SparseTable.Encode(symbols, inUse, ref writer);
            var reader = new BitReader(writer.ToArray());
            (int[] readSymbols, byte[] readLengths) = SparseTable.Decode(ref reader);
            return readSymbols.SequenceEqual(symbols) && readLengths.SequenceEqual(inUse) && writer.Bits == Price(TableFormat.Sparse, lengths);
        });

    [Fact]
    public void A_Deflate_header_reads_back_and_is_priced_as_written() =>
        CodeLengths.UpTo15.Sample(lengths =>
        {
            var writer = new LowBitWriter();
            Rfc1951DynamicHeader.Encode(lengths, ref writer);
            var reader = new LowBitReader(writer.ToArray());
            byte[] read = new byte[lengths.Length];
            Rfc1951DynamicHeader.Decode(ref reader, read);
            return read.SequenceEqual(lengths) && writer.Bits == Price(TableFormat.Rfc1951DynamicHeader, lengths) && reader.Position == writer.Bits;
        });

    [Fact]
    public void Huffman_weights_read_back_and_are_priced_as_written()
    {
        int legal = 0;
        CodeLengths.UpTo11.Sample(lengths =>
        {
            if (!TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, lengths, out long bits)) return;
            Interlocked.Increment(ref legal);
            var writer = new LowBitWriter();
            Rfc8878HuffmanWeights.Encode(lengths, ref writer);
            var reader = new LowBitReader(writer.ToArray());
            byte[] read = new byte[lengths.Length];
            Rfc8878HuffmanWeights.Decode(ref reader, read);
            Assert.Equal(lengths, read);
            Assert.Equal(bits, writer.Bits);
            Assert.Equal(bits, reader.Position);
        });
        Assert.True(legal >= 50, $"{legal} legal tables are too few.");
    }

    [Fact]
    public void The_cheapest_format_is_the_least_of_all_prices() =>
        CodeLengths.Counts.Select(CodeLengths.Free).Sample(lengths =>
        {
            (long bits, TableFormat format) = TablePricing.Cheapest(lengths);
            long least = Enum.GetValues<TableFormat>().Min(one => TablePricing.TryPrice(one, lengths, out long price) ? price : long.MaxValue);
            int[] symbols = [.. Enumerable.Range(0, lengths.Length).Where(symbol => lengths[symbol] > 0)];
            (long TableBits, TableFormat Format) sparse = TablePricing.CheapestSparse(symbols, [.. symbols.Select(symbol => lengths[symbol])], lengths.Length);
            return bits == least && bits == Price(format, lengths) && sparse == (bits, format);
        });

    /// <summary>Direct weights of 255 equal words, and the rules of the formats one by one.</summary>
    [Fact]
    public void A_format_that_cannot_hold_the_lengths_has_no_price()
    {
        byte[] equal = new byte[256];
        Array.Fill(equal, (byte)8);
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, equal, out _));
        Assert.True(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, [.. Enumerable.Repeat((byte)7, 128)], out long direct));
        Assert.Equal(8 * (1 + 64), direct);
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, [1], out _));
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, [2, 2, 2], out _));
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, Chain(12), out _));
        Assert.True(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, Chain(11), out _));
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc1951DynamicHeader, Chain(16), out _));
        Assert.True(TablePricing.TryPrice(TableFormat.Rfc1951DynamicHeader, Chain(15), out _));
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc1951DynamicHeader, [.. equal, 0], out _));
        Assert.False(TablePricing.TryPrice(TableFormat.Rfc8878FseDistribution, equal, out _));
        foreach (TableFormat format in Enum.GetValues<TableFormat>()) Assert.False(TablePricing.TryPrice(format, new byte[9], out _));
        Assert.Throws<ArgumentException>(() => TablePricing.Cheapest(new byte[9]));
    }

    /// <summary>256 words of 8 bits by hand: flat 7 + 256·4; sparse δ(256) 15 + δ(1) 1 + 255·1 + 7 + 8·4; Deflate: 14 + precode to its 17th place + tokens.</summary>
    [Fact]
    public void Prices_of_equal_words_are_those_worked_by_hand()
    {
        byte[] equal = new byte[256];
        Array.Fill(equal, (byte)8);
        Assert.Equal(7 + (256 * 4), Price(TableFormat.Flat, equal));
        Assert.Equal(15 + 1 + 255 + 7 + 32, Price(TableFormat.Sparse, equal));
        // Tokens: 8, then 255 = 42 copies of 6 and one of 3, end-of-block 0, distance 0: 1 of 8, 43 of 16, 2 of 0 with words of 2 (or 1), 1 and 2 bits; 8 is the fifth in the order.
        Assert.Equal(14 + (3 * 5) + (43 * (1 + 2)) + (2 * 2) + 2, Price(TableFormat.Rfc1951DynamicHeader, equal));
    }

    [Fact]
    public void Names_are_those_that_records_print() => Assert.Equal(
        ["flat", "RFC 1951 dynamic header", "RFC 8878 Huffman weights", "sparse", "RFC 8878 FSE distribution"],
        Enum.GetValues<TableFormat>().Select(format => format.Name()));

    /// <summary>Lengths 1, 2, … n − 1, n, n.</summary>
    private static byte[] Chain(int longest) => [.. Enumerable.Range(1, longest).Select(length => (byte)length), (byte)longest];

    private static long Price(TableFormat format, byte[] lengths) => TablePricing.TryPrice(format, lengths, out long bits) ? bits : -1;
}
