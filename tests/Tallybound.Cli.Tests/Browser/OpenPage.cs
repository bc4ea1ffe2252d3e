using Microsoft.Playwright;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>A page in the browser, with everything it did that a report page must not do.</summary>
internal sealed class OpenPage : IAsyncDisposable
{
    /// <summary>Long enough for the largest page on a busy machine.</summary>
    private const int MostMilliseconds = 60_000;

    private readonly IBrowserContext context;
    private readonly List<string> complaints = [];
    private readonly List<string> requests = [];

    private string address = "";

    /// <summary>Watches an empty page of a context, which closes with it.</summary>
    public OpenPage(IBrowserContext context, IPage page)
    {
        this.context = context;
        Page = page;
        page.Console += (_, message) => complaints.Add($"console {message.Type}: {message.Text}");
        page.PageError += (_, error) => complaints.Add($"page error: {error}");
        page.Dialog += async (_, dialog) =>
        {
            complaints.Add($"dialog {dialog.Type}: {dialog.Message}");
            await dialog.DismissAsync();
        };
        page.Request += (_, request) =>
        {
            if (request.Url != address && !request.Url.StartsWith("data:", StringComparison.Ordinal)) requests.Add($"{request.ResourceType}: {request.Url}");
        };
    }

    /// <summary>The page.</summary>
    public IPage Page { get; }

    /// <summary>The file it came from.</summary>
    public string File { get; private set; } = "";

    /// <summary>Name of the file, to say where a fault is.</summary>
    public string Name => Path.GetFileName(File);

    /// <summary>Console messages, page errors and dialogs, each in one line; a page that is well leaves none.</summary>
    public IReadOnlyList<string> Complaints => complaints;

    /// <summary>Addresses that were asked for beyond the page's own and data held in the page.</summary>
    public IReadOnlyList<string> Requests => requests;

    /// <summary>Goes to a file and forgets what the page before it did.</summary>
    public async Task GoAsync(string file)
    {
        File = file;
        address = new Uri(file).AbsoluteUri;
        complaints.Clear();
        requests.Clear();
        await Page.GotoAsync(address, new PageGotoOptions { WaitUntil = WaitUntilState.Load, Timeout = MostMilliseconds });
    }

    /// <summary>Runs a function in the page and reads its answer.</summary>
    public Task<T> AskAsync<T>(string function, object? argument = null) => Page.EvaluateAsync<T>(function, argument);

    public async ValueTask DisposeAsync() => await context.CloseAsync();
}
