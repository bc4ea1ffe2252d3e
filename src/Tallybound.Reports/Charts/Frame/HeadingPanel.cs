using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>The message and, below it, what is drawn in which unit; at the left edge of the figure, wrapped to its width.</summary>
internal sealed class HeadingPanel : IPanel
{
    private const float Margin = 14;
    private const float TitleLine = 23;
    private const float SubtitleLine = 18;
    private const float Below = 10;

    private readonly IReadOnlyList<string> title;
    private readonly IReadOnlyList<string> subtitle;

    /// <summary>Wraps the heading of a picture <paramref name="width"/> pixels wide.</summary>
    public HeadingPanel(string title, string subtitle, int width)
    {
        this.title = PictureText.Wrap(title, width - 2 * Margin, PictureText.TitleSize, bold: true);
        this.subtitle = PictureText.Wrap(subtitle, width - 2 * Margin, PictureText.Size, bold: false);
    }

    /// <summary>Height in pixels at 1×.</summary>
    public float Height => Margin + title.Count * TitleLine + subtitle.Count * SubtitleLine + Below;

    /// <inheritdoc/>
    public bool IsVisible { get; set; } = true;

    /// <inheritdoc/>
    public float MinimumSize { get; set; }

    /// <inheritdoc/>
    public float MaximumSize { get; set; } = float.MaxValue;

    /// <inheritdoc/>
    public Edge Edge => Edge.Top;

    /// <inheritdoc/>
    public bool ShowDebugInformation { get; set; }

    /// <inheritdoc/>
    public float Measure(Paint paint) => Height;

    /// <inheritdoc/>
    public PixelRect GetPanelRect(PixelRect dataRect, float size, float offset, Paint paint) =>
        new(dataRect.Left, dataRect.Right, dataRect.Top - offset, dataRect.Top - offset - size);

    /// <inheritdoc/>
    public void Render(RenderPack rp, float size, float offset)
    {
        float y = rp.FigureRect.Top + Margin;
        foreach (string line in title)
        {
            PictureText.Draw(rp, line, rp.FigureRect.Left + Margin, y, Alignment.UpperLeft, Tones.Dark, PictureText.TitleSize, bold: true);
            y += TitleLine;
        }
        foreach (string line in subtitle)
        {
            PictureText.Draw(rp, line, rp.FigureRect.Left + Margin, y, Alignment.UpperLeft, Tones.Soft);
            y += SubtitleLine;
        }
    }
}
