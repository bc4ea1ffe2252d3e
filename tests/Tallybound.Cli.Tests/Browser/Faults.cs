namespace Tallybound.Cli.Tests.Browser;

/// <summary>Looks at pages of a run and collects what is wrong, so that one failure tells everything.</summary>
internal static class Faults
{
    /// <summary>Faults shown in a message; the rest is counted.</summary>
    private const int Shown = 25;

    /// <summary>Opens each page in each view, asks for its faults, and fails with all of them.</summary>
    public static async Task NoneAsync(Chromium chromium, IReadOnlyList<string> pages, PageView[] views, Func<OpenPage, Task<IReadOnlyList<string>>> look)
    {
        List<string> faults = [];
        int looked = 0;
        foreach (PageView view in views)
        {
            await using OpenPage page = await chromium.OpenAsync(view);
            foreach (string file in pages)
            {
                await page.GoAsync(file);
                foreach (string fault in await look(page)) faults.Add($"{page.Name} ({view.Width} px{(view.Dark ? ", dark" : "")}{(view.Script ? "" : ", no script")}): {fault}");
                looked++;
            }
        }
        Assert.Equal(pages.Count * views.Length, looked);
        Assert.True(looked > 0);
        Assert.True(faults.Count == 0, $"{faults.Count} faults:\n{string.Join('\n', faults.Take(Shown))}");
    }
}
