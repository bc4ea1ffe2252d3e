using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>The checks of how a page is used, by keyboard, without scripts and under hostile names, find what they are there for.</summary>
public sealed class UseLawTests(Chromium chromium) : IDisposable
{
    private const string Plain = MadePage.Plain;

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    [Theory]
    [InlineData("<script>document.querySelector('p').textContent = 'Door 5'</script>", "with scripts the page says “Door 5”")]
    [InlineData("<script>document.querySelector('p').remove()</script>", "with scripts the page says “Sizes”")]
    [InlineData("<p>Last.</p><script>document.querySelector('main').lastElementChild.previousElementSibling.remove()</script>", "only without scripts")]
    [InlineData("<p hidden>Later.</p><script>document.querySelector('[hidden]').hidden = false</script>", "with scripts the page says “Later.”")]
    [InlineData("<script>document.querySelector('table').style.display = 'table'</script><style>table{display:none}</style>", "a table or a row of it cannot be seen")]
    public async Task A_page_that_needs_its_script_is_found(string markup, string fault) =>
        Assert.Contains(await WithoutScriptAsync(Plain + markup), found => found.StartsWith(fault, StringComparison.Ordinal));

    [Fact]
    public async Task A_page_may_fold_and_a_script_may_add_controls()
    {
        Assert.Empty(await WithoutScriptAsync(Plain));
        Assert.Empty(await WithoutScriptAsync(Plain + "<details><summary>More</summary><table><tr><td>1</td></tr></table></details>"));
        Assert.Empty(await WithoutScriptAsync(Plain + "<script>const th = document.querySelector('th'), b = document.createElement('button'); b.append(...th.childNodes); th.append(b); b.insertAdjacentHTML('beforeend', '<span>sort</span>')</script>"));
    }

    [Theory]
    [InlineData("<a href=\"#x\">one</a><a href=\"#x\" tabindex=\"-1\">two</a>", "Tab reached 1 of 2")]
    [InlineData("<a href=\"#x\">one</a><a href=\"#x\" tabindex=\"1\">two</a>", "Tab went to stop 1 instead of 0")]
    [InlineData("<a href=\"#x\">one</a><style>a:focus{outline:none}</style>", "nothing shows that this has the focus")]
    [InlineData("<details><summary tabindex=\"-1\">fold</summary>4</details>", "Tab reached 0 of 1")]
    [InlineData("<div style=\"overflow-x:auto\" tabindex=\"-1\"><div style=\"width:2000px\">wide</div></div>", "Tab reached 0 of 1")]
    public async Task What_the_keyboard_cannot_reach_or_show_is_found(string markup, string fault)
    {
        await using OpenPage page = await OpenAsync(Plain + markup);
        Assert.Contains(await Keyboard.FaultsAsync(page), found => found.StartsWith(fault, StringComparison.Ordinal));
    }

    [Fact]
    public async Task What_the_keyboard_reaches_has_no_fault()
    {
        await using OpenPage page = await OpenAsync(Plain + "<a href=\"#x\">one</a><details><summary>fold</summary><a href=\"#y\">hidden</a></details><div style=\"overflow-x:auto\" tabindex=\"0\"><div style=\"width:2000px\">wide</div></div><button>go</button>");
        Assert.Empty(await Keyboard.FaultsAsync(page));
        await using OpenPage empty = await OpenAsync(Plain);
        Assert.Empty(await Keyboard.FaultsAsync(empty));
    }

    [Theory]
    [InlineData("<x-injected>door.log</x-injected>", "an element x-injected")]
    [InlineData("<p onclick=\"alert(1)\">door.log</p>", "an attribute onclick of p")]
    [InlineData("<a href=\"javascript:alert(1)\">door.log</a>", "an address javascript:alert(1)")]
    [InlineData("<p>door.log</p><script>1</script>", "a script of its own")]
    [InlineData("<p>door.log</p><script>alert(1)</script>", "dialog alert: 1")]
    [InlineData("<p>door.lo</p>", "the name door.log does not stand")]
    public async Task A_name_that_is_more_or_less_than_text_is_found(string markup, string fault)
    {
        await using OpenPage page = await OpenAsync(Plain + markup);
        Assert.Contains(await Names.FaultsAsync(page, ["door.log"], []), found => found.StartsWith(fault, StringComparison.Ordinal));
    }

    [Fact]
    public async Task A_name_that_is_text_has_no_fault()
    {
        await using OpenPage page = await OpenAsync(Plain + "<p>&lt;x-injected onclick=alert(2)&gt;</p><a href=\"#door\">door.log</a><script>1</script>");
        Assert.Empty(await Names.FaultsAsync(page, ["<x-injected onclick=alert(2)>", " door.log"], ["1"]));
    }

    private async Task<IReadOnlyList<string>> WithoutScriptAsync(string markup)
    {
        await using OpenPage without = await OpenAsync(markup, new PageView(Script: false));
        await using OpenPage with = await OpenAsync(markup);
        return await WithoutScript.FaultsAsync(without, with);
    }

    private Task<OpenPage> OpenAsync(string markup, PageView? view = null) => MadePage.OpenAsync(chromium, folder, markup, view);
}
