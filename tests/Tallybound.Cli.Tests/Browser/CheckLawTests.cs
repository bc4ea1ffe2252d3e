using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Each check of pages finds the fault it is there for, and finds none in a plain page.</summary>
public sealed class CheckLawTests(Chromium chromium) : IDisposable
{
    private const string Plain = MadePage.Plain;

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    [Fact]
    public async Task A_plain_page_has_no_fault()
    {
        await using OpenPage page = await OpenAsync(Plain, new PageView(Width: 320));
        Assert.Empty(await Silence.FaultsAsync(page));
        Assert.Empty(await Checks.Width.FaultsAsync(page));
        Assert.Empty(await Outline.FaultsAsync(page, numbersInPictures: true));
        Assert.Empty(await Accessibility.FaultsAsync(page));
    }

    [Theory]
    [InlineData("<script>console.error('no')</script>", "console error: no")]
    [InlineData("<script>console.log('why')</script>", "console log: why")]
    [InlineData("<script>undefined.missing</script>", "page error")]
    [InlineData("<script>setTimeout(() => alert('here'), 5)</script>", "dialog alert: here")]
    [InlineData("<img src=\"picture.png\" alt=\"4 doors\">", "asked for")]
    [InlineData("<script src=\"http://127.0.0.1:9/a.js\"></script>", "asked for")]
    [InlineData("<style>p{background:url(http://127.0.0.1:9/a.png)}</style>", "asked for")]
    [InlineData("<style>@font-face{font-family:x;src:url(x.woff2)}p{font-family:x}</style>", "asked for")]
    public async Task A_page_that_complains_or_asks_is_heard(string markup, string fault)
    {
        await using OpenPage page = await OpenAsync(Plain + markup);
        Assert.Contains(await Silence.FaultsAsync(page), found => found.Contains(fault, StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("<img src=\"data:image/gif;base64,R0lGODlhAQABAAAAACw=\">", "image-alt")]
    [InlineData("<p style=\"color:#ccc\">Pale.</p>", "color-contrast")]
    [InlineData("<table><tr><th></th></tr></table>", "empty-table-header")]
    [InlineData("<input>", "label")]
    public async Task A_page_that_keeps_readers_out_is_found(string markup, string rule)
    {
        await using OpenPage page = await OpenAsync(Plain + markup);
        Assert.Contains(await Accessibility.FaultsAsync(page), found => found.StartsWith(rule + " ", StringComparison.Ordinal));
    }

    [Theory]
    [InlineData("<div style=\"width:400px\">wide</div>", "the page is 408 px wide")]
    [InlineData("<p>wwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwww</p>", "the page is")]
    [InlineData("<div style=\"overflow-x:clip\"><p>wwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwww</p></div>", "text cut off by its div")]
    [InlineData("<div style=\"overflow:hidden;height:10px\"><p>One line<br>and another.</p></div>", "text cut off by its div")]
    [InlineData("<p style=\"position:absolute;left:-40px\">left of it</p>", "text from -40")]
    [InlineData("<svg role=\"img\" aria-label=\"4 doors\" width=\"100\" height=\"20\"><text x=\"80\" y=\"15\">out of the picture</text></svg>", "text cut off by its svg")]
    public async Task Text_that_cannot_be_read_is_found(string markup, string fault)
    {
        await using OpenPage page = await OpenAsync(Plain + markup, new PageView(Width: 320));
        Assert.Contains(await Checks.Width.FaultsAsync(page), found => found.StartsWith(fault, StringComparison.Ordinal));
    }

    [Fact]
    public async Task A_box_that_scrolls_by_itself_may_hold_more_than_it_shows()
    {
        await using OpenPage page = await OpenAsync(Plain + "<div tabindex=\"0\" style=\"overflow-x:auto\"><div style=\"width:900px\">wwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwwww</div></div>", new PageView(Width: 320));
        Assert.Empty(await Checks.Width.FaultsAsync(page));
    }

    [Theory]
    [InlineData("<h4>Too deep</h4>", "level 4 follows level 2")]
    [InlineData("<h1>Another</h1>", "2 headings of level 1")]
    [InlineData("<h2></h2>", "is empty")]
    [InlineData("<img alt=\"doors\" src=\"data:image/gif;base64,R0lGODlhAQABAAAAACw=\">", "holds no number")]
    [InlineData("<img alt=\"\" src=\"data:image/gif;base64,R0lGODlhAQABAAAAACw=\">", "without a text")]
    [InlineData("<svg role=\"img\"></svg>", "without a text")]
    [InlineData("<svg aria-label=\"4 doors\"></svg>", "without role")]
    public async Task A_heading_or_picture_that_says_too_little_is_found(string markup, string fault)
    {
        await using OpenPage page = await OpenAsync(Plain + markup);
        Assert.Contains(await Outline.FaultsAsync(page, numbersInPictures: true), found => found.Contains(fault, StringComparison.Ordinal));
    }

    private Task<OpenPage> OpenAsync(string markup, PageView? view = null) => MadePage.OpenAsync(chromium, folder, markup, view);
}
