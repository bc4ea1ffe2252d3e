using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>What a limit on code lengths costs: payload, table and framing by limit, the free code beside them.</summary>
internal static class LengthLimitChart
{
    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        CodePrice? free = view.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2, TotalBits: not null });
        List<CodePrice> limited = [.. view.Codes.Where(code => code is { Code: "huffman-limited", LengthLimit: not null, TotalBits: not null }).OrderBy(code => code.LengthLimit)];
        if (free is null || limited.Count == 0) return Chart.Instead("No length limit was priced.");
        CodePrice? cheapest = limited.FirstOrDefault(code => code.LimitCostBits == 0);
        if (cheapest is not null && limited[0] == cheapest)
            return Chart.Instead($"A limit of {Number(cheapest.LengthLimit!.Value)} bits costs nothing: the free code's longest word has {Number(free.LongestCode ?? 0)}. All limits priced ({string.Join(", ", limited.Select(code => Number(code.LengthLimit!.Value)))}) give the free code.");
        double perSymbol = 1.0 / view.Symbols;
        List<BarRow> rows = [.. limited.Append(free).Select(code => new BarRow(
            code.LengthLimit is { } limit ? $"at most {Number(limit)} bits" : $"no limit (longest {Number(code.LongestCode ?? 0)})", CodeFamily.Huffman, code.PayloadBits!.Value * perSymbol, code.TableBits!.Value * perSymbol, code.FramingBits!.Value * perSymbol,
            code.LengthLimit is null ? "" : $"+{SizeText.Bytes((code.LimitCostBits!.Value + 7) / 8)}", code.LengthLimit is null))];
        CodePrice tightest = limited[0];
        string title = $"A limit of {Number(tightest.LengthLimit!.Value)} bits costs {SizeText.Bytes((tightest.LimitCostBits!.Value + 7) / 8)} of payload, {(100.0 * tightest.LimitCostBits.Value / free.PayloadBits!.Value).ToString("0.00", CultureInfo.InvariantCulture)} %"
            + (cheapest is null ? "" : $"; {Number(cheapest.LengthLimit!.Value)} bits cost nothing");
        string alternative = $"{title}. " + string.Join("; ", limited.Select(code => $"limit {Number(code.LengthLimit!.Value)}: {SizeText.Count(code.LimitCostBits!.Value)} bits more, {Number(code.SymbolsAtLimit ?? 0)} symbols at the limit")) + ".";
        return Chart.Of(SizeBars.Draw("length-limit", title, $"Payload and table (lighter) in {Units.OfSymbol(view)} by the longest code allowed; payload that the limit costs at the right", alternative, rows,
            [new BoundRule(view.Orders[0].EntropyBitsPerSymbol, 0, rows.Count - 1, $"static order-0 bound {SizeText.Rate(view.Orders[0].EntropyBitsPerSymbol)}")]));
    }

    private static string Number(int value) => value.ToString(CultureInfo.InvariantCulture);
}
