namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>A page says nothing on the console, throws nothing, asks nobody for anything and opens no dialog.</summary>
internal static class Silence
{
    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page)
    {
        // What a page does once it is idle is heard too.
        await page.AskAsync<bool>("() => new Promise(done => setTimeout(() => done(true), 50))");
        return [.. page.Complaints, .. page.Requests.Select(request => "asked for " + request)];
    }
}
