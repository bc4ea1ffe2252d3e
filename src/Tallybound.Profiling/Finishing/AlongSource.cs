using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;

namespace Tallybound.Profiling.Finishing;

/// <summary>The figures of a view that follow from its segments and sample windows alone.</summary>
/// <param name="Series">Figures segment by segment.</param>
/// <param name="Curve">The block-size curve.</param>
/// <param name="Split">The best division found.</param>
internal sealed record AlongSource(SegmentSeries? Series, IReadOnlyList<TableBlockPrice> Curve, AdaptiveSplitProfile? Split)
{
    /// <summary>Works the figures out; the same on any thread.</summary>
    public static AlongSource Of(ViewSegments segments, IReadOnlyList<byte[]> windows, long sourceBytes, ulong seed)
    {
        WindowPrices[] priced = [.. windows.Select(window => WindowPricing.Price(window, segments.SegmentBytes))];
        IReadOnlyList<TableBlockPrice> curve = BlockSizeCurve.Whole(segments.Counts, priced, sourceBytes, seed);
        return new AlongSource(SegmentPricing.Series(segments.Counts), curve, AdaptiveSplit.Find(segments.Counts, curve));
    }

    /// <summary>The record with these figures in it.</summary>
    public ViewProfile AddTo(ViewProfile profile) => profile with { Segments = Series, TableBlocks = Curve, AdaptiveSplit = Split };
}
