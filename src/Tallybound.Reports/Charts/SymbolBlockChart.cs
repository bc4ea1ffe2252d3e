using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Huffman codes of symbol blocks by block length, payload and table apart, with the entropy of the observed blocks as bounds.</summary>
internal static class SymbolBlockChart
{
    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        CodePrice? single = view.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2, TotalBits: not null });
        if (single is null || view.SymbolBlocks.Count == 0) return Chart.Instead("No symbol blocks were counted in this view.");
        string unit = Units.OfSymbol(view);
        double perSymbol = 1.0 / view.Symbols;
        List<BarRow> rows = [new("single symbols", CodeFamily.Huffman, single.PayloadBits!.Value * perSymbol, single.TableBits!.Value * perSymbol, single.FramingBits!.Value * perSymbol, SizeText.Rate(single.TotalBits!.Value * perSymbol))];
        List<BoundRule> bounds = [new(view.Orders[0].EntropyBitsPerSymbol, 0, 0, $"static order-0 bound {SizeText.Rate(view.Orders[0].EntropyBitsPerSymbol)}")];
        foreach (SymbolBlockProfile block in view.SymbolBlocks)
        {
            ObservedBlocks observed = block.Observed;
            rows.Add(new BarRow($"blocks of {Number(block.BlockLength)}, as observed", CodeFamily.Block, observed.PayloadBits * perSymbol, observed.TableBits * perSymbol, observed.FramingBits * perSymbol, SizeText.Rate(observed.TotalBits * perSymbol)));
            bounds.Add(new BoundRule(block.BlockEntropyBitsPerSymbol, rows.Count - 1, rows.Count - 1, $"bound of blocks of {Number(block.BlockLength)} {SizeText.Rate(block.BlockEntropyBitsPerSymbol)}"));
            if (block.Independent is not { TableBits: { } tableBits, ExpectedTotalBits: { } total } independent) continue;
            double table = tableBits * perSymbol;
            rows.Add(new BarRow($"blocks of {Number(block.BlockLength)}, if symbols were independent", CodeFamily.Huffman, independent.ExpectedBitsPerSymbol, table, Math.Max(0, total * perSymbol - independent.ExpectedBitsPerSymbol - table), SizeText.Rate(total * perSymbol)));
        }
        string title = Title(view, single.TotalBits.Value);
        string alternative = $"{title}. " + string.Join("; ", rows.Select(row => $"{row.Label}: {SizeText.Rate(row.Payload)} payload, {SizeText.Rate(row.Table)} table")) + $" {unit}.";
        return Chart.Of(SizeBars.Draw("symbol-blocks", title, $"Payload and table (lighter) of Huffman codes for blocks of symbols, {unit}; dark rules are bounds", alternative, rows, bounds));
    }

    private static string Title(ViewProfile view, long singleBits)
    {
        SymbolBlockProfile best = view.SymbolBlocks.MinBy(block => block.Observed.TotalBits)!;
        double gain = 100.0 * (singleBits - best.Observed.TotalBits) / singleBits;
        double eaten = 100.0 * best.Observed.TableBits / singleBits;
        if (gain > 0) return $"Blocks of {Number(best.BlockLength)} win {Percent(gain)} % over single symbols, after a table that costs {Percent(eaten)} %";
        SymbolBlockProfile payload = view.SymbolBlocks.MinBy(block => block.Observed.PayloadBits)!;
        double gross = 100.0 * (singleBits - payload.Observed.PayloadBits) / singleBits;
        return gross > 0
            ? $"Symbol blocks do not pay: blocks of {Number(payload.BlockLength)} would win {Percent(gross)} %, their table costs {Percent(100.0 * payload.Observed.TableBits / singleBits)} %"
            : "Symbol blocks do not pay: their payload alone is larger than single symbols with their table";
    }

    private static string Percent(double value) => value.ToString(value < 10 ? "0.0" : "0", CultureInfo.InvariantCulture);

    private static string Number(int value) => value.ToString(CultureInfo.InvariantCulture);
}
