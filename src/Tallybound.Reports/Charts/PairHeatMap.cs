using System.Globalization;
using ScottPlot;
using ScottPlot.Plottables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Counts of symbol pairs: the symbol before down, the symbol across, colour by the logarithm of the count.</summary>
internal static class PairHeatMap
{
    private const int Side = 512;
    private const int ColorBarRoom = 96;
    private const int AxisRoom = 62;

    /// <summary>Draws it; only the heaviest sources keep pair counts.</summary>
    public static Chart Of(ViewProfile view)
    {
        if (view.PairCounts is not { Count: > 0 } pairs || view.AlphabetSize > 256) return Chart.Instead("Pair counts are kept for the ten heaviest sources.");
        int symbols = (int)view.AlphabetSize;
        var cells = new double[symbols, symbols];
        for (int i = 0; i < symbols; i++) for (int j = 0; j < symbols; j++) cells[i, j] = double.NaN;
        long most = 0, used = 0;
        (int Before, int Symbol) heaviest = default;
        foreach ((string context, IReadOnlyList<long[]> row) in pairs)
        {
            int before = int.Parse(context, CultureInfo.InvariantCulture);
            foreach (long[] pair in row)
            {
                cells[before, pair[0]] = Math.Log10(pair[1]);
                used++;
                if (pair[1] > most || (pair[1] == most && (before, (int)pair[0]).CompareTo(heaviest) < 0)) (most, heaviest) = (pair[1], (before, (int)pair[0]));
            }
        }
        if (used < 2) return Chart.Instead("One pair of symbols is all there is, so there is no map to draw.");
        string title = $"{Share(100.0 * used / ((double)symbols * symbols))} % of all pairs occur; the most frequent, {SymbolText.Of(view, heaviest.Before)} then {SymbolText.Of(view, heaviest.Symbol)}, {SizeText.Count(most)} times";
        const string Subtitle = "Symbol before (down) and symbol (across); colour is the pair's count on a logarithmic scale, white where it never occurs";
        Plot plot = PictureFrame.Create(title, Subtitle, Picture.UsualWidth);
        AddMap(plot, cells, symbols, most);
        List<(double, string)> ticks = [.. Enumerable.Range(0, 5).Select(quarter => Math.Min(symbols - 1, quarter * symbols / 4)).Distinct().Select(symbol => ((double)symbol, Hex(symbol, symbols)))];
        PictureFrame.TicksBelow(plot, ticks);
        PictureFrame.TicksLeft(plot, [.. ticks.Select(tick => (symbols - 1 - tick.Item1, tick.Item2))]);
        plot.Grid.YAxisStyle.IsVisible = false;
        plot.Axes.SetLimits(-0.5, symbols - 0.5, -0.5, symbols - 0.5);
        float heading = new HeadingPanel(title, Subtitle, Picture.UsualWidth).Height;
        float left = (Picture.UsualWidth - Side - ColorBarRoom + AxisRoom) / 2f;
        plot.Layout.Fixed(new PixelPadding(left, Picture.UsualWidth - left - Side, PictureFrame.TickLine + PictureFrame.Margin, heading));
        return Chart.Of(new Picture
        {
            Slug = "pair-map", Title = title, Subtitle = Subtitle, Plot = PictureFrame.Close(plot), Height = (int)Math.Ceiling(heading + Side + PictureFrame.TickLine + PictureFrame.Margin),
            Alternative = $"{title}. {SizeText.Count(used)} of {SizeText.Count((long)symbols * symbols)} pairs are in use.",
        });
    }

    private static void AddMap(Plot plot, double[,] cells, int symbols, long most)
    {
        Heatmap map = plot.Add.Heatmap(cells);
        map.Colormap = new ScottPlot.Colormaps.Viridis();
        map.NaNCellColor = Tones.Ground;
        map.Smooth = false;
        map.Extent = new CoordinateRect(-0.5, symbols - 0.5, -0.5, symbols - 0.5);
        double decades = Math.Max(1, Math.Log10(most));
        map.ManualRange = new ScottPlot.Range(0, decades);
        ScottPlot.Panels.ColorBar bar = plot.Add.ColorBar(map);
        List<(double Place, string Label)> ticks = [.. Enumerable.Range(0, (int)decades + 1).Select(decade => ((double)decade, SizeText.Count((long)Math.Pow(10, decade))))];
        bar.Axis.TickGenerator = new ScottPlot.TickGenerators.NumericManual([.. ticks.Select(tick => tick.Place)], [.. ticks.Select(tick => tick.Label)]);
        bar.Axis.TickLabelStyle.FontSize = PictureText.Size;
        bar.Axis.TickLabelStyle.ForeColor = Tones.Soft;
    }

    private static string Hex(int symbol, int symbols) => "0x" + symbol.ToString(symbols > 16 ? "x2" : "x1", CultureInfo.InvariantCulture);

    private static string Share(double percent) => percent.ToString(percent < 10 ? "0.0" : "0", CultureInfo.InvariantCulture);
}
