using System.Globalization;
using ScottPlot;
using ScottPlot.Plottables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Share of each symbol, in the order of the alphabet.</summary>
internal static class HistogramChart
{
    private const int DataHeight = 220;
    private const double Headroom = 1.05;

    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        if (view.SymbolCounts?.Dense is not { } counts) return Chart.Instead("Counts of single symbols are kept only for views of at most 256 symbols, in sources with a page.");
        IReadOnlyList<SymbolLine> ranked = SymbolLine.Ranked(view);
        if (ranked.Count < 2) return Chart.Instead($"One symbol, {SymbolText.Of(view, ranked[0].Symbol)}, is all there is.");
        string title = Title(view, ranked);
        string subtitle = $"Share of each symbol in per cent, by its value; {SizeText.Count(view.SymbolsInUse)} of {SizeText.Count(view.AlphabetSize)} are in use";
        Plot plot = PictureFrame.Create(title, subtitle, Picture.UsualWidth);
        var bars = new List<Bar>(ranked.Count);
        for (int symbol = 0; symbol < counts.Length; symbol++)
            if (counts[symbol] > 0) bars.Add(new Bar { Position = symbol, Value = 100.0 * counts[symbol] / view.Symbols, Size = 1, FillColor = Tones.Full(CodeFamily.Raw), LineWidth = 0 });
        plot.Add.Plottable(new BarPlot(bars));
        double highest = 100 * ranked[0].Share * Headroom;
        PictureFrame.TicksLeft(plot, PictureFrame.FromZero(highest, 5));
        PictureFrame.TicksBelow(plot, Places(view, counts.Length));
        plot.Axes.SetLimits(-0.5, counts.Length - 0.5, 0, highest);
        string alternative = $"{title}. {subtitle}. The most frequent: " + string.Join(", ", ranked.Take(8).Select(line => $"{SymbolText.Of(view, line.Symbol)} {Percent(line.Share)}")) + ".";
        float heading = new HeadingPanel(title, subtitle, Picture.UsualWidth).Height;
        return Chart.Of(new Picture
        {
            Slug = "histogram", Title = title, Subtitle = subtitle, Alternative = alternative, Plot = PictureFrame.Close(plot),
            Height = (int)Math.Ceiling(heading + DataHeight + PictureFrame.TickLine + PictureFrame.Margin),
        });
    }

    private static string Title(ViewProfile view, IReadOnlyList<SymbolLine> ranked)
    {
        int half = 0;
        for (double covered = 0; half < ranked.Count && covered < 0.5; half++) covered += ranked[half].Share;
        return half == 1
            ? $"{SymbolText.Of(view, ranked[0].Symbol)} alone is {Percent(ranked[0].Share)} of all symbols"
            : $"{SizeText.Count(half)} of {SizeText.Count(ranked.Count)} symbols in use make up half of all; the most frequent, {SymbolText.Of(view, ranked[0].Symbol)}, is {Percent(ranked[0].Share)}";
    }

    private static List<(double, string)> Places(ViewProfile view, int symbols)
    {
        int step = Math.Max(1, symbols / 8);
        var ticks = new List<(double, string)>();
        for (int symbol = 0; symbol < symbols; symbol += step) ticks.Add((symbol, Bare(view, symbol)));
        if (symbols > 1 && step > 1) ticks.Add((symbols - 1, Bare(view, symbols - 1)));
        return ticks;
    }

    private static string Bare(ViewProfile view, int symbol) => view.AlphabetSize switch
    {
        256 => "0x" + symbol.ToString("x2", CultureInfo.InvariantCulture),
        16 => "0x" + symbol.ToString("x1", CultureInfo.InvariantCulture),
        _ => symbol.ToString(CultureInfo.InvariantCulture),
    };

    private static string Percent(double share) => (100 * share).ToString(share < 0.0995 ? "0.00" : "0.0", CultureInfo.InvariantCulture) + " %";
}
