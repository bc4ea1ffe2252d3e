using ScottPlot;
using ScottPlot.Plottables;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>What a curve's figures are, which decides how it is drawn.</summary>
internal enum CurveKind
{
    /// <summary>Thin dark line; where counts are thin broken, with hollow points.</summary>
    Bound,

    /// <summary>Solid line in the family's full tone with filled points.</summary>
    CodedSize,

    /// <summary>The second coded size of a family: dotted line in the same hue.</summary>
    OtherCodedSize,

    /// <summary>Points without a line, an interval as a whisker.</summary>
    Estimate,
}

/// <summary>One point of a curve.</summary>
/// <param name="X">Place on the horizontal axis.</param>
/// <param name="Y">Figure.</param>
/// <param name="Thin">Whether the figure rests on thin counts.</param>
/// <param name="Low">Lower end of its interval.</param>
/// <param name="High">Upper end of its interval.</param>
internal readonly record struct CurvePoint(double X, double Y, bool Thin = false, double? Low = null, double? High = null);

/// <summary>One curve, named at its right end.</summary>
/// <param name="Label">Its name.</param>
/// <param name="Kind">What its figures are.</param>
/// <param name="Family">Family of code; of no weight for bounds.</param>
/// <param name="Points">Its points, from the left.</param>
/// <param name="Shape">Shape of its points.</param>
/// <param name="Marked">Whether its points are marked.</param>
internal sealed record Curve(string Label, CurveKind Kind, CodeFamily Family, IReadOnlyList<CurvePoint> Points, MarkerShape Shape = MarkerShape.FilledCircle, bool Marked = true);

/// <summary>Curves over a horizontal axis, the vertical one from zero, each named at its right end.</summary>
internal static class Curves
{
    /// <summary>Height of the data in pixels at 1×.</summary>
    private const int DataHeight = 270;

    /// <summary>Above this many points a curve carries no markers.</summary>
    private const int MostMarked = 40;

    private const double Headroom = 1.04;
    private const float MarkerSize = 9;
    private const float WhiskerCap = 5;
    private const int MostTicks = 6;

    /// <summary>Makes the picture.</summary>
    /// <param name="slug">Name of the chart.</param>
    /// <param name="title">Its message.</param>
    /// <param name="subtitle">What is drawn, with the unit of each axis.</param>
    /// <param name="alternative">The same in words.</param>
    /// <param name="curves">The curves, at most seven.</param>
    /// <param name="ticksBelow">Ticks of the horizontal axis.</param>
    /// <param name="changes">Places at which something changes, drawn as dotted rules.</param>
    public static Picture Draw(string slug, string title, string subtitle, string alternative, IReadOnlyList<Curve> curves, IReadOnlyList<(double Place, string Label)> ticksBelow, IReadOnlyList<double>? changes = null)
    {
        Plot plot = PictureFrame.Create(title, subtitle, Picture.UsualWidth);
        double highest = curves.SelectMany(curve => curve.Points).Max(point => Math.Max(point.Y, point.High ?? point.Y)) * Headroom;
        if (!(highest > 0)) highest = 1;
        double left = curves.SelectMany(curve => curve.Points).Min(point => point.X), right = curves.SelectMany(curve => curve.Points).Max(point => point.X);
        double side = right > left ? (right - left) * 0.025 : 0.5;
        foreach (double change in changes ?? [])
        {
            VerticalLine rule = plot.Add.VerticalLine(change);
            rule.LineColor = Tones.Faint;
            rule.LineWidth = 1;
        }
        foreach (Curve curve in curves) Add(plot, curve);
        plot.Axes.AddPanel(new SidePanel(Edge.Right, [.. curves.Where(curve => curve.Points.Count > 0).Select(curve => new SideLabel(curve.Points[^1].Y, curve.Label, ColorOf(curve)))], leaders: true));
        PictureFrame.TicksBelow(plot, ticksBelow);
        PictureFrame.TicksLeft(plot, PictureFrame.FromZero(highest, MostTicks));
        plot.Axes.SetLimits(left - side, right + side, 0, highest);
        float heading = new HeadingPanel(title, subtitle, Picture.UsualWidth).Height;
        return new Picture
        {
            Slug = slug, Title = title, Subtitle = subtitle, Alternative = alternative, Plot = PictureFrame.Close(plot),
            Height = (int)Math.Ceiling(heading + DataHeight + PictureFrame.TickLine + PictureFrame.Margin),
        };
    }

    private static Color ColorOf(Curve curve) => curve.Kind is CurveKind.Bound ? Tones.Dark : curve.Family == CodeFamily.Raw ? Tones.Soft : Tones.Full(curve.Family);

    private static void Add(Plot plot, Curve curve)
    {
        Color color = ColorOf(curve);
        if (curve.Kind != CurveKind.Estimate) AddLines(plot, curve, color);
        if (!curve.Marked || curve.Points.Count > MostMarked) return;
        foreach (CurvePoint point in curve.Points)
        {
            if (point is { Low: { } low, High: { } high }) AddWhisker(plot, point.X, low, high, color);
            if (curve.Kind == CurveKind.Bound && !point.Thin) continue;
            bool hollow = point.Thin || curve.Kind == CurveKind.OtherCodedSize;
            Marker marker = plot.Add.Marker(point.X, point.Y, hollow ? Hollow(curve.Shape) : curve.Shape, MarkerSize, color);
            marker.MarkerLineColor = color;
            marker.MarkerLineWidth = 1.6f;
        }
    }

    private static MarkerShape Hollow(MarkerShape shape) => shape switch
    {
        MarkerShape.FilledSquare => MarkerShape.OpenSquare,
        MarkerShape.FilledDiamond => MarkerShape.OpenDiamond,
        _ => shape == MarkerShape.FilledCircle ? MarkerShape.OpenCircle : shape,
    };

    private static void AddLines(Plot plot, Curve curve, Color color)
    {
        float width = curve.Kind == CurveKind.Bound ? 1.4f : 2.2f;
        int from = 0;
        while (from < curve.Points.Count - 1)
        {
            bool broken = curve.Points[from].Thin || curve.Points[from + 1].Thin;
            int to = from + 1;
            while (to < curve.Points.Count - 1 && (curve.Points[to].Thin || curve.Points[to + 1].Thin) == broken) to++;
            Coordinates[] points = [.. curve.Points.Skip(from).Take(to - from + 1).Select(point => new Coordinates(point.X, point.Y))];
            if (broken) plot.Add.Plottable(new BrokenLine(points, color, width, dash: 9, gap: 7));
            else if (curve.Kind == CurveKind.OtherCodedSize) plot.Add.Plottable(new BrokenLine(points, color, width, dash: 2.5f, gap: 3.5f));
            else plot.Add.ScatterLine(points, color).LineWidth = width;
            from = to;
        }
    }

    private static void AddWhisker(Plot plot, double x, double low, double high, Color color)
    {
        double half = (high - low) / 2;
        var bar = new ErrorBar([x], [low + half], null, null, [half], [half]);
        plot.Add.Plottable(bar);
        bar.Color = color;
        bar.LineWidth = 1.5f;
        bar.CapSize = WhiskerCap;
    }
}
