using System.Text;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Pages that tests write themselves, to hold the checks of pages against.</summary>
internal static class MadePage
{
    /// <summary>A page without fault.</summary>
    public const string Plain = "<h1>Doors</h1><p>Door 4 was shut.</p><h2>Sizes</h2><table><caption>Sizes</caption><thead><tr><th scope=\"col\">code</th></tr></thead><tbody><tr><td>12</td></tr></tbody></table>";

    /// <summary>Writes the parts of a page around some markup, and opens it.</summary>
    public static Task<OpenPage> OpenAsync(Chromium chromium, FreshFolder folder, string markup, PageView? view = null) =>
        chromium.OpenAsync(folder.Write("page.html", Encoding.UTF8.GetBytes($"<!DOCTYPE html><html lang=\"en\"><head><meta charset=\"utf-8\"><title>Doors</title></head><body><main>{markup}</main></body></html>")), view);
}
