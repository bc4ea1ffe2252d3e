using System.Globalization;
using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser.Numbers;

/// <summary>Parses the numbers of a page back and holds them against the record.</summary>
/// <remarks><para>An element that prints a number of the record and nothing else carries two attributes:</para>
/// <list type="bullet">
/// <item><c>data-record</c>: where it stands in <c>profile.json</c>, an expression of <see cref="RecordValue"/>:
/// <c>/corpus/totals/huffman</c>, <c>/sources/3/views/0/codes/1/payloadBits + /sources/3/views/0/codes/1/tableBits</c>,
/// <c>/corpus/verdict/rawBytes over /corpus/verdict/codedBytes</c>, <c>#/sources</c>;</item>
/// <item><c>data-unit</c>: the unit in which it is printed, one of <see cref="PrintedNumber"/>.</item>
/// </list>
/// <para>Its text is a number of that unit and differs from the record by at most half of its last digit. A title that begins with a
/// digit is a number of the same unit too, and where it is in bytes, bits or a count it is exact. Titles that hold the word
/// <c>bytes</c> are exact numbers that the text rounds, marked or not.</para></remarks>
internal static class PageNumbers
{
    private const string Script = """
        () => JSON.stringify([...document.querySelectorAll('[data-record],td[title*="byte"],th[title*="byte"]')].map(e =>
          ({ record: e.getAttribute('data-record'), unit: e.getAttribute('data-unit'), text: e.textContent.trim(), title: e.getAttribute('title') })))
        """;

    private sealed record Figure(string? Record, string? Unit, string Text, string? Title);

    /// <summary>What is wrong with the numbers of a page, and how many of them were marked and compared.</summary>
    public static async Task<(IReadOnlyList<string> Faults, int Marked)> CompareAsync(OpenPage page, JsonElement record)
    {
        Figure[] figures = JsonSerializer.Deserialize<Figure[]>(await page.AskAsync<string>(Script), JsonSerializerOptions.Web)!;
        List<string> faults = [];
        foreach (Figure figure in figures)
        {
            try
            {
                faults.AddRange(figure.Record is null ? OfTitle(figure) : OfRecord(figure, record));
            }
            catch (FormatException fault)
            {
                faults.Add($"{figure.Record ?? figure.Title}: {fault.Message}");
            }
        }
        return (faults, figures.Count(figure => figure.Record is not null));
    }

    private static IEnumerable<string> OfRecord(Figure figure, JsonElement record)
    {
        if (figure.Unit is not { } unit || !PrintedNumber.Knows(unit))
        {
            yield return $"{figure.Record} is printed in an unknown unit “{figure.Unit}”";
            yield break;
        }
        double exact = RecordValue.Of(record, figure.Record!, unit);
        if (!PrintedNumber.Read(figure.Text, unit).Admits(exact)) yield return $"{figure.Record} is {Text(exact)} in {unit}, the page says “{figure.Text}”";
        if (figure.Title is not { Length: > 0 } title || !char.IsAsciiDigit(title[0])) yield break;
        if (!PrintedNumber.Read(title, PrintedNumber.IsOfBytes(unit) ? "bytes" : unit).Admits(exact)) yield return $"{figure.Record} is {Text(exact)} in {unit}, the title says “{title}”";
    }

    private static IEnumerable<string> OfTitle(Figure figure)
    {
        PrintedNumber exact = PrintedNumber.Read(figure.Title!, "bytes");
        if (exact.HalfStep != 0) yield return $"the title “{figure.Title}” rounds";
        if (!PrintedNumber.Read(figure.Text, figure.Unit ?? "bytes").Admits(exact.Value)) yield return $"the title says “{figure.Title}”, the text “{figure.Text}”";
    }

    private static string Text(double value) => value.ToString("R", CultureInfo.InvariantCulture);
}
