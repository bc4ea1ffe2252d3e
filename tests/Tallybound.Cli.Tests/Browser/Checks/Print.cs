using System.Globalization;
using System.Text.Json;
using System.Xml;
using System.Xml.Linq;
using Microsoft.Playwright;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>Printed, no table row is cut in two, and no heading, caption or column header stands at the foot of a sheet without what it heads.</summary>
/// <remarks>Each row, heading and caption is given a text colour of its own before the page is printed to PDF; poppler's pdftohtml then says on which
/// sheet each colour stands and where. Colour takes no room, so that the layout is the page's own. A column header that a browser repeats on each sheet is
/// one piece a sheet.</remarks>
internal static class Print
{
    private const string Reader = "/usr/bin/pdftohtml";

    /// <summary>Colours all texts: body rows, heads of tables, captions and headings by number from 1 on, everything else by 0.</summary>
    /// <remarks>A number is written into the upper five bits of the three channels; the lower ones stand in the middle, since a PDF rounds
    /// colours to four decimals and its readers round once more. A piece without a Latin letter or digit may be written in a script for which the machine
    /// has no font, and would then be missing from the print's text: it gets no number.</remarks>
    private const string Colour = """
        () => {
          for (const fold of document.querySelectorAll('details')) fold.open = true;
          const paint = (e, number) => {
            const channel = shift => ((number >> shift) & 31) * 8 + 4;
            const colour = `rgb(${channel(10)},${channel(5)},${channel(0)})`;
            for (const each of [e, ...e.querySelectorAll('*')])
              for (const property of each instanceof SVGTextContentElement ? ['fill'] : each.style ? ['color', '-webkit-text-fill-color'] : []) each.style.setProperty(property, colour, 'important');
          };
          const kinds = {};
          let number = 0;
          paint(document.body, 0);
          for (const e of document.querySelectorAll('h1,h2,h3,h4,h5,h6,caption,thead,tfoot,tbody tr')) {
            if (!/[A-Za-z0-9]/.test(e.textContent)) continue;
            paint(e, ++number);
            kinds[number] = (/^H\d$/.test(e.tagName) ? 'heading' : e.tagName.toLowerCase()) + ' ' + e.textContent.replace(/\s+/g, ' ').trim().slice(0, 50);
          }
          return JSON.stringify(kinds);
        }
        """;

    /// <summary>Numbers that a colour can say.</summary>
    private const int Numbers = 1 << 15;

    /// <summary>Rows of a table that are printed: enough for several sheets; further ones are made by the same markup.</summary>
    private const int RowsPrinted = 300;

    private sealed record Piece(int Sheet, double Top, double Bottom, int Number);

