using System.Globalization;
using System.Text.RegularExpressions;

namespace Tallybound.Cli.Tests.Browser.Numbers;

/// <summary>A number as a page prints it, with the rounding that its digits admit.</summary>
/// <param name="Value">The number in its unit.</param>
/// <param name="HalfStep">Half of the last printed digit, in its unit: the exact number is at most so far away.</param>
/// <remarks>Printed as <c>["about " | "≈ "] ["−" | "+"] digits [suffix]</c>, thousands parted by a comma, a thin or a narrow space. The suffix may be
/// left out where the column says it. Units: <c>bytes</c> (suffix <c>bytes</c>, <c>B</c>, <c>KiB</c> … <c>EiB</c>), <c>KiB</c> … <c>TiB</c> (of a whole column), <c>bits</c>, <c>bit/symbol</c>,
/// <c>bit/byte</c>, <c>count</c> (no suffix), <c>symbols</c>, <c>×</c>, <c>%</c>, <c>% saved</c> (suffix <c>%</c>), <c>log2</c> (of a quotient, no suffix), <c>number</c> (no suffix).</remarks>
internal readonly partial record struct PrintedNumber(double Value, double HalfStep)
{
    private static readonly string[] BinarySteps = ["B", "KiB", "MiB", "GiB", "TiB", "PiB", "EiB"];

    private static readonly Dictionary<string, string[]> Suffixes = new(StringComparer.Ordinal)
    {
        ["bytes"] = ["bytes", "byte", .. BinarySteps],
        ["KiB"] = ["KiB"],
        ["MiB"] = ["MiB"],
        ["GiB"] = ["GiB"],
        ["TiB"] = ["TiB"],
        ["bits"] = ["bits", "bit"],
        ["bit/symbol"] = ["bit/symbol"],
        ["bit/byte"] = ["bit/byte"],
        ["count"] = [],
        ["symbols"] = ["symbols", "symbol"],
        ["×"] = ["×"],
        ["%"] = ["%"],
        ["% saved"] = ["%"],
        ["log2"] = [],
        ["number"] = [],
    };

    /// <summary>Whether a unit is one of bytes: <c>bytes</c> itself, or the one that a column's header names.</summary>
    public static bool IsOfBytes(string unit) => unit == "bytes" || Array.IndexOf(BinarySteps, unit) > 0;

    /// <summary>Whether a unit is one of those above.</summary>
    public static bool Knows(string unit) => Suffixes.ContainsKey(unit);

    /// <summary>Whether the number stands for an exact one.</summary>
    public bool Admits(double exact) => Math.Abs(exact - Value) <= HalfStep + 1e-9 * Math.Max(1, Math.Abs(exact));

    /// <summary>Reads a whole text.</summary>
    /// <exception cref="FormatException">The text is no number of the unit.</exception>
    public static PrintedNumber Read(string text, string unit)
    {
        Match match = Number().Match(text.Trim());
        string suffix = match.Groups["suffix"].Value;
        if (!match.Success || suffix.Length > 0 && !Suffixes[unit].Contains(suffix)) throw new FormatException($"“{text.Trim()}” is no number in {unit}");
        string digits = Separator().Replace(match.Groups["digits"].Value, "");
        double scale = Math.Pow(1024, Math.Max(0, Array.IndexOf(BinarySteps, suffix.Length > 0 ? suffix : unit)));
        double value = double.Parse(digits, NumberStyles.AllowDecimalPoint, CultureInfo.InvariantCulture) * scale;
        int decimals = digits.Contains('.', StringComparison.Ordinal) ? digits.Length - digits.IndexOf('.', StringComparison.Ordinal) - 1 : 0;
        // Whole bytes, bits and counts are printed in full: nothing is rounded away.
        bool whole = decimals == 0 && scale == 1 && unit is "bytes" or "bits" or "count" or "symbols";
        return new PrintedNumber(match.Groups["sign"].Value is "−" or "-" ? -value : value, whole ? 0 : scale * Math.Pow(10, -decimals) / 2);
    }

    [GeneratedRegex(@"^(?:about |≈ ?)?(?<sign>[−+-]?)(?<digits>\d{1,3}(?:[,\u2009\u202f]\d{3})+(?:\.\d+)?|\d+(?:\.\d+)?)(?:[ \u00a0\u2009\u202f]?(?<suffix>[A-Za-z%×][A-Za-z/]*))?$", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 1000)]
    private static partial Regex Number();

    [GeneratedRegex(@"[,\u2009\u202f]", RegexOptions.None, matchTimeoutMilliseconds: 1000)]
    private static partial Regex Separator();
}
