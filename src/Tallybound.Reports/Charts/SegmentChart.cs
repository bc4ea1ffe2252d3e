using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Payload along the source, segment by segment: under a table of its own and under the source's table, with the change points found.</summary>
internal static class SegmentChart
{
    /// <summary>Draws it.</summary>
    /// <param name="view">The view.</param>
    /// <param name="sourceBytes">Bytes of the source.</param>
    public static Chart Of(ViewProfile view, long sourceBytes)
    {
        if (view.Segments is not { } segments) return Chart.Instead("No segments were kept for this view.");
        int count = segments.OwnTableBits.Count;
        if (count < 2) return Chart.Instead($"The source is one segment of {SizeText.Whole(segments.SegmentBytes)} or less, so nothing can be said of changes along it.");
        long own = segments.OwnTableBits.Sum(), source = segments.SourceTableBits.Sum();
        double loss = own == 0 ? 0 : 100.0 * (source - own) / source;
        IReadOnlyList<long> changes = view.AdaptiveSplit?.Starts ?? [];
        string title = changes.Count > 1
            ? $"The statistics change: {SizeText.Count(changes.Count)} stretches with tables of their own; tables fitted to each segment would save {Percent(loss)} % of payload"
            : $"The statistics hold: tables fitted to each segment would save {Percent(loss)} % of payload, before their own cost";
        (double scale, string unit) = ByteScale.For(sourceBytes);
        double PerByte(long bits, int index) => bits / (double)Math.Min(segments.SegmentBytes, sourceBytes - index * segments.SegmentBytes);
        double Middle(int index) => (Math.Min((index + 1) * segments.SegmentBytes, sourceBytes) + index * segments.SegmentBytes) / 2.0 / scale;
        Curve[] curves =
        [
            new("source's table", CurveKind.OtherCodedSize, CodeFamily.Huffman, [.. segments.SourceTableBits.Select((bits, index) => new CurvePoint(Middle(index), PerByte(bits, index)))], ScottPlot.MarkerShape.OpenSquare),
            new("own table", CurveKind.CodedSize, CodeFamily.Huffman, [.. segments.OwnTableBits.Select((bits, index) => new CurvePoint(Middle(index), PerByte(bits, index)))]),
        ];
        string alternative = $"{title}. {SizeText.Count(count)} segments of {SizeText.Whole(segments.SegmentBytes)}; payload {SizeText.Bytes(own / 8)} under own tables, {SizeText.Bytes(source / 8)} under the source's table"
            + (changes.Count > 1 ? "; changes at byte " + string.Join(", ", changes.Skip(1).Take(12).Select(SizeText.Count)) + (changes.Count > 13 ? $" and {SizeText.Count(changes.Count - 13)} more" : "") : "") + ".";
        return Chart.Of(Curves.Draw("segments", title, $"Huffman payload in bit/byte of segments of {SizeText.Whole(segments.SegmentBytes)}, tables left out, by place in the source ({unit}); grey rules are change points",
            alternative, curves, PictureFrame.FromZero(sourceBytes / scale, 8), [.. changes.Skip(1).Take(64).Select(start => start / scale)]));
    }

    private static string Percent(double value) => value.ToString(value < 10 ? "0.0" : "0", CultureInfo.InvariantCulture);
}
