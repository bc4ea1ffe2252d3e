using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>A label at a height of the vertical axis, beside the data.</summary>
/// <param name="Y">Where, in the axis's unit.</param>
/// <param name="Text">What it says.</param>
/// <param name="Color">Its colour.</param>
/// <param name="Bold">Whether it is bold.</param>
internal readonly record struct SideLabel(double Y, string Text, Color Color, bool Bold = false);

/// <summary>Labels left or right of the data, each as near as it can stand to its own height without touching its neighbours.</summary>
internal sealed class SidePanel : IPanel
{
    private const float Gap = 8;
    private const float LineHeight = 18;

    private readonly IReadOnlyList<SideLabel> labels;
    private readonly bool leaders;
    private readonly float widest;

    /// <summary>Lays labels along one edge.</summary>
    /// <param name="edge">Left (text ends at the data) or right (text begins there).</param>
    /// <param name="labels">The labels.</param>
    /// <param name="leaders">Whether a thin line ties a label that had to move to its height.</param>
    /// <param name="least">Least width in pixels.</param>
    public SidePanel(Edge edge, IReadOnlyList<SideLabel> labels, bool leaders, float least = 0)
    {
        Edge = edge;
        this.labels = labels;
        this.leaders = leaders;
        widest = labels.Count == 0 ? least : Math.Max(least, labels.Max(label => PictureText.Width(label.Text, bold: label.Bold)) + Gap * 2 + (leaders ? Gap : 0));
    }

    /// <inheritdoc/>
    public bool IsVisible { get; set; } = true;

    /// <inheritdoc/>
    public float MinimumSize { get; set; }

    /// <inheritdoc/>
    public float MaximumSize { get; set; } = float.MaxValue;

    /// <inheritdoc/>
    public Edge Edge { get; }

    /// <inheritdoc/>
    public bool ShowDebugInformation { get; set; }

    /// <inheritdoc/>
    public float Measure(Paint paint) => widest;

    /// <inheritdoc/>
    public PixelRect GetPanelRect(PixelRect dataRect, float size, float offset, Paint paint) => Edge == Edge.Left
        ? new PixelRect(dataRect.Left - offset - size, dataRect.Left - offset, dataRect.Bottom, dataRect.Top)
        : new PixelRect(dataRect.Right + offset, dataRect.Right + offset + size, dataRect.Bottom, dataRect.Top);

    /// <inheritdoc/>
    public void Render(RenderPack rp, float size, float offset)
    {
        float[] wanted = [.. labels.Select(label => rp.Plot.Axes.Left.GetPixel(label.Y, rp.DataRect))];
        float[] placed = Apart(wanted, rp.DataRect.Top - LineHeight / 2, rp.DataRect.Bottom + LineHeight / 2);
        for (int i = 0; i < labels.Count; i++)
        {
            SideLabel label = labels[i];
            if (Edge == Edge.Left)
            {
                PictureText.Draw(rp, label.Text, rp.DataRect.Left - offset - Gap, placed[i], Alignment.MiddleRight, label.Color, bold: label.Bold);
                continue;
            }
            float x = rp.DataRect.Right + offset + Gap;
            if (leaders)
            {
                Drawing.DrawLine(rp.Canvas, rp.Paint, new PixelLine(rp.DataRect.Right + 1, wanted[i], x + Gap / 2, placed[i]), new LineStyle(1, label.Color));
                x += Gap;
            }
            PictureText.Draw(rp, label.Text, x, placed[i], Alignment.MiddleLeft, label.Color, bold: label.Bold);
        }
    }

    /// <summary>Heights at least a line apart, in the wanted order, each moved as little as a sweep up and a sweep down can.</summary>
    internal static float[] Apart(float[] wanted, float top, float bottom)
    {
        int[] order = [.. Enumerable.Range(0, wanted.Length).OrderBy(index => wanted[index]).ThenBy(index => index)];
        float[] placed = [.. wanted];
        float least = top;
        foreach (int index in order)
        {
            placed[index] = Math.Max(placed[index], least);
            least = placed[index] + LineHeight;
        }
        float most = bottom;
        foreach (int index in order.Reverse())
        {
            placed[index] = Math.Min(placed[index], most);
            most = placed[index] - LineHeight;
        }
        return placed;
    }
}
