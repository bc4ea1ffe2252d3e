using System.Globalization;
using System.Text;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html;

/// <summary>Names of the files that a source with a page has in the run folder.</summary>
internal static class SourceFile
{
    private const int LongestSlug = 40;

    /// <summary>Path of its page from the run folder: <c>sources/NNNN-slug.html</c>.</summary>
    public static string Of(DrawnSource source) => $"sources/{Stem(source)}.html";

    /// <summary>Rank and slug, which its page and its pictures share. Ranks make stems unique whatever the names are.</summary>
    public static string Stem(DrawnSource source) => $"{source.Number.ToString("0000", CultureInfo.InvariantCulture)}-{Slug(source.Profile.Name)}";

    /// <summary>Lower-case ASCII letters and digits of the end of a name, other characters as one dash.</summary>
    internal static string Slug(string name)
    {
        var slug = new StringBuilder(name.Length);
        foreach (char c in name)
        {
            if (char.IsAsciiLetterOrDigit(c)) slug.Append(char.ToLowerInvariant(c));
            else if (slug.Length > 0 && slug[^1] != '-') slug.Append('-');
        }
        string text = slug.ToString().Trim('-');
        if (text.Length > LongestSlug) text = text[^LongestSlug..].Trim('-');
        return text.Length == 0 ? "source" : text;
    }
}