    /// <summary>Prints a page and says what the sheets cut.</summary>
    /// <param name="page">The page, which is coloured by this and not fit for other checks afterwards.</param>
    /// <param name="formats">Formats of paper that the browser knows, such as <c>A4</c>.</param>
    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page, params string[] formats)
    {
        Dictionary<int, string> kinds = await ColouredAsync(page);
        List<string> faults = [];
        foreach (string format in formats)
            foreach (string fault in await PrintedAsync(page, kinds, format)) faults.Add($"{format}: {fault}");
        return faults;
    }

    /// <summary>Prints a page on A4 again and again, each time a step lower, so that sheets end in many places, and says what they cut.</summary>
    public static async Task<IReadOnlyList<string>> FaultsLoweredAsync(OpenPage page, int stepPixels, int steps)
    {
        Dictionary<int, string> kinds = await ColouredAsync(page);
        List<string> faults = [];
        for (int step = 1; step <= steps; step++)
        {
            await page.AskAsync<object?>("pixels => { document.body.style.paddingTop = pixels + 'px'; }", step * stepPixels);
            foreach (string fault in await PrintedAsync(page, kinds, "A4")) faults.Add($"{step * stepPixels} px lower: {fault}");
        }
        return faults;
    }

    private static async Task<Dictionary<int, string>> ColouredAsync(OpenPage page)
    {
        Prerequisites.RequireFile(Reader, "poppler-utils");
        await page.AskAsync<int>(Rows.Trim, RowsPrinted);
        Dictionary<int, string> kinds = JsonSerializer.Deserialize<Dictionary<int, string>>(await page.AskAsync<string>(Colour))!;
        Assert.InRange(kinds.Count, 1, Numbers - 1);
        return kinds;
    }

    private static async Task<List<string>> PrintedAsync(OpenPage page, Dictionary<int, string> kinds, string format)
    {
        using var folder = new FreshFolder();
        await page.Page.PdfAsync(new PagePdfOptions { Path = folder.At("page.pdf"), Format = format, PrintBackground = true });
        Outcome outcome = BuiltProgram.Shell(folder, $"{Reader} -xml -i -q -hidden -fontfullname page.pdf page");
        Assert.Equal(0, outcome.ExitCode);
        return Faults(Pieces(folder.At("page.xml"), kinds.Keys.Max()), kinds);
    }

    private static List<string> Faults(List<Piece> pieces, Dictionary<int, string> kinds)
    {
        List<string> faults = [];
        HashSet<int> seen = [.. pieces.Select(piece => piece.Number)];
        int unseen = kinds.Keys.Count(number => !seen.Contains(number));
        if (unseen > 0) faults.Add($"{unseen} of {kinds.Count} rows and headings are not on the print: {kinds.First(kind => !seen.Contains(kind.Key)).Value}");
        foreach (IGrouping<int, Piece> one in pieces.Where(piece => piece.Number > 0).GroupBy(piece => piece.Number))
        {
            int[] sheets = [.. one.Select(piece => piece.Sheet).Distinct()];
            if (sheets.Length > 1 && !Repeats(kinds[one.Key])) faults.Add($"cut between sheets {sheets[0]} and {sheets[^1]}: {kinds[one.Key]}");
        }
        foreach (IGrouping<int, Piece> sheet in pieces.GroupBy(piece => piece.Sheet))
        {
            Piece last = sheet.MaxBy(piece => piece.Bottom)!;
            if (last.Number > 0 && Heads(kinds[last.Number])) faults.Add($"alone at the foot of sheet {sheet.Key}: {kinds[last.Number]}");
        }
        return faults;
    }

    private static bool Repeats(string kind) => kind.StartsWith("thead ", StringComparison.Ordinal) || kind.StartsWith("tfoot ", StringComparison.Ordinal);

    private static bool Heads(string kind) => kind.StartsWith("heading ", StringComparison.Ordinal) || kind.StartsWith("caption ", StringComparison.Ordinal) || kind.StartsWith("thead ", StringComparison.Ordinal);

    /// <summary>Texts and pictures of all sheets with the numbers that their colours are; pictures and other colours count as 0.</summary>
    private static List<Piece> Pieces(string file, int highest)
    {
        using var reader = XmlReader.Create(file, new XmlReaderSettings { DtdProcessing = DtdProcessing.Ignore, CheckCharacters = false });
        var fonts = new Dictionary<string, int>(StringComparer.Ordinal);
        List<Piece> pieces = [];
        foreach (XElement sheet in XDocument.Load(reader).Root!.Elements("page"))
        {
            int number = (int)sheet.Attribute("number")!;
            foreach (XElement element in sheet.Elements())
            {
                if (element.Name == "fontspec") fonts[(string)element.Attribute("id")!] = NumberOf((string)element.Attribute("color")!);
                if (element.Name != "text" && element.Name != "image" || element.Name == "text" && string.IsNullOrWhiteSpace(element.Value)) continue;
                double top = (double)element.Attribute("top")!;
                int colour = element.Name == "text" ? fonts[(string)element.Attribute("font")!] : 0;
                pieces.Add(new Piece(number, top, top + (double)element.Attribute("height")!, colour <= highest ? colour : 0));
            }
        }
        return pieces;
    }

    /// <summary>The number that a colour <c>#rrggbb</c> says.</summary>
    private static int NumberOf(string colour)
    {
        int bits = int.Parse(colour.AsSpan(1), NumberStyles.HexNumber, CultureInfo.InvariantCulture);
        return (bits >> 19 & 31) << 10 | (bits >> 11 & 31) << 5 | bits >> 3 & 31;
    }
}
