using System.Globalization;
using System.Text;

namespace Tallybound.Sources;

/// <summary>Makes a name safe to show: nothing in it can move a cursor, hide or reorder its neighbours.</summary>
public static class DisplayText
{
    /// <summary>The text with control, format, separator and unpaired surrogate characters as <c>\u{…}</c>.</summary>
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
