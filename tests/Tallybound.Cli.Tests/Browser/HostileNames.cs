using System.Globalization;
using System.Text;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Names of sources that a careless page would run, reorder, break or stretch.</summary>
internal static class HostileNames
{
    /// <summary>Names in UTF-8. Those with markup carry elements and attributes that no page of ours has, to be looked for.</summary>
    public static IReadOnlyList<string> Utf8 { get; } =
    [
        "<script>alert(1)<_script>",
        "<x-injected onclick=alert(2)>",
        "<img src=x onerror=alert(3)>",
        "\"><x-injected autofocus onfocus=\"alert(4)",
        "'><x-injected>",
        "--><x-injected>]]><!--",
        "&lt;b&gt;&amp;&#60;&copy",
        "quote\"quote'quote`quote",
        "javascript:alert(5)",
        "{{7*7}}${7*7}@(7*7)",
        "right\u202eleft.log",
        "\u2066isolate\u2069",
        "zero\u200bwidth\u00adhyphen\ufeff",
        new string('w', 200),
        string.Concat(Enumerable.Repeat("سجل", 33)),
        "سجل الأبواب.log",
        "冷藏集装箱门日志.log",
        string.Concat(Enumerable.Repeat("箱", 80)),
        "प्रशीतित कंटेनर लॉग.log",
        "🚢🧊❄️👩‍🔧.log",
        "e\u0301\u0323\u0327 combined.log",
        "two\nlines.log",
        "tab\tand\u001b[31mescape\u0007bell",
        " space at both ends ",
        "=1+1",
        "@SUM(A1)",
        "per%cent %41",
        ".hidden",
        "#fragment?query=1&b",
        "back\\slash",
        "nul",
    ];

    /// <summary>Names that are not UTF-8, as words of the shell.</summary>
    public const string ShellBytes = "$'caf\\xe9.log' $'\\xff\\xfe.bin' $'half\\xf0\\x9f.bin'";

    /// <summary>A name of the record as a page must show it: characters that would not show, or would move their neighbours, as <c>\u{…}</c>.</summary>
    public static string Shown(string name)
    {
        var text = new StringBuilder();
        foreach (Rune rune in name.EnumerateRunes())
        {
            bool hidden = Rune.GetUnicodeCategory(rune) is UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator;
            text.Append(hidden ? $"\\u{{{rune.Value:x}}}" : rune.ToString());
        }
        return text.ToString();
    }
}
