using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Tables;

public sealed class SparseTableTests
{
    [Fact]
    public void Large_alphabets_read_back_and_are_priced_as_written() =>
        Gen.Select(Gen.Int[1, 1 << 20].Array[1, 60], Gen.Byte[1, 91].Array[60], Gen.Bool).Sample((gaps, lengths, equal) =>
        {
            int[] symbols = new int[gaps.Length];
            for (int i = 0, symbol = -1; i < gaps.Length; i++) symbols[i] = symbol += gaps[i];
            byte[] inUse = lengths[..gaps.Length];
            if (equal) Array.Fill(inUse, lengths[0]);
            var writer = new BitWriter();
            SparseTable.Encode(symbols, inUse, ref writer);
            var reader = new BitReader(writer.ToArray());
            (int[] readSymbols, byte[] readLengths) = SparseTable.Decode(ref reader);
            return readSymbols.SequenceEqual(symbols) && readLengths.SequenceEqual(inUse) && writer.Bits == SparseTable.Bits(symbols, inUse) && reader.Position == writer.Bits;
        });

    [Fact]
    public void The_table_of_an_extension_costs_what_its_blocks_listed_one_by_one_cost()
    {
        int compared = 0;
        Gen.Select(Gen.Int[0, 15].HashSet[1, 6], Gen.Int[1, 4], Gen.Int[1, 1000].Array[16]).Sample((used, blockLength, weights) =>
        {
            int[] symbols = [.. used.Order()];
            (int[] blocks, long[] counts) = List(symbols, 16, blockLength, weights);
            byte[] lengths = new byte[blocks.Length];
            Huffman.Lengths(counts, lengths);
            long[] histogram = new long[lengths.Max() + 1];
            foreach (byte length in lengths) histogram[length]++;
            Assert.Equal(SparseTable.Bits(blocks, lengths), SparseTable.BitsOfExtension(symbols, 16, blockLength, histogram));
            Interlocked.Increment(ref compared);
        });
        Assert.True(compared >= 100);
    }

    /// <summary>Word alphabets, listed by all their symbols or by those in use: one price, the lower one, flat on a tie.</summary>
    [Fact]
    public void Large_alphabets_take_the_cheaper_of_flat_and_sparse()
    {
        int flat = 0, sparse = 0;
        Gen.Select(Gen.Int[257, 2000], Gen.OneOf(Gen.Const(1), Gen.Int[2, 40]), Gen.Byte[1, 15].Array[2000], Gen.Int[1, 15]).Sample((alphabetSize, every, drawn, longest) =>
        {
            byte[] dense = new byte[alphabetSize];
            for (int symbol = 0; symbol < alphabetSize; symbol += every) dense[symbol] = (byte)Math.Min(longest, (int)drawn[symbol]);
            int[] symbols = [.. Enumerable.Range(0, alphabetSize).Where(symbol => dense[symbol] > 0)];
            byte[] lengths = [.. symbols.Select(symbol => dense[symbol])];
            (long bits, TableFormat format) = TablePricing.CheapestSparse(symbols, lengths, alphabetSize);
            Assert.True(TablePricing.TryPrice(TableFormat.Flat, dense, out long flatBits));
            Assert.True(TablePricing.TryPrice(TableFormat.Sparse, dense, out long sparseBits));
            Assert.Equal(sparseBits, SparseTable.Bits(symbols, lengths));
            Assert.Equal((Math.Min(flatBits, sparseBits), flatBits <= sparseBits ? TableFormat.Flat : TableFormat.Sparse), (bits, format));
            Assert.Equal((bits, format), TablePricing.Cheapest(dense));
            if (format == TableFormat.Flat) Interlocked.Increment(ref flat);
            else Interlocked.Increment(ref sparse);
        });
        Assert.True(flat >= 5 && sparse >= 30, $"{flat} flat, {sparse} sparse.");
    }

    [Fact]
    public void Lengths_of_another_number_of_blocks_are_refused()
    {
        Assert.Throws<ArgumentException>(() => SparseTable.BitsOfExtension([0, 1], 2, 3, [0, 2]));
        Assert.Throws<ArgumentException>(() => SparseTable.BitsOfExtension([], 2, 3, [0, 0]));
        Assert.Throws<ArgumentException>(() => SparseTable.Bits([], []));
        Assert.Throws<ArgumentException>(() => SparseTable.Bits([4], [0]));
        Assert.Throws<ArgumentException>(() => SparseTable.Bits([4], [128]));
    }

    /// <summary>All blocks in ascending order, packed with the first symbol most significant, with the product of their symbols' weights.</summary>
    private static (int[] Blocks, long[] Counts) List(int[] symbols, int alphabetSize, int blockLength, int[] weights)
    {
        IEnumerable<(int Block, long Count)> blocks = [(0, 1L)];
        for (int i = 0; i < blockLength; i++) blocks = [.. blocks.SelectMany(block => symbols.Select(symbol => ((block.Block * alphabetSize) + symbol, block.Count * weights[symbol])))];
        return ([.. blocks.Select(block => block.Block)], [.. blocks.Select(block => block.Count)]);
    }
}
