using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>What holds of the pages of runs that try to break them.</summary>
public sealed class HostilePageTests(Chromium chromium, HardRuns runs)
{
    private const int MostIndexBytes = 3 << 20;

    [Fact]
    public async Task Hostile_names_stand_on_the_pages_as_text_and_bring_in_no_element()
    {
        ReportRun hostile = runs.Of("hostile names");
        ReportRun plain = runs.Of("one source");
        string[] scripts = [.. await ScriptsOf(plain.Index), .. plain.SourcePages.Length > 0 ? await ScriptsOf(plain.SourcePages[0]) : []];
        string[] names = [.. hostile.Names.Select(HostileNames.Shown)];
        Assert.Equal(HostileNames.Utf8.Count + 3, names.Length);
        List<string> named = [];
        await Faults.NoneAsync(chromium, hostile.Pages, [new PageView(), new PageView(Width: 320)], async page =>
        {
            if (page.File == hostile.Index) return await Names.FaultsAsync(page, names, scripts);
            string heading = await page.AskAsync<string>("() => document.querySelector('h1').textContent.trim()");
            named.Add(heading);
            return await Names.FaultsAsync(page, [heading], scripts);
        });
        if (hostile.SourcePages.Length == 0) return;
        Assert.Equal(names.Select(name => name.Trim()).Order(StringComparer.Ordinal), named.Distinct().Order(StringComparer.Ordinal));

        async Task<string[]> ScriptsOf(string file)
        {
            await using OpenPage page = await chromium.OpenAsync(file);
            return await Names.ScriptsAsync(page);
        }
    }

    [Fact]
    public async Task The_first_page_of_ten_thousand_sources_is_small_and_opens()
    {
        ReportRun run = runs.Of("ten thousand sources");
        Assert.Equal(HardRuns.Many, run.Names.Length);
        Assert.InRange(new FileInfo(run.Index).Length, 1, MostIndexBytes - 1);
        await using OpenPage page = await chromium.OpenAsync(run.Index);
        double milliseconds = await page.AskAsync<double>("() => performance.getEntriesByType('navigation')[0].domContentLoadedEventEnd");
        TestContext.Current.SendDiagnosticMessage("The first page of {0} sources is {1} bytes long; its content was loaded after {2:0} ms.", HardRuns.Many, new FileInfo(run.Index).Length, milliseconds);
        Assert.True(milliseconds > 0);
    }
}
