using System.Text.Json;
using Microsoft.Playwright;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>What the script of a page adds: long tables sort by each column, and the list of sources is searched by name.</summary>
public sealed class SortAndFindTests(Chromium chromium, HardRuns runs)
{
    private const string LongTables = "table[data-long]";

    /// <summary>Presses the sort button of one column of one long table and reads what the table then is.</summary>
    private const string Press = """
        ([table, column]) => {
          const at = document.querySelectorAll('table[data-long]')[table], heads = [...at.tHead.rows[0].cells];
          heads[column].querySelector('button').click();
          return JSON.stringify({
            sorts: heads.map(head => head.getAttribute('aria-sort')),
            rows: [...at.tBodies[0].rows].map(row => row.textContent),
            cells: [...at.tBodies[0].rows].map(row => row.cells[column]).map(cell => ({ text: cell.textContent.replace(/[,\s\u2007\u2008×%+]/g, ''), title: cell.title })) });
        }
        """;

    private sealed record Cell(string Text, string Title);

    private sealed record Sorted(string?[] Sorts, string[] Rows, Cell[] Cells);

    [Theory]
    [InlineData("the demo corpus")]
    [InlineData("hostile names")]
    public async Task Long_tables_sort_by_each_column_both_ways_and_lose_no_row(string name)
    {
        ReportRun run = runs.Of(name);
        int columns = 0;
        foreach (string file in run.SomePages)
        {
            await using OpenPage page = await chromium.OpenAsync(file);
            int[] widths = await page.AskAsync<int[]>($"() => [...document.querySelectorAll('{LongTables}')].map(table => table.tHead.rows[0].cells.length)");
            for (int table = 0; table < widths.Length; table++)
            {
                string[]? before = null;
                for (int column = 0; column < widths[table]; column++)
                {
                    foreach (string direction in new[] { "ascending", "descending" })
                    {
                        Sorted sorted = JsonSerializer.Deserialize<Sorted>(await page.AskAsync<string>(Press, new[] { table, column }), JsonSerializerOptions.Web)!;
                        Assert.Equal(direction, Assert.Single(sorted.Sorts, each => each is not null));
                        Assert.Equal(direction, sorted.Sorts[column]);
                        string[] rows = [.. sorted.Rows.Order(StringComparer.Ordinal)];
                        Assert.Equal(before ??= rows, rows);
                        AssertInOrder(sorted.Cells, direction == "descending", $"{page.Name}, table {table}, column {column}, {direction}");
                    }
                    columns++;
                }
            }
            Assert.Empty(page.Complaints);
        }
        Assert.True(columns > 5, $"Only {columns} columns were sorted.");
    }

    [Fact]
    public async Task A_source_among_ten_thousand_is_found_by_its_name()
    {
        ReportRun run = runs.Of("ten thousand sources");
        await using OpenPage page = await chromium.OpenAsync(run.Index);
        ILocator box = page.Page.GetByRole(AriaRole.Searchbox);
        ILocator answer = page.Page.Locator(".find [role=status]");
        const string visible = "() => [...document.querySelectorAll('#all-sources tbody tr')].filter(row => row.checkVisibility()).map(row => row.cells[0].textContent.trim())";
        string[] all = await page.AskAsync<string[]>(visible);
        await box.FillAsync("UNIT-00042");
        Assert.Equal(["00/unit-00042.log"], await page.AskAsync<string[]>(visible));
        Assert.Equal("1 of 10,000", (await answer.InnerTextAsync()).Trim());
        await box.FillAsync("no such door");
        Assert.Empty(await page.AskAsync<string[]>(visible));
        Assert.Equal("0 of 10,000", (await answer.InnerTextAsync()).Trim());
        await box.FillAsync("");
        Assert.Equal(all, await page.AskAsync<string[]>(visible));
        Assert.Equal(HardRuns.Many, all.Length);
        Assert.Empty(page.Complaints);
    }

    /// <summary>Empty cells stand last; numbers go by value, exact titles before rounded texts.</summary>
    private static void AssertInOrder(Cell[] cells, bool descending, string where)
    {
        Cell[] filled = [.. cells.TakeWhile(cell => cell.Text.Length > 0)];
        Assert.All(cells.Skip(filled.Length), cell => Assert.True(cell.Text.Length == 0, $"{where}: an empty cell stands before a filled one."));
        double[] values = [.. filled.Select(Value)];
        if (values.Any(double.IsNaN)) return;
        for (int i = 1; i < values.Length; i++)
            Assert.True(descending ? values[i] <= values[i - 1] : values[i] >= values[i - 1], $"{where}: {filled[i - 1]} stands before {filled[i]}.");
    }

    private static double Value(Cell cell)
    {
        string exact = cell.Title.Split(' ')[0].Replace(",", "", StringComparison.Ordinal);
        string text = cell.Text.Replace('−', '-');
        return double.TryParse(exact, out double value) || double.TryParse(text, out value) ? value : double.NaN;
    }
}
