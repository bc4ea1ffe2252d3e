using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>Texts at places of the data, drawn over everything and not cut at the data's edge.</summary>
internal sealed class PanelTexts : IPlottable, IRenderLast
{
    private readonly List<(double X, double Y, string Text, Alignment Anchor, Color Color, float Lift)> texts = [];

    /// <inheritdoc/>
    public bool IsVisible { get; set; } = true;

    /// <inheritdoc/>
    public IAxes Axes { get; set; } = new Axes();

    /// <inheritdoc/>
    public IEnumerable<LegendItem> LegendItems => [];

    /// <summary>Adds a text at a place, moved down by <paramref name="drop"/> pixels.</summary>
    public void Add(double x, double y, string text, Alignment anchor, Color color, float drop) => texts.Add((x, y, text, anchor, color, drop));

    /// <inheritdoc/>
    public AxisLimits GetAxisLimits() => AxisLimits.NoLimits;

    /// <inheritdoc/>
    public void Render(RenderPack rp)
    {
    }

    /// <inheritdoc/>
    public void RenderLast(RenderPack rp)
    {
        foreach ((double x, double y, string text, Alignment anchor, Color color, float drop) in texts)
        {
            PictureText.Draw(rp, text, rp.Plot.Axes.Bottom.GetPixel(x, rp.DataRect), rp.Plot.Axes.Left.GetPixel(y, rp.DataRect) + drop, anchor, color);
        }
    }
}
