using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>What holds of every page of every run, in a browser.</summary>
public sealed class PageTests(Chromium chromium, HardRuns runs)
{
    private static readonly PageView Usual = new();
    private static readonly PageView Narrow = new(Width: 320);

    public static TheoryData<string> Runs => HardRuns.Names;

    [Theory]
    [MemberData(nameof(Runs))]
    public Task No_page_complains_or_asks_for_anything(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).Pages, [Usual], Silence.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task Every_page_is_accessible_in_light_and_in_dark(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).SomePages, [Usual, Narrow with { Dark = true }], Accessibility.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task No_page_scrolls_sideways_or_cuts_its_text_off(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).Pages, [Narrow], Width.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task No_page_cuts_its_text_off_on_wider_screens(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).SomePages, [new PageView(Width: 600), Usual], Width.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task Headings_never_skip_a_level_and_pictures_say_in_numbers_what_they_show(string run)
    {
        bool read = runs.Of(run).Bytes > 0;
        return Faults.NoneAsync(chromium, runs.Of(run).Pages, [Usual], page => Outline.FaultsAsync(page, numbersInPictures: read));
    }

    [Theory]
    [MemberData(nameof(Runs))]
    public async Task Without_scripts_a_page_says_the_same_and_shows_all_its_tables(string run)
    {
        await using OpenPage scripted = await chromium.OpenAsync(Usual);
        await Faults.NoneAsync(chromium, runs.Of(run).SomePages, [Usual with { Script = false }], async page =>
        {
            await scripted.GoAsync(page.File);
            return await WithoutScript.FaultsAsync(page, scripted);
        });
    }

    [Theory]
    [MemberData(nameof(Runs))]
    public Task The_keyboard_reaches_everything_that_can_be_used(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).SomePages, [Usual, Narrow], Keyboard.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task Printed_on_A4_and_Letter_no_row_is_cut_and_no_heading_stands_alone(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run).SomePages, [Usual], page => Print.FaultsAsync(page, "A4", "Letter"));

    [Fact]
    public Task Wherever_a_sheet_ends_no_row_is_cut_and_no_heading_stands_alone()
    {
        ReportRun demo = runs.Of("the demo corpus");
        return Faults.NoneAsync(chromium, [demo.Index, .. demo.SourcePages.Take(1)], [Usual], page => Print.FaultsLoweredAsync(page, stepPixels: 83, steps: 10));
    }
}
