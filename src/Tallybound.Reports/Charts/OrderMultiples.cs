using System.Globalization;
using ScottPlot;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Small multiples of the ten heaviest sources: cost of a coder that learns by context order, all on one scale.</summary>
/// <remarks>One plot holds all panels, five to a row: each has its own place on the horizontal axis and its own floor on the vertical one.</remarks>
internal static class OrderMultiples
{
    private const int Across = 5;
    private const int PanelHeight = 180;
    private const double PanelWide = 3.6;
    private const double NameRoom = 0.56;
    private const double TickRoom = 0.3;

    /// <summary>Draws it.</summary>
    /// <param name="sources">The heaviest sources, by bytes.</param>
    public static Chart Of(IReadOnlyList<SourceProfile> sources)
    {
        List<(SourceProfile Source, ViewProfile View)> shown = [.. sources.Where(source => source.Views is [{ Orders.Count: > 1 }, ..]).Select(source => (source, source.Views![0]))
            .Where(pair => pair.Item2.Orders.All(order => order.AdaptiveBitsPerSymbol is not null)).Take(10)];
        if (shown.Count < 2) return Chart.Instead("Fewer than two of the heaviest sources have figures for more than one context order.");
        double highest = shown.Max(pair => pair.View.Orders.Max(order => order.AdaptiveBitsPerSymbol!.Value));
        double floorStep = highest * (1 + NameRoom + TickRoom);
        int rows = (shown.Count + Across - 1) / Across;
        (SourceProfile best, double gain) = shown.Select(pair => (pair.Source, Gain(pair.View))).MaxBy(pair => pair.Item2);
        string title = gain > 0
            ? $"Context helps most in {PictureText.Fit(PictureText.Shown(best.Name), 330, PictureText.TitleSize)}: {(100 * gain).ToString(gain < 0.1 ? "0.0" : "0", CultureInfo.InvariantCulture)} % below order 0"
            : "Context helps none of the heaviest sources";
        string subtitle = $"Adaptive cost at orders 0, 1 and 2 of the {shown.Count} heaviest sources, bit/symbol, each panel from 0 to {highest.ToString("0.0", CultureInfo.InvariantCulture)}";
        Plot plot = PictureFrame.Create(title, subtitle, Picture.UsualWidth);
        plot.Grid.YAxisStyle.IsVisible = false;
        plot.Axes.Left.IsVisible = false;
        plot.Axes.Bottom.IsVisible = false;
        var texts = new PanelTexts();
        plot.Add.Plottable(texts);
        for (int i = 0; i < shown.Count; i++) AddPanel(plot, texts, shown[i].Source, shown[i].View, i % Across * PanelWide, (rows - 1 - i / Across) * floorStep, highest);
        plot.Axes.SetLimits(-0.6, (Across - 1) * PanelWide + 3.0, -TickRoom * highest, rows * floorStep - TickRoom * highest);
        float heading = new HeadingPanel(title, subtitle, Picture.UsualWidth).Height;
        string alternative = $"{title}. " + string.Join("; ", shown.Select(pair => $"{pair.Source.Name}: " + string.Join(", ", pair.View.Orders.Select(order => SizeText.Rate(order.AdaptiveBitsPerSymbol!.Value))))) + " bit/symbol at orders 0, 1, 2.";
        return Chart.Of(new Picture { Slug = "order-multiples", Title = title, Subtitle = subtitle, Alternative = alternative, Plot = PictureFrame.Close(plot), Height = (int)Math.Ceiling(heading + rows * PanelHeight + PictureFrame.Margin) });
    }

    private static double Gain(ViewProfile view)
    {
        double zero = view.Orders[0].AdaptiveBitsPerSymbol!.Value;
        return zero > 0 ? (zero - view.Orders.Min(order => order.AdaptiveBitsPerSymbol!.Value)) / zero : 0;
    }

    private static void AddPanel(Plot plot, PanelTexts texts, SourceProfile source, ViewProfile view, double left, double floor, double highest)
    {
        ScottPlot.Plottables.LinePlot ground = plot.Add.Line(left - 0.35, floor, left + 2.35, floor);
        ground.LineColor = Tones.Soft;
        ground.LineWidth = 1;
        Coordinates[] points = [.. view.Orders.Select(order => new Coordinates(left + order.Order, floor + order.AdaptiveBitsPerSymbol!.Value))];
        ScottPlot.Plottables.Scatter line = plot.Add.ScatterLine(points, Tones.Full(CodeFamily.Context));
        line.LineWidth = 2.2f;
        for (int i = 0; i < points.Length; i++)
        {
            plot.Add.Marker(points[i].X, points[i].Y, MarkerShape.FilledCircle, 7, Tones.Full(CodeFamily.Context));
            texts.Add(points[i].X, floor, view.Orders[i].Order.ToString(CultureInfo.InvariantCulture), Alignment.UpperCenter, Tones.Soft, 2);
            texts.Add(points[i].X, points[i].Y, view.Orders[i].AdaptiveBitsPerSymbol!.Value.ToString("0.00", CultureInfo.InvariantCulture), Alignment.LowerCenter, Tones.Dark, -6);
        }
        texts.Add(left - 0.35, floor + highest * (1 + NameRoom * 0.55), PictureText.Fit(PictureText.Shown(source.Name), 128), Alignment.LowerLeft, Tones.Dark, 0);
    }
}
