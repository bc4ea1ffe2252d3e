using ScottPlot;
using SkiaSharp;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>A line of dashes, cut by ourselves: the vector form of pictures knows no dash patterns.</summary>
internal sealed class BrokenLine(IReadOnlyList<Coordinates> points, Color color, float width, float dash, float gap) : IPlottable
{
    /// <inheritdoc/>
    public bool IsVisible { get; set; } = true;

    /// <inheritdoc/>
    public IAxes Axes { get; set; } = new Axes();

    /// <inheritdoc/>
    public IEnumerable<LegendItem> LegendItems => [];

    /// <summary>Its points.</summary>
    public IReadOnlyList<Coordinates> Points => points;

    /// <summary>Its colour.</summary>
    public Color Color => color;

    /// <summary>Length of a dash in pixels at 1×.</summary>
    public float Dash => dash;

    /// <inheritdoc/>
    public AxisLimits GetAxisLimits() => AxisLimits.NoLimits;

    /// <inheritdoc/>
    public void Render(RenderPack rp)
    {
        using var path = new SKPath();
        float along = 0;
        for (int i = 1; i < points.Count; i++)
        {
            Pixel from = Axes.GetPixel(points[i - 1]), to = Axes.GetPixel(points[i]);
            float length = MathF.Sqrt((to.X - from.X) * (to.X - from.X) + (to.Y - from.Y) * (to.Y - from.Y));
            float done = 0;
            while (done < length)
            {
                float phase = along % (dash + gap);
                float step = Math.Min(length - done, phase < dash ? dash - phase : dash + gap - phase);
                if (phase < dash)
                {
                    path.MoveTo(At(from, to, done / length));
                    path.LineTo(At(from, to, (done + step) / length));
                }
                done += Math.Max(step, 0.01f);
                along += Math.Max(step, 0.01f);
            }
        }
        using var paint = new SKPaint { IsStroke = true, IsAntialias = true, StrokeWidth = width, Color = color.ToSKColor() };
        rp.Canvas.DrawPath(path, paint);
    }

    private static SKPoint At(Pixel from, Pixel to, float share) => new(from.X + (to.X - from.X) * share, from.Y + (to.Y - from.Y) * share);
}
