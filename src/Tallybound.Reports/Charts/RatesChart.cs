using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>What each code costs on one view, table and framing apart, with the bounds that apply to it as rules.</summary>
internal static class RatesChart
{
    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        if (view.Symbols == 0) return Chart.Instead("There is no symbol in this view, so there is no rate to draw.");
        List<CodePrice> codes = [.. InRows(view)];
        double perSymbol = 1.0 / view.Symbols;
        int? suffices = view.Codes.FirstOrDefault(code => code.LimitCostBits == 0)?.LengthLimit;
        List<BarRow> rows = [new("stored", CodeFamily.Raw, view.StoredTotalBits * perSymbol, 0, 0, Value(view, view.StoredTotalBits))];
        CodeChoice best = CodeChoice.Cheapest(view);
        foreach (CodePrice code in codes)
        {
            string name = CodeText.Of(CodeChoice.KeyOf(code));
            if (suffices is { } limit && code is { Code: "huffman", Radix: 2 }) name = string.Create(System.Globalization.CultureInfo.InvariantCulture, $"{name} ({limit} bits suffice)");
            rows.Add(new BarRow(name, Tones.FamilyOf(code.Code), code.PayloadBits!.Value * perSymbol, code.TableBits!.Value * perSymbol,
                code.FramingBits!.Value * perSymbol, Value(view, code.TotalBits!.Value), CodeChoice.KeyOf(code) == best.Key));
        }
        string unit = Units.OfSymbol(view);
        string title = best.Key == CodeChoice.Stored
            ? "No code priced here makes it smaller once its table is charged"
            : $"{CodeText.AtTheStart(best.Key)} is smallest: {SizeText.Bytes(best.TotalBits / 8)} of {SizeText.Bytes((view.RawBits + 7) / 8)}, {SizeText.Ratio(view.RawBits, best.TotalBits)}, table included";
        string alternative = $"{title}. " + string.Join("; ", rows.Select(row => $"{row.Label} {SizeText.Rate(row.Payload + row.Table + row.Framing)}")) + $" {unit}. "
            + string.Join("; ", Bounds(view, codes).Select(bound => $"{bound.Label} {SizeText.Rate(bound.At)}")) + ".";
        return Chart.Of(SizeBars.Draw("rates", title, $"Payload, table (lighter) and framing (hatched) in {unit}; raw ÷ coded at the right; dark rules are bounds", alternative, rows, Bounds(view, codes)));
    }

    /// <summary>Binary codes with a total, without limits that cost nothing, memoryless ones first, so that each bound spans neighbours.</summary>
    private static IEnumerable<CodePrice> InRows(ViewProfile view)
    {
        foreach (string boundClass in (string[])["memoryless", "block", "context"])
            foreach (CodePrice code in view.Codes)
                if (code.BoundClass == boundClass && code.LimitCostBits != 0 && code is { TotalBits: not null, PayloadBits: not null, TableBits: not null, FramingBits: not null }) yield return code;
    }

    private static List<BoundRule> Bounds(ViewProfile view, List<CodePrice> codes)
    {
        var bounds = new List<BoundRule>();
        int memoryless = codes.Count(code => code.BoundClass == "memoryless");
        if (memoryless > 0) bounds.Add(new BoundRule(view.Orders[0].EntropyBitsPerSymbol, 1, memoryless, $"static order-0 bound {SizeText.Rate(view.Orders[0].EntropyBitsPerSymbol)}: one fixed table, no memory"));
        for (int i = 0; i < codes.Count; i++)
        {
            CodePrice code = codes[i];
            if (code.BoundClass == "memoryless" || code is not { BitsPerSymbol: { } rate, RedundancyBitsPerSymbol: { } redundancy }) continue;
            double bound = rate - redundancy;
            string name = code.BoundClass == "block" ? $"bound of {code.BlockLength}-symbol blocks" : "plug-in order-1 bound";
            bounds.Add(new BoundRule(bound, i + 1, i + 1, $"{name} {SizeText.Rate(bound)}"));
        }
        return bounds;
    }

    private static string Value(ViewProfile view, long bits) => $"{SizeText.Bytes((bits + 7) / 8)}  {SizeText.Ratio(view.RawBits, bits)}";
}
