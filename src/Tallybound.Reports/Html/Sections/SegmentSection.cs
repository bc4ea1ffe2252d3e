using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>Whether the statistics change along the source.</summary>
internal static class SegmentSection
{
    private const int StretchesShown = 64;

    /// <summary>Makes it; null where no segments were kept.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    /// <param name="sourceBytes">Bytes of the source.</param>
    public static Section? Of(ViewProfile view, string record, long sourceBytes)
    {
        if (view.Segments is not { } segments) return null;
        int count = segments.OwnTableBits.Count, furthest = 0;
        for (int i = 1; i < count; i++) if (segments.DivergenceBits[i] > segments.DivergenceBits[furthest]) furthest = i;
        string message = count < 2
            ? $"The source is one segment of at most {SizeText.Whole(segments.SegmentBytes)}."
            : $"Of {SizeText.Count(count)} segments the one at byte {SizeText.Count(furthest * segments.SegmentBytes)} is furthest from the whole: {SizeText.Rate(segments.DivergenceBits[furthest])} bits of Jensen–Shannon divergence, on a scale from 0 (alike) to 1 (nothing in common).";
        return new Section("segments", "Segments and drift", message)
        {
            Charts = [SegmentChart.Of(view, sourceBytes)],
            Tables = [Costs(segments)],
            FoldedTables = view.AdaptiveSplit is { Starts.Count: > 1 } split ? [Stretches(split, record, sourceBytes)] : [],
            HowToRead = "Where the two lines part, the source's one table fits badly. Segments are the unit of statistics: their tables are left out here, so the gap is what tables of their own could save at most, before they are paid for.",
        };
    }

    private static Table Costs(SegmentSeries segments)
    {
        long[] bits = [segments.OwnTableBits.Sum(), segments.SourceTableBits.Sum(), segments.PreviousTableBits.Sum()];
        string[] names = ["a table of each segment's own", "the source's one table", "the table of the segment before, with an escape"];
        var size = new SizeColumn(bits.Select(sum => (long?)RatesSection.Bytes(sum)));
        return new Table("Payload of all segments, tables left out.", [new("coded with", IsText: true), new($"payload, {size.Unit}"), new("above own tables, %")],
            [.. names.Select((name, index) => new Row([new Cell(name), size.Of(RatesSection.Bytes(bits[index])), new Cell(bits[0] == 0 ? "" : (100.0 * (bits[index] - bits[0]) / bits[0]).ToString("0.00", CultureInfo.InvariantCulture))]))]);
    }

    private static Table Stretches(AdaptiveSplitProfile split, string record, long sourceBytes)
    {
        int shown = Math.Min(StretchesShown, split.Starts.Count);
        List<Row> rows = [.. Enumerable.Range(0, shown).Select(index =>
        {
            long start = split.Starts[index], end = index + 1 < split.Starts.Count ? split.Starts[index + 1] : sourceBytes;
            return new Row([NumberCells.Count(index + 1), NumberCells.Count(start, $"{record}/adaptiveSplit/starts/{index.ToString(CultureInfo.InvariantCulture)}"), NumberCells.Count(end - start)]);
        })];
        string rest = shown < split.Starts.Count ? $" The first {shown.ToString(CultureInfo.InvariantCulture)} of {SizeText.Count(split.Starts.Count)}; all of them are in profile.json." : "";
        return new Table($"The best division found, not proved best: stretches with a new table or the last one.{rest}", [new("stretch"), new("begins at byte"), new("length, bytes")], rows);
    }
}
