using Tallybound.Cli.Tests.Browser.Checks;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>What holds of every page of every run, in a browser.</summary>
public sealed class PageTests(Chromium chromium, HardRuns runs)
{
    private static readonly PageView Usual = new();
    private static readonly PageView Dark = new(Dark: true);
    private static readonly PageView Narrow = new(Width: 320);

    public static TheoryData<string> Runs => HardRuns.Names;

    [Theory]
    [MemberData(nameof(Runs))]
    public Task No_page_complains_or_asks_for_anything(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run), [Usual, Dark, Narrow], Silence.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task Every_page_is_accessible_in_light_and_in_dark(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run), [Usual, Dark, Narrow], Accessibility.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task No_page_scrolls_sideways_or_cuts_its_text_off(string run) =>
        Faults.NoneAsync(chromium, runs.Of(run), [Narrow, new PageView(Width: 600), Usual], Width.FaultsAsync);

    [Theory]
    [MemberData(nameof(Runs))]
    public Task Headings_never_skip_a_level_and_pictures_say_in_numbers_what_they_show(string run)
    {
        bool read = runs.Of(run).Bytes > 0;
        return Faults.NoneAsync(chromium, runs.Of(run), [Usual], page => Outline.FaultsAsync(page, numbersInPictures: read));
    }
}
