using System.Globalization;
using ScottPlot;
using ScottPlot.TickGenerators;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>An empty plot in the reports' style: heading at the left, light horizontal or vertical grid, no frame above and right.</summary>
internal static class PictureFrame
{
    /// <summary>Height below the data of one line of tick labels, in pixels at 1×.</summary>
    public const float TickLine = 30;

    /// <summary>Room at the figure's lower and right edge.</summary>
    public const float Margin = 14;

    /// <summary>Makes the plot.</summary>
    public static Plot Create(string title, string subtitle, int width)
    {
        BundledFont.Install();
        var plot = new Plot();
        plot.FigureBackground.Color = Tones.Ground;
        plot.DataBackground.Color = Tones.Ground;
        plot.Axes.Title.IsVisible = false;
        plot.Axes.Right.IsVisible = false;
        plot.Axes.Top.IsVisible = false;
        plot.Axes.AddPanel(new HeadingPanel(title, subtitle, width));
        foreach (IAxis axis in (ReadOnlySpan<IAxis>)[plot.Axes.Left, plot.Axes.Bottom])
        {
            axis.FrameLineStyle.Color = Tones.Soft;
            axis.MajorTickStyle.Length = 0;
            axis.MinorTickStyle.Length = 0;
            axis.TickLabelStyle.FontName = BundledFont.Family;
            axis.TickLabelStyle.FontSize = PictureText.Size;
            axis.TickLabelStyle.ForeColor = Tones.Soft;
        }
        // A tick that nobody sees keeps the numbers below the axis clear of those beside it.
        plot.Axes.Bottom.MajorTickStyle.Length = 6;
        plot.Axes.Bottom.MajorTickStyle.Color = Colors.Transparent;
        plot.Grid.XAxisStyle.IsVisible = false;
        plot.Grid.YAxisStyle.MajorLineStyle.Color = Tones.Grid;
        plot.Grid.YAxisStyle.MajorLineStyle.Width = 1;
        return plot;
    }

    /// <summary>Leaves room at the figure's edges; called when all other panels are there, since the last one stands outermost.</summary>
    public static Plot Close(Plot plot)
    {
        plot.Axes.AddPanel(new EdgePanel(Edge.Right, 1.5f * Margin));
        plot.Axes.AddPanel(new EdgePanel(Edge.Left, Margin));
        plot.Axes.AddPanel(new EdgePanel(Edge.Bottom, Margin / 2));
        return plot;
    }

    /// <summary>Ticks at the given places of the lower axis.</summary>
    public static void TicksBelow(Plot plot, IReadOnlyList<(double Place, string Label)> ticks) =>
        plot.Axes.Bottom.TickGenerator = new NumericManual([.. ticks.Select(tick => tick.Place)], [.. ticks.Select(tick => tick.Label)]);

    /// <summary>Ticks at the given places of the left axis.</summary>
    public static void TicksLeft(Plot plot, IReadOnlyList<(double Place, string Label)> ticks) =>
        plot.Axes.Left.TickGenerator = new NumericManual([.. ticks.Select(tick => tick.Place)], [.. ticks.Select(tick => tick.Label)]);

    /// <summary>Round ticks from 0 to <paramref name="highest"/>: steps of 1, 2 or 5 times a power of ten, at most <paramref name="most"/> of them.</summary>
    public static IReadOnlyList<(double Place, string Label)> FromZero(double highest, int most)
    {
        if (!(highest > 0)) return [(0, "0")];
        double step = Math.Pow(10, Math.Floor(Math.Log10(highest / most)));
        foreach (int factor in (ReadOnlySpan<int>)[1, 2, 5, 10])
        {
            if (highest / (step * factor) > most) continue;
            step *= factor;
            break;
        }
        int decimals = (int)Math.Max(0, -Math.Floor(Math.Log10(step) + 1e-9));
        var ticks = new List<(double, string)>();
        for (int i = 0; i * step <= highest * (1 + 1e-9); i++) ticks.Add((i * step, (i * step).ToString((step >= 1000 ? "N" : "F") + decimals.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture)));
        return ticks;
    }

    /// <summary>Room at an edge that nothing is drawn in.</summary>
    private sealed class EdgePanel(Edge edge, float room) : IPanel
    {
        public bool IsVisible { get; set; } = true;
        public float MinimumSize { get; set; }
        public float MaximumSize { get; set; } = float.MaxValue;
        public Edge Edge => edge;
        public bool ShowDebugInformation { get; set; }
        public float Measure(Paint paint) => room;
        public PixelRect GetPanelRect(PixelRect dataRect, float size, float offset, Paint paint) => dataRect;
        public void Render(RenderPack rp, float size, float offset)
        {
        }
    }
}
