using System.Buffers;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Segments;

/// <summary>What a source costs when it is cut into table blocks of one size, for sizes that double.</summary>
public static class BlockSizeCurve
{
    /// <summary>The exact points: from one segment up by doubling, the last size holding the whole source in one block.</summary>
    /// <returns>Smallest block first; one point for a source of one segment, none for a source without symbols. Of the cheapest point the loss is 0.</returns>
    public static IReadOnlyList<TableBlockPrice> Exact(SegmentCounts source) => WithEstimates(source, []);

    /// <summary>The whole curve: points below one segment from windows, then the exact ones.</summary>
    /// <param name="source">The segments.</param>
    /// <param name="windows">Windows of the source, each priced by <see cref="WindowPricing.Price"/> with its segment size; empty: no such points.</param>
    /// <param name="sourceBytes">Bytes of the source: the windows' bits are scaled to them.</param>
    /// <param name="seed">Of the intervals.</param>
    public static IReadOnlyList<TableBlockPrice> Whole(SegmentCounts source, IReadOnlyList<WindowPrices> windows, long sourceBytes, ulong seed) =>
        source.Segments == 0 ? [] : WithEstimates(source, WindowPricing.Points(windows, sourceBytes, seed));

    private static List<TableBlockPrice> WithEstimates(SegmentCounts source, IReadOnlyList<TableBlockPrice> estimates)
    {
        var points = new List<TableBlockPrice>(estimates);
        if (source.Segments == 0) return points;
        long[] counts = ArrayPool<long>.Shared.Rent(source.All.Length);
        try
        {
            source.All.CopyTo(counts);
            AddExact(source, counts, points);
        }
        finally
        {
            ArrayPool<long>.Shared.Return(counts);
        }
        long least = long.MaxValue;
        foreach (TableBlockPrice point in points)
        {
            if (point.Exact) least = Math.Min(least, point.TotalBits);
        }
        for (int i = estimates.Count; i < points.Count; i++) points[i] = points[i] with { LossBits = points[i].TotalBits - least };
        return points;
    }

    private static void AddExact(SegmentCounts source, Span<long> counts, List<TableBlockPrice> points)
    {
        var pricer = TableBlockPricer.ForThread(source.AlphabetSize);
        int blocks = source.Segments;
        for (long blockBytes = source.SegmentBytes; ; blockBytes *= 2)
        {
            pricer.Begin();
            for (int block = 0; block < blocks; block++) pricer.Add(counts.Slice(block * source.AlphabetSize, source.AlphabetSize));
            points.Add(Point(pricer.Cheapest(), blockBytes));
            if (blocks == 1) return;
            blocks = MergePairs(counts, blocks, source.AlphabetSize);
        }
    }

    /// <summary>Adds neighbours pairwise in place; an odd last one stays alone.</summary>
    /// <returns>Blocks left.</returns>
    internal static int MergePairs(Span<long> counts, int blocks, int alphabetSize)
    {
        for (int block = 0; block < blocks; block++)
        {
            ReadOnlySpan<long> from = counts.Slice(block * alphabetSize, alphabetSize);
            Span<long> to = counts.Slice(block / 2 * alphabetSize, alphabetSize);
            if (block % 2 == 0) from.CopyTo(to);
            else SegmentCounts.AddTo(to, from);
        }
        return (blocks + 1) / 2;
    }

    private static TableBlockPrice Point(FormatChain chain, long blockBytes)
    {
        BlockTotals totals = chain.Totals;
        return new TableBlockPrice
        {
            BlockBytes = blockBytes,
            Exact = true,
            PayloadBits = totals.PayloadBits,
            TableBits = totals.TableBits,
            FramingBits = totals.FramingBits,
            TotalBits = totals.TotalBits,
            TableFormat = totals.OwnTable == 0 ? null : chain.Format.Name(),
            Kinds = new BlockKindCounts(totals.Stored, totals.OneSymbol, totals.LastTable, totals.OwnTable),
        };
    }
}
