using System.Buffers;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Segments;

/// <summary>Divides a source into stretches with a new table where its statistics change.</summary>
/// <remarks>The division is the best one found on an estimate, over at most 256 merged segments, and then priced exactly. It is not proved best: a fixed block size can be cheaper,
/// and stands beside it.</remarks>
public static class AdaptiveSplit
{
    /// <summary>Merged segments that the search decides between, at most.</summary>
    public const int MostCells = 256;

    /// <summary>The division found and what it costs.</summary>
    /// <param name="source">The segments.</param>
    /// <param name="curve">The source's block-size curve; its cheapest exact point is compared.</param>
    /// <returns>Null below two segments.</returns>
    /// <exception cref="ArgumentException">The curve has no exact point.</exception>
    public static AdaptiveSplitProfile? Find(SegmentCounts source, IReadOnlyList<TableBlockPrice> curve)
    {
        if (source.Segments < 2) return null;
        long[] counts = ArrayPool<long>.Shared.Rent(source.All.Length);
        try
        {
            source.All.CopyTo(counts);
            int cells = source.Segments, alphabetSize = source.AlphabetSize;
            long cellBytes = source.SegmentBytes;
            for (; cells > MostCells; cellBytes *= 2) cells = BlockSizeCurve.MergePairs(counts, cells, alphabetSize);
            Span<long> merged = counts.AsSpan(0, cells * alphabetSize);
            List<int> starts = SplitSearch.Starts(merged, alphabetSize, TableBits(source));
            return Profile(PriceStretches(merged, alphabetSize, starts), starts, cellBytes, CheapestExact(curve));
        }
        finally
        {
            ArrayPool<long>.Shared.Return(counts);
        }
    }

    /// <summary>A flat table as long as the whole source's stands for every stretch's; above 1 GiB, what the estimate of the whole may be off, lest noise be taken for a change.</summary>
    private static long TableBits(SegmentCounts source)
    {
        Span<long> whole = stackalloc long[source.AlphabetSize];
        Span<byte> lengths = stackalloc byte[source.AlphabetSize];
        source.Sum(whole);
        Huffman.Lengths(whole, lengths);
        int longest = 0;
        long symbols = 0;
        for (int symbol = 0; symbol < whole.Length; symbol++)
        {
            longest = Math.Max(longest, lengths[symbol]);
            symbols += whole[symbol];
        }
        return Math.Max(FlatTable.Bits(source.AlphabetSize, longest), (long)(symbols * SplitCells.Error));
    }

    private static FormatChain PriceStretches(ReadOnlySpan<long> counts, int alphabetSize, List<int> starts)
    {
        Span<long> stretch = stackalloc long[alphabetSize];
        var pricer = TableBlockPricer.ForThread(alphabetSize);
        for (int i = 0; i < starts.Count; i++)
        {
            stretch.Clear();
            int end = (i + 1 < starts.Count ? starts[i + 1] * alphabetSize : counts.Length);
            for (int at = starts[i] * alphabetSize; at < end; at += alphabetSize) SegmentCounts.AddTo(stretch, counts.Slice(at, alphabetSize));
            pricer.Add(stretch);
        }
        return pricer.Cheapest();
    }

    private static AdaptiveSplitProfile Profile(FormatChain chain, List<int> starts, long cellBytes, TableBlockPrice bestFixed) => new()
    {
        Starts = [.. starts.Select(start => start * cellBytes)],
        PayloadBits = chain.Totals.PayloadBits,
        TableBits = chain.Totals.TableBits,
        FramingBits = chain.Totals.FramingBits,
        TotalBits = chain.Totals.TotalBits,
        TableFormat = chain.Totals.OwnTable == 0 ? null : chain.Format.Name(),
        BestFixedBlockBytes = bestFixed.BlockBytes,
        BestFixedTotalBits = bestFixed.TotalBits,
    };

    /// <summary>Of equal ones the one with the larger blocks: fewer of them.</summary>
    private static TableBlockPrice CheapestExact(IReadOnlyList<TableBlockPrice> curve)
    {
        TableBlockPrice? cheapest = null;
        foreach (TableBlockPrice point in curve)
        {
            if (point.Exact && (cheapest is null || point.TotalBits <= cheapest.TotalBits)) cheapest = point;
        }
        return cheapest ?? throw new ArgumentException("The curve has no exact point to compare with.", nameof(curve));
    }
}
