using ScottPlot;
using ScottPlot.Plottables;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>One row of a bar picture.</summary>
/// <param name="Label">What the bar is of.</param>
/// <param name="Family">Its family; <see cref="CodeFamily.Raw"/> draws today's size in grey.</param>
/// <param name="Payload">Payload, or the whole where nothing is told apart.</param>
/// <param name="Table">Table.</param>
/// <param name="Framing">Framing.</param>
/// <param name="Value">What stands at the end of the row.</param>
/// <param name="Bold">Whether the row is the one that the title speaks of.</param>
internal readonly record struct BarRow(string Label, CodeFamily Family, double Payload, double Table, double Framing, string Value, bool Bold = false);

/// <summary>A bound drawn as a thin dark rule across the rows it applies to.</summary>
/// <param name="At">Its place on the horizontal axis.</param>
/// <param name="FirstRow">First row that it binds.</param>
/// <param name="LastRow">Last row that it binds.</param>
/// <param name="Label">Its name and its class of coder, written at its end.</param>
internal readonly record struct BoundRule(double At, int FirstRow, int LastRow, string Label);

/// <summary>Horizontal bars from zero, payload then table then framing, with bounds as rules across them.</summary>
internal static class SizeBars
{
    private const float RowHeight = 27;
    private const double BarSize = 0.66;
    private const double Headroom = 1.02;
    private const float WidestLabel = 250;
    private const int MostTicks = 8;

    /// <summary>Makes the picture.</summary>
    /// <param name="slug">Name of the chart.</param>
    /// <param name="title">Its message.</param>
    /// <param name="subtitle">What is drawn, with the unit of the axis.</param>
    /// <param name="alternative">The same in words.</param>
    /// <param name="rows">Rows from the top.</param>
    /// <param name="bounds">Bounds.</param>
    public static Picture Draw(string slug, string title, string subtitle, string alternative, IReadOnlyList<BarRow> rows, IReadOnlyList<BoundRule> bounds)
    {
        Plot plot = PictureFrame.Create(title, subtitle, Picture.UsualWidth);
        double highest = Math.Max(rows.Max(row => row.Payload + row.Table + row.Framing), bounds.Count == 0 ? 0 : bounds.Max(bound => bound.At)) * Headroom;
        if (!(highest > 0)) highest = 1;
        plot.Add.Plottable(new BarPlot(Bars(rows)));
        AddFramingHatch(plot, rows, highest);
        var strip = new BoundStrip(bounds, rows.Count);
        plot.Add.Plottable(strip);
        plot.Axes.AddPanel(strip);
        plot.Axes.AddPanel(new SidePanel(Edge.Left, [.. rows.Select((row, index) => new SideLabel(PlaceOf(index, rows.Count), PictureText.Fit(PictureText.Shown(row.Label), WidestLabel), Tones.Dark, row.Bold))], leaders: false));
        plot.Axes.AddPanel(new SidePanel(Edge.Right, [.. rows.Select((row, index) => new SideLabel(PlaceOf(index, rows.Count), row.Value, Tones.Dark, row.Bold))], leaders: false));
        plot.Axes.Left.TickGenerator = new ScottPlot.TickGenerators.EmptyTickGenerator();
        plot.Axes.Left.FrameLineStyle.Color = Tones.Dark;
        PictureFrame.TicksBelow(plot, PictureFrame.FromZero(highest, MostTicks));
        plot.Grid.YAxisStyle.IsVisible = false;
        plot.Grid.XAxisStyle.IsVisible = true;
        plot.Grid.XAxisStyle.MajorLineStyle.Color = Tones.Grid;
        plot.Axes.SetLimits(0, highest, 0.5, rows.Count + 0.5);
        float heading = new HeadingPanel(title, subtitle, Picture.UsualWidth).Height;
        int height = (int)Math.Ceiling(heading + rows.Count * RowHeight + PictureFrame.TickLine + strip.Height + PictureFrame.Margin);
        return new Picture { Slug = slug, Title = title, Subtitle = subtitle, Alternative = alternative, Plot = PictureFrame.Close(plot), Height = height };
    }

    /// <summary>Height of a row on the vertical axis, the first one on top.</summary>
    internal static double PlaceOf(int row, int rows) => rows - row;

    private static List<Bar> Bars(IReadOnlyList<BarRow> rows)
    {
        var bars = new List<Bar>();
        for (int i = 0; i < rows.Count; i++)
        {
            BarRow row = rows[i];
            double place = PlaceOf(i, rows.Count), at = 0;
            Add(row.Payload, Tones.Full(row.Family), place, ref at, Tones.Full(row.Family));
            Add(row.Table, Tones.Light(row.Family), place, ref at, Tones.Full(row.Family));
            Add(row.Framing, Tones.Ground, place, ref at, Tones.Full(row.Family));
        }
        return bars;

        void Add(double value, Color fill, double place, ref double at, Color line)
        {
            if (!(value > 0)) return;
            bars.Add(new Bar { Position = place, ValueBase = at, Value = at + value, Size = BarSize, FillColor = fill, LineColor = line, LineWidth = 1, Orientation = Orientation.Horizontal });
            at += value;
        }
    }

    /// <summary>Framing carries slanting strokes, so that its piece of a bar is told from a table without colour.</summary>
    private static void AddFramingHatch(Plot plot, IReadOnlyList<BarRow> rows, double highest)
    {
        double step = highest / 120;
        for (int i = 0; i < rows.Count; i++)
        {
            BarRow row = rows[i];
            double from = row.Payload + row.Table, to = from + row.Framing;
            double low = PlaceOf(i, rows.Count) - BarSize / 2, high = low + BarSize;
            for (double x = from + step; x < to; x += step)
            {
                LinePlot stroke = plot.Add.Line(Math.Max(from, x - step), low, x, high);
                stroke.LineColor = Tones.Full(row.Family);
                stroke.LineWidth = 1;
            }
        }
    }
}
