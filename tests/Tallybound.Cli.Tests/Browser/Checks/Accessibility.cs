using Deque.AxeCore.Commons;
using Deque.AxeCore.Playwright;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>axe-core finds no violation of any rule, whatever its severity.</summary>
internal static class Accessibility
{
    /// <summary>Rows of a table that are looked at: the rest are made by the same markup, and every element costs time.</summary>
    private const int RowsLookedAt = 60;

    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page)
    {
        await page.AskAsync<int>("rows => { let gone = 0; for (const body of document.querySelectorAll('tbody')) while (body.rows.length > rows) { body.rows[rows].remove(); gone++; } return gone; }", RowsLookedAt);
        AxeResult result = await page.Page.RunAxe();
        if (result.Passes.Length < 10) return [$"axe-core found only {result.Passes.Length} rules to pass: it did not look at the page"];
        return [.. result.Violations.SelectMany(violation => violation.Nodes.Select(node => $"{violation.Id} ({violation.Impact}): {Short(node.Html)}"))];
    }

    private static string Short(string html) => html.Length <= 160 ? html : html[..160] + "…";
}
