using System.Collections.Concurrent;
using System.Globalization;
using System.Text;
using ScottPlot;
using SkiaSharp;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>Text in pictures: what the font lacks is written out, what is too long is cut or wrapped by measured width.</summary>
internal static class PictureText
{
    /// <summary>Size of labels and numbers, in pixels at 1×.</summary>
    public const float Size = 13;

    /// <summary>Size of a picture's title.</summary>
    public const float TitleSize = 17;

    private static readonly ConcurrentDictionary<(float Size, bool Bold), ThreadLocal<SKFont>> Measures = new();

    /// <summary>The text with every character that the font cannot show as <c>\u{…}</c>.</summary>
    public static string Shown(string text)
    {
        var shown = new StringBuilder(text.Length);
        foreach (Rune rune in text.EnumerateRunes())
        {
            bool known = BundledFont.Face(false).GetGlyph(rune.Value) != 0 && Rune.GetUnicodeCategory(rune) is not (UnicodeCategory.Control or UnicodeCategory.Format);
            if (known) shown.Append(rune.ToString());
            else shown.Append(CultureInfo.InvariantCulture, $"\\u{{{rune.Value:x}}}");
        }
        return shown.ToString();
    }

    /// <summary>Width in pixels at 1×.</summary>
    public static float Width(string text, float size = Size, bool bold = false) =>
        Measures.GetOrAdd((size, bold), static key => new ThreadLocal<SKFont>(() => new SKFont(BundledFont.Face(key.Bold), key.Size) { Subpixel = true, LinearMetrics = true, Hinting = SKFontHinting.None })).Value!.MeasureText(text);

    /// <summary>The text, its beginning cut where it is wider than <paramref name="width"/>: the end of a path tells more.</summary>
    public static string Fit(string text, float width, float size = Size)
    {
        if (Width(text, size) <= width) return text;
        int from = 1;
        while (from < text.Length && Width("…" + text[from..], size) > width) from++;
        if (from < text.Length && char.IsLowSurrogate(text[from])) from++;
        return "…" + text[from..];
    }

    /// <summary>The text broken at spaces into lines of at most <paramref name="width"/> pixels.</summary>
    public static IReadOnlyList<string> Wrap(string text, float width, float size, bool bold)
    {
        var lines = new List<string>();
        string line = "";
        foreach (string word in text.Split(' '))
        {
            string longer = line.Length == 0 ? word : $"{line} {word}";
            if (line.Length > 0 && Width(longer, size, bold) > width)
            {
                lines.Add(line);
                longer = word;
            }
            line = longer;
        }
        lines.Add(line);
        return lines;
    }

    /// <summary>Draws one line.</summary>
    /// <param name="rp">Where to.</param>
    /// <param name="text">What; characters that the font lacks are written out already.</param>
    /// <param name="x">Horizontal place of the anchor.</param>
    /// <param name="y">Vertical place of the anchor.</param>
    /// <param name="anchor">Which point of the text stands there.</param>
    /// <param name="color">Its colour.</param>
    /// <param name="size">Its size.</param>
    /// <param name="bold">Whether it is bold.</param>
    public static void Draw(RenderPack rp, string text, float x, float y, Alignment anchor, Color color, float size = Size, bool bold = false)
    {
        var style = new LabelStyle { Text = text, FontName = BundledFont.Family, FontSize = size, Bold = bold, ForeColor = color, Alignment = anchor };
        style.Render(rp.Canvas, new Pixel(x, y), rp.Paint);
    }
}
