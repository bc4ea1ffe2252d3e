using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>One chart, ready to be drawn: its message, what it shows, and the plot.</summary>
public sealed class Picture : IDisposable
{
    /// <summary>Width of a picture in pixels at 1×.</summary>
    public const int UsualWidth = 760;

    private const int PngScale = 2;

    /// <summary>Name of the chart, as files carry it, such as <c>order-curve</c>.</summary>
    public required string Slug { get; init; }

    /// <summary>The message in words, computed from the figures.</summary>
    public required string Title { get; init; }

    /// <summary>What is drawn, and its unit.</summary>
    public required string Subtitle { get; init; }

    /// <summary>In numbers what the picture shows, for whoever does not see it.</summary>
    public required string Alternative { get; init; }

    /// <summary>Width in pixels at 1×.</summary>
    public int Width { get; init; } = UsualWidth;

    /// <summary>Height in pixels at 1×.</summary>
    public required int Height { get; init; }

    /// <summary>The plot behind it; tests look at what it draws.</summary>
    public required Plot Plot { get; init; }

    /// <summary>PNG of twice the size in pixels. The same bytes on every run.</summary>
    public byte[] ToPng()
    {
        Plot.ScaleFactor = PngScale;
        return Plot.GetImageBytes(Width * PngScale, Height * PngScale, ImageFormat.Png);
    }

    /// <summary>SVG markup to stand inside a page.</summary>
    /// <param name="idPrefix">Begins every id in it, so that several pictures share a page.</param>
    public string ToSvg(string idPrefix)
    {
        Plot.ScaleFactor = 1;
        return SvgMarkup.ForPage(Plot.GetSvgXml(Width, Height), idPrefix, Alternative, Width, Height);
    }

    /// <inheritdoc/>
    public void Dispose() => Plot.Dispose();
}
