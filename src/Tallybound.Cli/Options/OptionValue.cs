using System.Globalization;
using System.Numerics;

namespace Tallybound.Cli.Options;

/// <summary>Reads the values of options; what is wrong with one is said in a line that names the option, the value and the mend.</summary>
internal static class OptionValue
{
    /// <summary>Units of 1,024, smallest first.</summary>
    private static readonly string[] Units = ["KiB", "MiB", "GiB", "TiB"];

    /// <summary>Endings that some read as 1,000 and some as 1,024, in the order of <see cref="Units"/>.</summary>
    private static readonly string[][] Ambiguous = [["KB", "K"], ["MB", "M"], ["GB", "G"], ["TB", "T"]];

    /// <summary>A whole number in a range.</summary>
    public static long Whole(string option, string text, long least, long greatest, string example)
    {
        if (long.TryParse(text, NumberStyles.AllowLeadingSign, CultureInfo.InvariantCulture, out long value) && value >= least && value <= greatest) return value;
        string range = greatest == long.MaxValue ? $"from {least} up" : $"from {least} to {greatest}";
        throw new UsageException($"{option} {Shown(text)}: takes a whole number {range}; for example {option} {example}");
    }

    /// <summary>Whole numbers between commas, ascending and distinct.</summary>
    public static List<int> Wholes(string option, string text, int least, int greatest, string example)
    {
        var values = new SortedSet<int>();
        foreach (string part in text.Split(','))
        {
            if (!int.TryParse(part, NumberStyles.None, CultureInfo.InvariantCulture, out int value) || value < least || value > greatest)
                throw new UsageException($"{option} {Shown(text)}: takes whole numbers from {least} to {greatest} with commas between; for example {option} {example}");
            values.Add(value);
        }
        return [.. values];
    }

    /// <summary>Names between commas, distinct, in the order typed.</summary>
    /// <param name="option">The option's name.</param>
    /// <param name="text">What was typed.</param>
    /// <param name="thing">What a name stands for, such as "view".</param>
    /// <param name="known">The names there are.</param>
    public static List<string> Names(string option, string text, string thing, IReadOnlyList<string> known)
    {
        var names = new List<string>();
        foreach (string part in text.Split(','))
        {
            if (!known.Contains(part))
                throw new UsageException($"{option} {Shown(text)}: there is no {thing} '{part}'{NearestName.Suggestion(part, known)} (there are {string.Join(", ", known)})");
            if (!names.Contains(part)) names.Add(part);
        }
        return names;
    }

    /// <summary>Bytes, plain or with KiB, MiB, GiB or TiB.</summary>
    /// <param name="option">The option's name.</param>
    /// <param name="text">What was typed.</param>
    /// <param name="least">The least value that is of use.</param>
    /// <param name="example">A value that works.</param>
    public static long Size(string option, string text, long least, string example)
    {
        string number = text;
        int shift = 0;
        for (int unit = 0; unit < Units.Length; unit++)
        {
            if (text.EndsWith(Units[unit], StringComparison.OrdinalIgnoreCase))
            {
                number = text[..^3].TrimEnd(' ');
                shift = 10 * (unit + 1);
                break;
            }
            string? ending = Array.Find(Ambiguous[unit], ending => text.EndsWith(ending, StringComparison.OrdinalIgnoreCase));
            if (ending is null) continue;
            string digits = text[..^ending.Length].TrimEnd(' ');
            string mend = digits.Length > 0 && digits.All(char.IsAsciiDigit) ? digits + Units[unit] : example;
            throw new UsageException($"{option} {Shown(text)}: sizes are told in units of 1,024, KiB, MiB, GiB and TiB, or in plain bytes; write {option} {mend}");
        }
        if (!long.TryParse(number, NumberStyles.None, CultureInfo.InvariantCulture, out long value) || value > long.MaxValue >> shift)
            throw new UsageException($"{option} {Shown(text)}: takes a size in bytes, KiB, MiB, GiB or TiB; for example {option} {example}");
        value <<= shift;
        if (value < least) throw new UsageException($"{option} {Shown(text)}: takes at least {Typed(least)}; for example {option} {example}");
        return value;
    }

    /// <summary>A size that is a power of two.</summary>
    public static long PowerOfTwoSize(string option, string text, long least, string example)
    {
        long value = Size(option, text, least, example);
        if (BitOperations.IsPow2(value)) return value;
        long below = 1L << BitOperations.Log2((ulong)value);
        throw new UsageException($"{option} {Shown(text)}: takes a power of two; the nearest ones are {Typed(below)} and {Typed(below << 1)}");
    }

    /// <summary>Bytes as one would type them: <c>4KiB</c>, or a plain number where no unit divides it.</summary>
    private static string Typed(long bytes)
    {
        for (int unit = Units.Length - 1; unit >= 0; unit--)
        {
            long size = 1L << (10 * (unit + 1));
            if (bytes >= size && bytes % size == 0) return string.Create(CultureInfo.InvariantCulture, $"{bytes / size}{Units[unit]}");
        }
        return bytes.ToString(CultureInfo.InvariantCulture);
    }

    private static string Shown(string text) => text.Length == 0 ? "''" : text;
}
