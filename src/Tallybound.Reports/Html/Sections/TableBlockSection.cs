using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>How much data one table should serve.</summary>
internal static class TableBlockSection
{
    /// <summary>Makes it; null where no curve was computed.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    /// <param name="sourceBytes">Bytes of the source.</param>
    public static Section? Of(ViewProfile view, string record, long sourceBytes)
    {
        if (view.TableBlocks is not { Count: > 0 } points) return null;
        TableBlockPrice best = BlockSizeChart.Best(points);
        string message = $"In blocks of {SizeText.Whole(best.BlockBytes)}, each with its cheapest kind of table, the source is {SizeText.Bytes(RatesSection.Bytes(best.TotalBits))}, the least of the sizes tried.";
        if (view.AdaptiveSplit is { } split)
        {
            string parts = $"{SizeText.Count(split.Starts.Count)} {(split.Starts.Count == 1 ? "stretch" : "stretches")}";
            message += split.TotalBits < split.BestFixedTotalBits
                ? $" Split where its statistics change, in {parts}, it is {SizeText.Bytes(RatesSection.Bytes(split.TotalBits))}."
                : $" Splitting it where its statistics change, in {parts}, does no better: {SizeText.Bytes(RatesSection.Bytes(split.TotalBits))}.";
        }
        return new Section("table-blocks", "Table blocks", message)
        {
            Charts = [BlockSizeChart.Of(view, sourceBytes)],
            Tables = [Curve(points, record, best)],
            HowToRead = "A table block is the stretch that one table serves; each is stored, one symbol throughout, coded with the table sent last, or with its own, whichever is least. Small blocks follow the data closely and pay for many tables; large ones pay for few and follow less.",
            Caution = points.Any(point => !point.Exact) ? "Sizes marked about are estimates from sample windows, scaled to the whole source." : null,
        };
    }

    private static Table Curve(IReadOnlyList<TableBlockPrice> points, string record, TableBlockPrice best)
    {
        var payload = new SizeColumn(points.Select(point => (long?)RatesSection.Bytes(point.PayloadBits)));
        var tables = new SizeColumn(points.Select(point => (long?)RatesSection.Bytes(point.TableBits)));
        var framing = new SizeColumn(points.Select(point => (long?)RatesSection.Bytes(point.FramingBits)));
        var total = new SizeColumn(points.Select(point => (long?)RatesSection.Bytes(point.TotalBits)));
        Column[] columns = [new("block, bytes"), new($"total, {total.Unit}"), new($"payload, {payload.Unit}"), new($"tables, {tables.Unit}"), new($"framing, {framing.Unit}"), new("above the least, %"), new("stored"), new("one symbol"), new("last table"), new("own table"), new("figure", IsText: true), new("table format", IsText: true)];
        List<Row> rows = [.. points.Select((point, index) =>
        {
            string at = $"{record}/tableBlocks/{index.ToString(CultureInfo.InvariantCulture)}";
            return new Row(
            [
                new Cell(SizeText.Whole(point.BlockBytes)) { Exact = NumberCells.ExactBytes(point.BlockBytes), Record = at + "/blockBytes", Unit = "bytes", SortKey = point.BlockBytes.ToString(CultureInfo.InvariantCulture) },
                total.Of(RatesSection.Bytes(point.TotalBits), at + "/totalBits"), payload.Of(RatesSection.Bytes(point.PayloadBits), at + "/payloadBits"), tables.Of(RatesSection.Bytes(point.TableBits), at + "/tableBits"),
                framing.Of(RatesSection.Bytes(point.FramingBits), at + "/framingBits"), new Cell(point.LossBits is { } loss && best.TotalBits > 0 ? (100.0 * loss / best.TotalBits).ToString("0.00", CultureInfo.InvariantCulture) : ""),
                NumberCells.Count(point.Kinds?.Stored, at + "/kinds/stored"), NumberCells.Count(point.Kinds?.OneSymbol, at + "/kinds/oneSymbol"), NumberCells.Count(point.Kinds?.LastTable, at + "/kinds/lastTable"), NumberCells.Count(point.Kinds?.OwnTable, at + "/kinds/ownTable"),
                new Cell(Figure(point)), new Cell(point.TableFormat ?? ""),
            ], point == best);
        })];
        return new Table("The block-size curve, and how many blocks took each kind.", columns, rows);
    }

    private static string Figure(TableBlockPrice point) => point.Exact ? "exact"
        : point.TotalBitsInterval is [long low, long high] ? $"about, {SizeText.Bytes(RatesSection.Bytes(low))} to {SizeText.Bytes(RatesSection.Bytes(high))}" : "about";
}
