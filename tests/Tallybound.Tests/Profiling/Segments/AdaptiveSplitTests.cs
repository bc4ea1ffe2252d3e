using CsCheck;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>The adaptive split: its price is exact for its stretches, its search finds plain changes. That it beats every fixed size is no law.</summary>
public sealed class AdaptiveSplitTests
{
    [Fact]
    public void The_price_is_that_of_the_stretches_found()
    {
        int several = 0;
        MixedSource.Any.Where(source => source.Segments > 1).Sample(source =>
        {
            SegmentCounts counts = BlockSizeCurveTests.Counted(source);
            IReadOnlyList<TableBlockPrice> curve = BlockSizeCurve.Exact(counts);
            AdaptiveSplitProfile split = AdaptiveSplit.Find(counts, curve)!;
            Assert.Equal(0, split.Starts[0]);
            int[] ends = [.. split.Starts.Skip(1).Select(start => (int)start), source.Symbols.Length];
            List<long[]> stretches = [.. split.Starts.Zip(ends, (from, to) => source.Counts((int)from, to))];
            NaiveBlocks.Price naive = NaiveBlocks.Cheapest(stretches, source.AlphabetSize);
            Assert.Equal((naive.Payload, naive.Table, naive.Framing, naive.Total), (split.PayloadBits, split.TableBits, split.FramingBits, split.TotalBits));
            Assert.Equal(naive.Kinds[(int)BlockKind.OwnTable] == 0 ? null : naive.Format.Name(), split.TableFormat);
            Assert.Equal(curve.Min(point => point.TotalBits), split.BestFixedTotalBits);
            Assert.Contains(curve, point => point.BlockBytes == split.BestFixedBlockBytes && point.TotalBits == split.BestFixedTotalBits);
            if (split.Starts.Count > 1) Interlocked.Increment(ref several);
        }, iter: 300);
        Assert.True(several > 50, $"{several} sources were divided.");
    }

    [Fact]
    public void The_search_finds_the_least_estimate_of_all_divisions() =>
        Gen.Select(Gen.Long[0, 40].Array[4].Where(n => n.Sum() > 0).List[1, 8], Gen.Long[0, 120]).Sample((cells, tableBits) =>
        {
            double least = double.PositiveInfinity;
            for (int cuts = 0; cuts < 1 << (cells.Count - 1); cuts++) least = Math.Min(least, Estimate(cells, cuts, tableBits));
            List<int> starts = SplitSearch.Starts([.. cells.SelectMany(cell => cell)], 4, tableBits);
            int found = starts.Skip(1).Aggregate(0, (cuts, start) => cuts | (1 << (start - 1)));
            return Math.Abs(Estimate(cells, found, tableBits) - least) <= 1e-3;
        }, iter: 200);

    [Fact]
    public void A_change_half_way_is_found_and_pays()
    {
        var random = new Random(3);
        byte[] symbols = [.. Enumerable.Range(0, 64 * 512).Select(i => (byte)((i < 40 * 512 ? 0 : 128) + Math.Min(127, (int)(-Math.Log(1 - random.NextDouble()) * 4))))];
        var source = new MixedSource(symbols, 256, 512);
        SegmentCounts counts = BlockSizeCurveTests.Counted(source);
        AdaptiveSplitProfile split = AdaptiveSplit.Find(counts, BlockSizeCurve.Exact(counts))!;
        Assert.Equal([0, 40 * 512], split.Starts);
        Assert.True(split.TotalBits < split.BestFixedTotalBits);
    }

    /// <summary>Each cut of a source without change wins back about (m − 1)/(2 ln 2) bits of H0's bias, 184 for bytes: less than any table of them.</summary>
    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_source_without_change_is_not_divided(bool uniform)
    {
        var random = new Random(6);
        byte[] symbols = [.. Enumerable.Range(0, 300 * 1024).Select(_ => (byte)(uniform ? random.Next(256) : Math.Min(255, (int)(-Math.Log(1 - random.NextDouble()) * 20))))];
        SegmentCounts counts = BlockSizeCurveTests.Counted(new MixedSource(symbols, 256, 1024));
        Assert.Equal([0], AdaptiveSplit.Find(counts, BlockSizeCurve.Exact(counts))!.Starts);
    }

    [Fact]
    public void Segments_are_merged_until_256_are_left()
    {
        var random = new Random(4);
        long[] counts = [.. Enumerable.Range(0, 1001 * 4).Select(i => (long)random.Next(i / 4 < 500 ? 10 : 2000))];
        var source = new SegmentCounts(counts, 4, 4096);
        AdaptiveSplitProfile split = AdaptiveSplit.Find(source, BlockSizeCurve.Exact(source))!;
        Assert.All(split.Starts, start => Assert.Equal(0, start % (4 * 4096)));
    }

    [Fact]
    public void One_segment_is_not_divided()
    {
        var source = new SegmentCounts([1, 2, 3, 4], 4, 4096);
        Assert.Null(AdaptiveSplit.Find(source, BlockSizeCurve.Exact(source)));
    }

    private static double Estimate(List<long[]> cells, int cuts, long tableBits)
    {
        double bits = 0;
        for (int from = 0, i = 1; i <= cells.Count; i++)
        {
            if (i < cells.Count && (cuts >> (i - 1) & 1) == 0) continue;
            long[] counts = [.. Enumerable.Range(0, 4).Select(s => cells.Skip(from).Take(i - from).Sum(cell => cell[s]))];
            double symbols = counts.Sum(), information = counts.Where(n => n > 0).Sum(n => n * Math.Log2(symbols / n));
            bits += Math.Min(counts.Count(n => n > 0) == 1 ? 2 : symbols * 2, information + tableBits);
            from = i;
        }
        return bits;
    }
}
