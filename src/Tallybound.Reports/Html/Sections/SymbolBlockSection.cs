using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>Symbols coded several at a time.</summary>
internal static class SymbolBlockSection
{
    /// <summary>Makes it; null where no blocks were counted.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section? Of(ViewProfile view, string record)
    {
        if (view.SymbolBlocks.Count == 0) return null;
        SymbolBlockProfile best = view.SymbolBlocks.MinBy(block => block.Observed.TotalBits)!;
        return new Section("symbol-blocks", "Symbol blocks",
            $"Taken {best.BlockLength.ToString(CultureInfo.InvariantCulture)} at a time, {SizeText.Count(best.BlocksInUse)} different blocks occur, and the whole is {SizeText.Bytes(RatesSection.Bytes(best.Observed.TotalBits))}, of which {SizeText.Bytes(RatesSection.Bytes(best.Observed.TableBits))} are the table.")
        {
            Charts = [SymbolBlockChart.Of(view)],
            Tables = [Blocks(view, record)],
            HowToRead = "Observed blocks are the ones in the data, with the dependence between neighbours. The independent column prices blocks of symbols drawn one by one: what is left of its gain is won back from whole code lengths alone.",
        };
    }

    private static Table Blocks(ViewProfile view, string record)
    {
        string unit = Units.OfSymbol(view);
        var payload = new SizeColumn(view.SymbolBlocks.Select(block => (long?)RatesSection.Bytes(block.Observed.PayloadBits)));
        var table = new SizeColumn(view.SymbolBlocks.Select(block => (long?)RatesSection.Bytes(block.Observed.TableBits)));
        var total = new SizeColumn(view.SymbolBlocks.Select(block => (long?)RatesSection.Bytes(block.Observed.TotalBits)));
        Column[] columns = [new("symbols a block"), new("blocks"), new("different ones"), new($"entropy of blocks, {unit}"), new($"payload, {payload.Unit}"), new($"table, {table.Unit}"), new($"total, {total.Unit}"), new($"independent, {unit}")];
        List<Row> rows = [.. view.SymbolBlocks.Select((block, index) =>
        {
            string at = $"{record}/symbolBlocks/{index.ToString(CultureInfo.InvariantCulture)}";
            return new Row(
            [
                NumberCells.Count(block.BlockLength, at + "/blockLength"), NumberCells.Count(block.Blocks, at + "/blocks"), NumberCells.Count(block.BlocksInUse, at + "/blocksInUse"), NumberCells.Rate(block.BlockEntropyBitsPerSymbol, at + "/blockEntropyBitsPerSymbol"),
                payload.Of(RatesSection.Bytes(block.Observed.PayloadBits), at + "/observed/payloadBits"), table.Of(RatesSection.Bytes(block.Observed.TableBits), at + "/observed/tableBits"),
                total.Of(RatesSection.Bytes(block.Observed.TotalBits), at + "/observed/totalBits"), NumberCells.Rate(block.Independent?.ExpectedBitsPerSymbol, at + "/independent/expectedBitsPerSymbol"),
            ]);
        })];
        return new Table("Symbol blocks, non-overlapping from the start of the source; symbols left over are sent plain and stand in the payload.", columns, rows);
    }
}
