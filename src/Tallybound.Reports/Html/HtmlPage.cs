using System.Text;
using System.Text.Encodings.Web;
using System.Text.Unicode;

namespace Tallybound.Reports.Html;

/// <summary>A page under construction: markup goes in raw, everything that came from outside goes in as text.</summary>
internal sealed class HtmlPage
{
    private static readonly HtmlEncoder Encoder = HtmlEncoder.Create(new TextEncoderSettings(UnicodeRanges.All));
    private readonly StringBuilder builder = new();

    /// <summary>Adds markup of this program.</summary>
    public HtmlPage Raw(string markup)
    {
        builder.Append(markup);
        return this;
    }

    /// <summary>Adds text, escaped; control characters and direction overrides become visible.</summary>
    public HtmlPage Text(string text)
    {
        builder.Append(Encoder.Encode(VisibleText.Of(text)));
        return this;
    }

    /// <inheritdoc/>
    public override string ToString() => builder.ToString();
}
