using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>Draws bounds as rules across their rows, and below the axis a line for each that names it.</summary>
internal sealed class BoundStrip : IPanel, IPlottable
{
    private const float Line = 19;
    private const float Above = 2;

    private readonly IReadOnlyList<BoundRule> bounds;
    private readonly int rows;

    /// <summary>Bounds over a picture of so many rows.</summary>
    public BoundStrip(IReadOnlyList<BoundRule> bounds, int rows) => (this.bounds, this.rows) = (bounds, rows);

    /// <summary>Height of the lines that name the bounds.</summary>
    public float Height => bounds.Count == 0 ? 0 : Above + bounds.Count * Line;

    /// <inheritdoc cref="IPanel.IsVisible"/>
    public bool IsVisible { get; set; } = true;

    /// <inheritdoc/>
    public float MinimumSize { get; set; }

    /// <inheritdoc/>
    public float MaximumSize { get; set; } = float.MaxValue;

    /// <inheritdoc/>
    public Edge Edge => Edge.Bottom;

    /// <inheritdoc/>
    public bool ShowDebugInformation { get; set; }

    /// <inheritdoc/>
    public IAxes Axes { get; set; } = new Axes();

    /// <inheritdoc/>
    public IEnumerable<LegendItem> LegendItems => [];

    /// <inheritdoc/>
    public AxisLimits GetAxisLimits() => AxisLimits.NoLimits;

    /// <inheritdoc/>
    public float Measure(Paint paint) => Height;

    /// <inheritdoc/>
    public PixelRect GetPanelRect(PixelRect dataRect, float size, float offset, Paint paint) =>
        new(dataRect.Left, dataRect.Right, dataRect.Bottom + offset + size, dataRect.Bottom + offset);

    /// <summary>The rules, inside the data.</summary>
    public void Render(RenderPack rp)
    {
        foreach (BoundRule bound in bounds)
        {
            float x = PlaceOf(rp, bound), top = HeightOf(rp, bound.FirstRow, 0.5), bottom = HeightOf(rp, bound.LastRow, -0.5);
            Drawing.DrawLine(rp.Canvas, rp.Paint, new PixelLine(x, top, x, bottom), new LineStyle(2.2f, Tones.Dark));
            if (bound.LastRow < rows - 1) Drawing.DrawLine(rp.Canvas, rp.Paint, new PixelLine(x, bottom, x, rp.DataRect.Bottom), new LineStyle(1, Tones.Faint));
        }
    }

    /// <summary>The names, below the axis's numbers; each line ends or begins at its rule.</summary>
    public void Render(RenderPack rp, float size, float offset)
    {
        // The leftmost rule is named first: the ties of the others then pass to the right of its name.
        BoundRule[] ordered = [.. bounds.OrderBy(bound => bound.At)];
        float axisRoom = rp.DataRect.Bottom + offset;
        for (int i = 0; i < ordered.Length; i++)
        {
            float x = PlaceOf(rp, ordered[i]);
            Drawing.DrawLine(rp.Canvas, rp.Paint, new PixelLine(x, rp.DataRect.Bottom, x, axisRoom + Above + i * Line + Line / 2), new LineStyle(1, Tones.Faint));
        }
        for (int i = 0; i < ordered.Length; i++)
        {
            float x = PlaceOf(rp, ordered[i]), y = axisRoom + Above + i * Line + Line / 2;
            float width = PictureText.Width(ordered[i].Label) + 12;
            bool left = x - width > rp.FigureRect.Left + PictureFrame.Margin;
            bool right = x + width < rp.FigureRect.Right - PictureFrame.Margin;
            float from = left || !right ? Math.Max(rp.FigureRect.Left + PictureFrame.Margin, x - width) : x + 6;
            Drawing.FillRectangle(rp.Canvas, new PixelRect(from - 2, from + width - 10, y + Line / 2 - 2, y - Line / 2 + 2), rp.Paint, new FillStyle { Color = Tones.Ground });
            PictureText.Draw(rp, ordered[i].Label, from, y, Alignment.MiddleLeft, Tones.Dark);
        }
    }

    private static float PlaceOf(RenderPack rp, BoundRule bound) => rp.Plot.Axes.Bottom.GetPixel(bound.At, rp.DataRect);

    private float HeightOf(RenderPack rp, int row, double half) => rp.Plot.Axes.Left.GetPixel(SizeBars.PlaceOf(row, rows) + half, rp.DataRect);
}
