using Microsoft.Playwright;

[assembly: AssemblyFixture(typeof(Tallybound.Cli.Tests.Browser.Chromium))]

namespace Tallybound.Cli.Tests.Browser;

/// <summary>How a page is looked at.</summary>
/// <param name="Width">Width of the window in CSS pixels.</param>
/// <param name="Dark">Whether the reader prefers dark pages.</param>
/// <param name="Script">Whether scripts of the page may run.</param>
internal sealed record PageView(int Width = 1280, bool Dark = false, bool Script = true);

/// <summary>One headless Chromium for all tests, started when a test first asks for it.</summary>
/// <remarks>The browser is the system's own; the driver that speaks to it comes with the test package.
/// Each window is a context of its own, so that none knows of another.</remarks>
public sealed class Chromium : IAsyncDisposable
{
    private const string Program = "/usr/bin/chromium";
    private const int WindowHeight = 900;

    /// <summary>A headless browser that paints without a graphics card and speaks to nobody.</summary>
    private static readonly string[] Flags =
        ["--disable-gpu", "--disable-quic", "--no-first-run", "--disable-background-networking", "--disable-component-update", "--disable-sync"];

    private IPlaywright? driver;
    private IBrowser? browser;

    /// <summary>Opens a page from its file and records what it does from the first byte on.</summary>
    internal async Task<OpenPage> OpenAsync(string file, PageView? view = null)
    {
        OpenPage page = await OpenAsync(view);
        await page.GoAsync(file);
        return page;
    }

    /// <summary>Opens an empty window, which goes from file to file.</summary>
    internal async Task<OpenPage> OpenAsync(PageView? view = null)
    {
        view ??= new PageView();
        IBrowser running = await LaunchedAsync();
        IBrowserContext context = await running.NewContextAsync(new BrowserNewContextOptions
        {
            ViewportSize = new ViewportSize { Width = view.Width, Height = WindowHeight },
            ColorScheme = view.Dark ? ColorScheme.Dark : ColorScheme.Light,
            JavaScriptEnabled = view.Script,
            Locale = "en-GB",
            Offline = true,
        });
        return new OpenPage(context, await context.NewPageAsync());
    }

    public async ValueTask DisposeAsync()
    {
        if (browser is not null) await browser.CloseAsync();
        driver?.Dispose();
    }

    private async Task<IBrowser> LaunchedAsync()
    {
        Prerequisites.RequireFile(Program, "chromium");
        if (browser is not null) return browser;
        driver = await Playwright.CreateAsync();
        browser = await driver.Chromium.LaunchAsync(new BrowserTypeLaunchOptions { ExecutablePath = Program, Headless = true, ChromiumSandbox = false, Args = Flags });
        return browser;
    }
}
