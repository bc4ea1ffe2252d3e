using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>The check of prints finds cut rows and lone heads, and none where there is none.</summary>
public sealed class PrintLawTests(Chromium chromium) : IDisposable
{
    private const string Tables = "table{border-collapse:collapse}td{white-space:pre-line;vertical-align:top}";

    /// <summary>A row of twelve lines; a sheet holds some fifty.</summary>
    private static readonly string TallRow = "<tr><td>" + string.Join("\n", Enumerable.Range(1, 12).Select(line => $"line {line}")) + "</td></tr>";

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    [Fact]
    public async Task Rows_that_stay_whole_have_no_fault() =>
        Assert.Empty(await FaultsAsync($"<style>{Tables}tr{{break-inside:avoid}}</style><h1>Doors</h1><table><thead><tr><th>code</th></tr></thead><tbody>{Rows(25)}</tbody></table>", "A4", "Letter"));

    [Fact]
    public async Task A_row_that_is_cut_in_two_is_found() =>
        Assert.Contains(await FaultsAsync($"<style>{Tables}tr{{break-inside:auto}}</style><h1>Doors</h1><table><tbody>{Rows(25)}</tbody></table>", "A4", "Letter"),
            fault => fault.StartsWith("A4: cut between sheets 1 and 2: tr line 1", StringComparison.Ordinal));

    [Theory]
    [InlineData("h2", "<p style=\"break-before:page\">On the next sheet.</p>", "A4: alone at the foot of sheet 1: heading Sizes")]
    [InlineData("h2", "<img alt=\"4\" style=\"break-before:page;display:block;width:200px;height:200px\" src=\"data:image/gif;base64,R0lGODlhAQABAAAAACw=\"><p>Below.</p>", "A4: alone at the foot of sheet 1: heading Sizes")]
    [InlineData("p", "<table><caption>Sizes of doors</caption><tbody><tr style=\"break-before:page\"><td>12</td></tr></tbody></table>", "A4: alone at the foot of sheet 1: caption Sizes of doors")]
    public async Task A_head_without_what_it_heads_is_found(string element, string after, string fault) =>
        Assert.Contains(fault, await FaultsAsync($"<h1>Doors</h1><p>Door 4 was shut.</p><{element}>Sizes</{element}>{after}", "A4"));

    [Fact]
    public async Task A_heading_above_a_picture_is_not_alone() =>
        Assert.Empty(await FaultsAsync("<h1>Doors</h1><h2>Sizes</h2><svg role=\"img\" aria-label=\"4\" width=\"200\" height=\"100\"><text y=\"50\">4 doors</text></svg><p style=\"break-before:page\">On the next sheet.</p>", "A4"));

    [Fact]
    public async Task A_row_that_is_not_printed_is_found() =>
        Assert.Contains(await FaultsAsync("<style>@media print{.screen{display:none}}</style><h1>Doors</h1><table><tbody><tr><td>1</td></tr><tr class=\"screen\"><td>2</td></tr></tbody></table>", "A4"),
            fault => fault.StartsWith("A4: 1 of 3 rows and headings are not on the print: tr 2", StringComparison.Ordinal));

    private static string Rows(int count) => string.Concat(Enumerable.Repeat(TallRow, count));

    private async Task<IReadOnlyList<string>> FaultsAsync(string markup, params string[] formats)
    {
        await using OpenPage page = await MadePage.OpenAsync(chromium, folder, markup);
        return await Print.FaultsAsync(page, formats);
    }
}
