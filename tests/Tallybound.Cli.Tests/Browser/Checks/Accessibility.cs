using Deque.AxeCore.Commons;
using Deque.AxeCore.Playwright;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>axe-core finds no violation of any rule, whatever its severity.</summary>
internal static class Accessibility
{
    /// <summary>Rows of a table that are looked at: the rest are made by the same markup, and every element costs time.</summary>
    private const int RowsLookedAt = 60;

    /// <summary>All rules. The pages hold no frames, so none is waited for.</summary>
    private static readonly AxeRunOptions Options = new() { Iframes = false, ResultTypes = [ResultType.Violations] };

    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page)
    {
        await page.AskAsync<int>(Rows.Trim, RowsLookedAt);
        AxeResult result = await page.Page.RunAxe(Options);
        if (result.Passes.Length < 10) return [$"axe-core found only {result.Passes.Length} rules to pass: it did not look at the page"];
        return [.. result.Violations.SelectMany(violation => violation.Nodes.Select(node => $"{violation.Id} ({violation.Impact}): {Short(node.Html)}"))];
    }

    private static string Short(string html) => html.Length <= 160 ? html : html[..160] + "…";
}
