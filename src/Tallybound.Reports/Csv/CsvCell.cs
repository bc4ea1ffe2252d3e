using System.Buffers;
using System.Globalization;

namespace Tallybound.Reports.Csv;

/// <summary>Cells of a comma-separated file by RFC 4180.</summary>
/// <remarks>A text that a spreadsheet would run as a formula gets a leading apostrophe, which spreadsheets take as "this is text".</remarks>
internal static class CsvCell
{
    private static readonly SearchValues<char> NeedQuotes = SearchValues.Create(",\"\r\n");
    private static readonly SearchValues<char> FormulaStart = SearchValues.Create("=+-@\t\r");

    /// <summary>A text cell; null is an empty cell.</summary>
    public static string Text(string? value)
    {
        if (string.IsNullOrEmpty(value)) return "";
        string safe = FormulaStart.Contains(value[0]) ? "'" + value : value;
        return safe.AsSpan().ContainsAny(NeedQuotes) || safe.Length != value.Length
            ? "\"" + safe.Replace("\"", "\"\"", StringComparison.Ordinal) + "\""
            : safe;
    }

    /// <summary>A whole number; null is an empty cell.</summary>
    public static string Number(long? value) => value?.ToString(CultureInfo.InvariantCulture) ?? "";

    /// <summary>A number in its shortest form that reads back equal; null is an empty cell.</summary>
    public static string Number(double? value) => value?.ToString("R", CultureInfo.InvariantCulture) ?? "";
}
