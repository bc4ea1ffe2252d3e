using CsCheck;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>Whatever saves work must not change a choice: floors lie below the figures they stand for, quick estimates near them.</summary>
public sealed class FloorTests
{
    /// <summary>Counts of flat, steep and sparse shapes, up to 2^45.</summary>
    private static readonly Gen<long[]> s_counts =
        Gen.Select(Gen.Int[2, 256], Gen.Int[0, 45], Gen.Int[0, 3]).SelectMany((alphabetSize, scale, shape) =>
            Gen.Double[0, 1].Array[alphabetSize].Select(draws => Array.ConvertAll(draws, draw => Count(draw, scale, shape))))
        .Where(counts => counts.Any(n => n > 0));

    [Fact]
    public void A_table_s_floors_are_never_above_its_price()
    {
        int[] priced = new int[4];
        s_counts.Sample(counts =>
        {
            byte[] lengths = new byte[counts.Length];
            Huffman.Lengths(counts, lengths);
            foreach (TableFormat format in NaiveBlocks.Formats)
            {
                if (!TablePricing.TryPrice(format, lengths, out long bits)) continue;
                Assert.InRange(TableFloor.Before(format, counts.Length, counts.Count(n => n > 0)), 0, bits);
                Assert.InRange(TableFloor.Of(format, lengths), 0, bits);
                Interlocked.Increment(ref priced[(int)format]);
            }
        }, iter: 2000);
        Assert.All(priced, count => Assert.True(count > 300, $"{string.Join(", ", priced)} tables were priced."));
    }

    [Fact]
    public void A_block_s_payload_floor_is_never_above_its_payload_and_near_it()
    {
        s_counts.Sample(counts =>
        {
            byte[] lengths = new byte[counts.Length];
            Huffman.Lengths(counts, lengths);
            BlockStatistics block = BlockStatistics.Of(counts);
            Assert.Equal((counts.Sum(), counts.Count(n => n > 0)), (block.Symbols, block.InUse));
            Assert.InRange(block.PayloadFloor, 1, Huffman.PayloadDigits(counts, lengths));
            Assert.True(block.PayloadFloor >= (block.Symbols * (Entropy.BitsPerSymbol(counts) - 1e-7)) - 3);
        }, iter: 2000);
    }

    [Fact]
    public void A_block_is_covered_by_a_table_that_has_all_its_symbols() =>
        Gen.Select(Gen.Bool.Array[200], Gen.Bool.Array[200]).Sample((used, table) =>
        {
            // Few draws of 200 symbols would be covered: half of the time the table gets what is used.
            if (used[0]) table = [.. table.Zip(used, (a, b) => a || b)];
            bool covered = BlockStatistics.Of(Array.ConvertAll(used, u => u ? 1L : 0L)).CoveredBy(BlockStatistics.Of(Array.ConvertAll(table, t => t ? 1L : 0L)).Used);
            return covered == used.Zip(table, (u, t) => !u || t).All(ok => ok);
        });

    [Fact]
    public void The_quick_logarithm_keeps_its_error_bound() =>
        Gen.Select(Gen.Int[0, 62], Gen.Double[1, 2]).Sample((exponent, mantissa) =>
        {
            long n = (long)Math.Min(mantissa * Math.Pow(2, exponent), long.MaxValue / 2);
            return Math.Abs(WeightedLogarithm.Of(n) - (n * Math.Log2(n))) <= n * WeightedLogarithm.Error;
        }, iter: 5000);

    [Fact]
    public void The_interval_s_entropy_is_the_entropy() =>
        s_counts.Sample(counts => Math.Abs(WeightedLogarithm.BitsPerSymbol(counts) - Entropy.BitsPerSymbol(counts)) <= 1e-12, iter: 1000);

    [Fact]
    public void The_split_s_estimate_keeps_its_error_bound()
    {
        double worst = 0;
        s_counts.Sample(counts =>
        {
            long[] two = [.. counts, .. counts.Reverse()], sum = [.. counts.Zip(counts.Reverse(), (a, b) => a + b)];
            using var cells = new SplitCells(two, counts.Length);
            cells.Stretch.Clear();
            cells.Extend(0, cells.Stretch, cells[0].Symbols);
            long symbols = cells[0].Symbols + cells[1].Symbols;
            double error = Math.Abs(cells.Extend(1, cells.Stretch, symbols) - (Entropy.BitsPerSymbol(sum) * symbols)) / symbols;
            Assert.InRange(error, 0, SplitCells.Error);
            lock (s_counts) worst = Math.Max(worst, error);
        }, iter: 2000);
        Assert.True(worst > SplitCells.Error / 100, $"{worst}");
    }

    private static long Count(double draw, int scale, int shape) => shape switch
    {
        0 => (long)(draw * Math.Pow(2, scale)),
        1 => (long)Math.Pow(2, draw * scale),
        2 => draw < 0.8 ? 0 : (long)(draw * Math.Pow(2, scale)),
        _ => 1 + (long)((draw + 20) * Math.Pow(2, scale) / 20),
    };
}
