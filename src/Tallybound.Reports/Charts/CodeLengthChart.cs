using System.Globalization;
using ScottPlot;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Code length of the free Huffman code against the symbol's rank, with log2(1/p), the length it would have were lengths not whole, behind it.</summary>
internal static class CodeLengthChart
{
    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        List<SymbolLine> symbols = [.. SymbolLine.Ranked(view)];
        if (symbols.Count < 2) return Chart.Instead(symbols.Count == 1 ? "One symbol is in use, so there is no curve of code lengths." : "Code lengths are kept only for views of at most 256 symbols, in sources with a page.");
        Curve[] curves =
        [
            new("log2(1/p)", CurveKind.Bound, CodeFamily.Huffman, [.. symbols.Select((symbol, rank) => new CurvePoint(rank + 1, symbol.SelfInformationBits))]),
            new("Huffman", CurveKind.CodedSize, CodeFamily.Huffman, Steps(symbols), Marked: false),
        ];
        CodePrice? huffman = view.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2 });
        string title = huffman is { RedundancyBitsPerSymbol: { } redundancy, Efficiency: { } efficiency }
            ? $"Whole code lengths cost {SizeText.Rate(redundancy)} {Units.OfSymbol(view)} above log2(1/p): efficiency {(100 * efficiency).ToString("0.0", CultureInfo.InvariantCulture)} %"
            : "Code length beside log2(1/p)";
        SymbolLine first = symbols[0], last = symbols[^1];
        string alternative = $"{title}. The most frequent of {SizeText.Count(symbols.Count)} symbols, {SymbolText.Of(view, first.Symbol)}, has {SizeText.Rate(first.SelfInformationBits)} bits of self-information and a code of {first.CodeLength}; " +
            $"the rarest, {SymbolText.Of(view, last.Symbol)}, {SizeText.Rate(last.SelfInformationBits)} bits and a code of {last.CodeLength}.";
        return Chart.Of(Curves.Draw("code-lengths", title, "Bits by rank of the symbol, the most frequent first", alternative, curves, Ranks(symbols.Count)));
    }

    /// <summary>Two points a run of one length, so that the line is a staircase.</summary>
    private static List<CurvePoint> Steps(List<SymbolLine> symbols)
    {
        var points = new List<CurvePoint>();
        for (int i = 0; i < symbols.Count; i++)
        {
            if (i == 0 || symbols[i].CodeLength != symbols[i - 1].CodeLength) points.Add(new CurvePoint(i + 0.5, symbols[i].CodeLength));
            if (i == symbols.Count - 1 || symbols[i].CodeLength != symbols[i + 1].CodeLength) points.Add(new CurvePoint(i + 1.5, symbols[i].CodeLength));
        }
        return points;
    }

    private static List<(double, string)> Ranks(int symbols)
    {
        var ticks = new List<(double, string)> { (1, "1") };
        int step = symbols <= 16 ? 2 : symbols <= 40 ? 5 : symbols <= 130 ? 16 : 32;
        for (int rank = step; rank <= symbols; rank += step) if (rank > 1) ticks.Add((rank, rank.ToString(CultureInfo.InvariantCulture)));
        return ticks;
    }
}
