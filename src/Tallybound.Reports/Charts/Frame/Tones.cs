using ScottPlot;

namespace Tallybound.Reports.Charts.Frame;

/// <summary>Families of codes: what a hue tells, and all that a hue tells.</summary>
internal enum CodeFamily
{
    /// <summary>What the bytes spend now.</summary>
    Raw,

    /// <summary>One length for all symbols.</summary>
    Fixed,

    /// <summary>Huffman codes of single symbols, limited or not.</summary>
    Huffman,

    /// <summary>Huffman codes of symbol blocks.</summary>
    Block,

    /// <summary>Codes that look at the symbols before.</summary>
    Context,

    /// <summary>tANS and range coding: no whole number of bits a symbol.</summary>
    Arithmetic,
}

/// <summary>Colours of pictures: hues of the set of Okabe and Ito (Color Universal Design, 2008), darkened where they would be pale on white.</summary>
internal static class Tones
{
    /// <summary>Bounds, and text that matters.</summary>
    public static readonly Color Dark = Color.FromHex("#1c1c1c");

    /// <summary>Labels and axes.</summary>
    public static readonly Color Soft = Color.FromHex("#595959");

    /// <summary>Rules that only guide the eye.</summary>
    public static readonly Color Faint = Color.FromHex("#a9a9a9");

    /// <summary>Grid lines.</summary>
    public static readonly Color Grid = Color.FromHex("#e4e4e4");

    /// <summary>The ground of every picture.</summary>
    public static readonly Color Ground = Color.FromHex("#ffffff");

    /// <summary>The full tone of a family.</summary>
    public static Color Full(CodeFamily family) => family switch
    {
        CodeFamily.Raw => Color.FromHex("#8c8c8c"),
        CodeFamily.Fixed => Color.FromHex("#a86f00"),
        CodeFamily.Huffman => Color.FromHex("#0072b2"),
        CodeFamily.Block => Color.FromHex("#007a59"),
        CodeFamily.Context => Color.FromHex("#c24f00"),
        _ => Color.FromHex("#a8527f"),
    };

    /// <summary>The lighter tone: tables, and the second line of a family.</summary>
    public static Color Light(CodeFamily family) => Mixed(Full(family), 0.75);

    /// <summary>The family of a code by its name in the record, or by its key in totals.</summary>
    public static CodeFamily FamilyOf(string code) =>
        code is "raw" or "stored" ? CodeFamily.Raw
        : code.StartsWith("fixed", StringComparison.Ordinal) ? CodeFamily.Fixed
        : code.StartsWith("block-huffman", StringComparison.Ordinal) ? CodeFamily.Block
        : code.StartsWith("context-huffman", StringComparison.Ordinal) ? CodeFamily.Context
        : code is "tans" or "range" ? CodeFamily.Arithmetic
        : CodeFamily.Huffman;

    private static Color Mixed(Color color, double white) => new(
        (byte)Math.Round(color.R + (255 - color.R) * white), (byte)Math.Round(color.G + (255 - color.G) * white), (byte)Math.Round(color.B + (255 - color.B) * white));
}
