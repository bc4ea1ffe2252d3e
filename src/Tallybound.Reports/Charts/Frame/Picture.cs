using ScottPlot;
using SkiaSharp;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>One chart, ready to be drawn: its message, what it shows, and the plot.</summary>
public sealed class Picture : IDisposable
{
    /// <summary>Width of a picture in pixels at 1×.</summary>
    public const int UsualWidth = 760;

    private const int PngScale = 2;
    private const int PngLevel = 4;

    private byte[]? png;

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

    /// <summary>PNG of twice the size in pixels. The same bytes on every run; drawn once.</summary>
    public byte[] ToPng()
    {
        if (png is not null) return png;
        Plot.ScaleFactor = PngScale;
        using SKSurface surface = SKSurface.Create(new SKImageInfo(Width * PngScale, Height * PngScale, SKColorType.Rgba8888, SKAlphaType.Opaque));
        Plot.Render(surface.Canvas, new PixelRect(0, Width * PngScale, Height * PngScale, 0));
        using SKPixmap pixels = surface.PeekPixels() ?? throw new InvalidOperationException("The picture could not be drawn.");
        // One filter and a low level: a third of the time of the encoder's own choice, files a tenth larger.
        using SKData data = pixels.Encode(new SKPngEncoderOptions(SKPngEncoderFilterFlags.Sub, PngLevel)) ?? throw new InvalidOperationException("The picture could not be encoded.");
        return png = data.ToArray();
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
