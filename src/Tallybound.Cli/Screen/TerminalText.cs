using System.Globalization;
using System.Text;

namespace Tallybound.Cli.Screen;

/// <summary>Makes visible what a terminal would obey instead of show, or what would reorder its neighbours.</summary>
internal static class TerminalText
{
    /// <summary>The text on one line, with control, format, separator and unpaired surrogate characters as <c>\u{…}</c>.</summary>
    public static string Escape(string text)
    {
        StringBuilder? changed = null;
        int index = 0;
        while (index < text.Length)
        {
            bool whole = Rune.TryGetRuneAt(text, index, out Rune rune);
            int length = whole ? rune.Utf16SequenceLength : 1;
            bool hidden = !whole || Rune.GetUnicodeCategory(rune) is UnicodeCategory.Control or UnicodeCategory.Format or UnicodeCategory.LineSeparator or UnicodeCategory.ParagraphSeparator;
            if (hidden) changed ??= new StringBuilder().Append(text, 0, index);
            if (hidden) changed!.Append(CultureInfo.InvariantCulture, $"\\u{{{(whole ? rune.Value : text[index]):x}}}");
            else changed?.Append(text, index, length);
            index += length;
        }
        return changed?.ToString() ?? text;
    }
}
