namespace Tallybound.Reports.Html;

/// <summary>As what a picture stands in a page.</summary>
public enum PictureForm
{
    /// <summary>SVG among the page's elements.</summary>
    Inline,

    /// <summary>PNG at twice its size, embedded.</summary>
    Embedded,
}
