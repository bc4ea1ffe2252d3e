using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>The source cut into table blocks of one size: payload, tables and framing by that size.</summary>
internal static class BlockSizeChart
{
    /// <summary>Draws it.</summary>
    /// <param name="view">The view.</param>
    /// <param name="sourceBytes">Bytes of the source.</param>
    public static Chart Of(ViewProfile view, long sourceBytes)
    {
        if (view.TableBlocks is not { Count: > 1 } points) return Chart.Instead("The source fits one table block, so there is no block size to choose.");
        TableBlockPrice best = Best(points);
        double perByte = 1.0 / sourceBytes;
        List<BarRow> rows = [.. points.Select(point => new BarRow(
            SizeText.Whole(point.BlockBytes) + (point.Exact ? "" : ", about"), CodeFamily.Huffman, point.PayloadBits * perByte, point.TableBits * perByte, point.FramingBits * perByte,
            SizeText.Rate(point.TotalBits * perByte) + (point.LossBits is { } loss ? loss == 0 ? "  least" : $"  +{Percent(100.0 * loss / best.TotalBits)} %" : "  about"), point == best))];
        if (view.AdaptiveSplit is { } split) rows.Add(new BarRow($"split in {SizeText.Count(split.Starts.Count)}, best found", CodeFamily.Huffman, split.PayloadBits * perByte, split.TableBits * perByte, split.FramingBits * perByte, SizeText.Rate(split.TotalBits * perByte)));
        TableBlockPrice smallest = points[0];
        string title = best == smallest
            ? $"Small blocks are best: {SizeText.Whole(best.BlockBytes)}, the smallest that was tried"
            : $"Blocks of {SizeText.Whole(best.BlockBytes)} are best; at {SizeText.Whole(smallest.BlockBytes)} tables and framing take {Percent(100.0 * (smallest.TableBits + smallest.FramingBits) / smallest.TotalBits)} % of the coded size";
        string alternative = $"{title}. " + string.Join("; ", rows.Select(row => $"{row.Label}: {SizeText.Rate(row.Payload)} payload, {SizeText.Rate(row.Table)} tables, {SizeText.Rate(row.Framing)} framing")) + " bit/byte.";
        return Chart.Of(SizeBars.Draw("block-size", title, "Payload, tables (lighter) and framing (hatched) in bit/byte by bytes of a table block; each block takes its cheapest kind; sizes below a segment are estimates from sample windows",
            alternative, rows, []));
    }

    /// <summary>The cheapest exact point; the cheapest of all where none is exact.</summary>
    internal static TableBlockPrice Best(IReadOnlyList<TableBlockPrice> points) =>
        points.Where(point => point.Exact).MinBy(point => point.TotalBits) ?? points.MinBy(point => point.TotalBits)!;

    private static string Percent(double value) => value.ToString(value < 10 ? "0.0" : "0", CultureInfo.InvariantCulture);
}
