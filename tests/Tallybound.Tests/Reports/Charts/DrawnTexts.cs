using System.Globalization;
using System.Text.RegularExpressions;
using System.Xml.Linq;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Tests.Reports.Charts;

/// <summary>A text of a picture with the box it takes, in pixels at 1×.</summary>
internal readonly record struct DrawnText(string Text, double Left, double Right, double Top, double Bottom)
{
    /// <summary>Whether two texts share more than a hair.</summary>
    public bool Touches(DrawnText other) => Left < other.Right - Hair && other.Left < Right - Hair && Top < other.Bottom - Hair && other.Top < Bottom - Hair;

    private const double Hair = 1;
}

/// <summary>The texts of a picture, measured in its vector form.</summary>
internal static partial class DrawnTexts
{
    // Share of the font's size that letters reach above and below the line they stand on.
    private const double Ascent = 0.74;
    private const double Descent = 0.22;

    /// <summary>All texts that are not empty.</summary>
    public static List<DrawnText> Of(string svg)
    {
        var texts = new List<DrawnText>();
        foreach (XElement text in XElement.Parse(svg).Descendants("text"))
        {
            if (text.Value.Length == 0) continue;
            Match shift = Translate().Match(text.Attribute("transform")?.Value ?? "translate(0 0)");
            double size = Number(text, "font-size"), x = double.Parse(shift.Groups["x"].Value, CultureInfo.InvariantCulture) + Number(text, "x"), y = double.Parse(shift.Groups["y"].Value, CultureInfo.InvariantCulture) + Number(text, "y");
            bool bold = text.Attribute("font-weight") is { } weight && weight.Value is "bold" or "600" or "700";
            texts.Add(new DrawnText(text.Value, x, x + PictureText.Width(text.Value, (float)size, bold), y - Ascent * size, y + Descent * size));
        }
        return texts;
    }

    private static double Number(XElement element, string name) => double.Parse(element.Attribute(name)?.Value ?? "0", CultureInfo.InvariantCulture);

    [GeneratedRegex(@"translate\((?<x>-?[\d.]+)[ ,](?<y>-?[\d.]+)\)", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 1000)]
    private static partial Regex Translate();
}
