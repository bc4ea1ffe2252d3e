using System.Globalization;
using System.Text;
using System.Xml.Linq;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>Turns the plotting library's SVG document into markup that can stand in a page beside others.</summary>
/// <remarks>Ids get a prefix, sizes follow the page, coordinates are rounded to hundredths of a pixel. A text keeps only where it
/// begins: the page carries the same font, and its style switches kerning off, so that letters fall where they were measured.</remarks>
internal static class SvgMarkup
{
    private static readonly XNamespace Svg = "http://www.w3.org/2000/svg";
    private static readonly XNamespace Link = "http://www.w3.org/1999/xlink";

    /// <summary>The markup.</summary>
    /// <param name="document">What the library wrote.</param>
    /// <param name="idPrefix">Begins every id.</param>
    /// <param name="label">Says in words what the picture shows.</param>
    /// <param name="width">Width of its coordinates.</param>
    /// <param name="height">Height of its coordinates.</param>
    public static string ForPage(string document, string idPrefix, string label, int width, int height)
    {
        XElement root = XDocument.Parse(document).Root ?? throw new InvalidOperationException("The plotting library wrote no SVG.");
        var page = new XElement("svg",
            new XAttribute("role", "img"), new XAttribute("aria-label", label),
            new XAttribute("viewBox", string.Create(CultureInfo.InvariantCulture, $"0 0 {width} {height}")),
            new XAttribute("width", width), new XAttribute("height", height));
        // The library numbers ids through the whole process; here they count from 0 in each picture, so that its bytes are the same every time.
        var ids = new Dictionary<string, string>(StringComparer.Ordinal);
        foreach (XAttribute id in root.Descendants().Attributes("id")) ids.TryAdd(id.Value, idPrefix + ids.Count.ToString(CultureInfo.InvariantCulture));
        foreach (XElement child in root.Elements()) page.Add(Rewritten(child, ids));
        return page.ToString(SaveOptions.DisableFormatting);
    }

    private static XElement Rewritten(XElement element, Dictionary<string, string> ids)
    {
        var copy = new XElement(element.Name.LocalName);
        foreach (XAttribute attribute in element.Attributes())
        {
            if (attribute.IsNamespaceDeclaration || attribute.Name.LocalName is "font-family" or "stroke-miterlimit") continue;
            string name = attribute.Name.Namespace == Link ? "href" : attribute.Name.LocalName;
            string value = name switch
            {
                "id" => ids[attribute.Value],
                "x" or "y" when element.Name == Svg + "text" => Rounded(First(attribute.Value)),
                "href" => attribute.Value.StartsWith('#') ? "#" + ids[attribute.Value[1..]] : attribute.Value,
                _ when attribute.Value.StartsWith("url(#", StringComparison.Ordinal) => $"url(#{ids[attribute.Value[5..^1]]})",
                "xml:space" => attribute.Value,
                _ => Rounded(attribute.Value),
            };
            copy.SetAttributeValue(name, value);
        }
        if (element.Name == Svg + "text") copy.Value = element.Value.Trim('\n', '\t', '\r', ' ');
        else foreach (XElement child in element.Elements()) copy.Add(Rewritten(child, ids));
        return copy;
    }

    private static string First(string list)
    {
        int comma = list.IndexOf(',', StringComparison.Ordinal);
        return comma < 0 ? list : list[..comma];
    }

    /// <summary>The text with every decimal number in it rounded to two places.</summary>
    private static string Rounded(string text)
    {
        if (!text.Contains('.', StringComparison.Ordinal) || text.StartsWith("data:", StringComparison.Ordinal)) return text;
        var rounded = new StringBuilder(text.Length);
        int at = 0;
        while (at < text.Length)
        {
            int end = at;
            while (end < text.Length && (char.IsAsciiDigit(text[end]) || text[end] == '.')) end++;
            if (end == at) rounded.Append(text[at++]);
            else
            {
                ReadOnlySpan<char> number = text.AsSpan(at, end - at);
                if (number.Contains('.') && double.TryParse(number, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture, out double value)) rounded.Append(value.ToString("0.##", CultureInfo.InvariantCulture));
                else rounded.Append(number);
                at = end;
            }
        }
        return rounded.ToString();
    }
}
