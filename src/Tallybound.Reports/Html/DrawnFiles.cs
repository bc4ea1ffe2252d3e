using System.Text.RegularExpressions;

namespace Tallybound.Reports.Html;

/// <summary>Clears away what an earlier drawing of a run left and this one does not draw.</summary>
internal static partial class DrawnFiles
{
    /// <summary>Removes files of a folder that are named as drawings name them and were not drawn now; others are left alone.</summary>
    /// <param name="folder">The folder.</param>
    /// <param name="drawn">Names of the files drawn now.</param>
    /// <exception cref="IOException">A file cannot be removed.</exception>
    public static void RemoveOthers(string folder, IEnumerable<string> drawn)
    {
        var kept = drawn.ToHashSet(StringComparer.Ordinal);
        foreach (string path in Directory.GetFiles(folder))
        {
            string name = Path.GetFileName(path);
            if (!kept.Contains(name) && Ours().IsMatch(name)) File.Delete(path);
        }
    }

    [GeneratedRegex(@"^(\d{4}|corpus)-[a-z0-9-]+\.(html|png)$", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 1000)]
    private static partial Regex Ours();
}
