using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>The key Tab goes through every link, fold, control and box that scrolls by itself, in the order of the document, and each shows that it has the focus.</summary>
internal static class Keyboard
{
    /// <summary>Stops that are gone through: further ones are made by the same markup.</summary>
    private const int StopsLookedAt = 150;

    private const int RowsLookedAt = 60;

    /// <summary>Numbers the stops that a page should have. A box that scrolls sideways must be one of them, since arrow keys move only what has the focus.</summary>
    private const string Number = """
        () => {
          const scrolls = e => ['auto', 'scroll'].includes(getComputedStyle(e).overflowX) && e.scrollWidth > e.clientWidth + 1
            || ['auto', 'scroll'].includes(getComputedStyle(e).overflowY) && e.scrollHeight > e.clientHeight + 1;
          const stops = [...document.querySelectorAll('body *')].filter(e => e.checkVisibility({ visibilityProperty: true })
            && (e.matches('a[href],summary,button:not(:disabled),input:not(:disabled),select,textarea') || scrolls(e)));
          stops.forEach((e, i) => {
            e.dataset.stop = i;
            const style = getComputedStyle(e);
            e.dataset.calm = [style.outlineStyle, style.outlineWidth, style.boxShadow, style.borderColor, style.backgroundColor, style.textDecoration].join();
          });
          return stops.length;
        }
        """;

    private const string Focused = """
        () => {
          const e = document.activeElement;
          if (!e || e === document.body || e === document.documentElement) return JSON.stringify({ stop: -2, shown: true, what: '' });
          const style = getComputedStyle(e);
          const outlined = style.outlineStyle !== 'none' && parseFloat(style.outlineWidth) > 0;
          const changed = e.dataset.calm !== undefined && e.dataset.calm !== [style.outlineStyle, style.outlineWidth, style.boxShadow, style.borderColor, style.backgroundColor, style.textDecoration].join();
          const box = e.getBoundingClientRect();
          return JSON.stringify({ stop: e.dataset.stop === undefined ? -1 : +e.dataset.stop, shown: (outlined || changed) && box.bottom > 0 && box.top < innerHeight,
            what: `${e.tagName.toLowerCase()} ${e.textContent.trim().slice(0, 40)}` });
        }
        """;

    private sealed record Stop([property: System.Text.Json.Serialization.JsonPropertyName("stop")] int Number, bool Shown, string What);

    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page)
    {
        await page.AskAsync<int>(Rows.Trim, RowsLookedAt);
        int stops = await page.AskAsync<int>(Number);
        List<string> faults = [];
        int expected = 0;
        // A stop that is no link, control or scrolling box now (a box that scrolls only on narrow screens) is let pass, and counted.
        for (int step = 0; step < StopsLookedAt * 2 && expected < Math.Min(stops, StopsLookedAt); step++)
        {
            await page.Page.Keyboard.PressAsync("Tab");
            Stop at = JsonSerializer.Deserialize<Stop>(await page.AskAsync<string>(Focused), JsonSerializerOptions.Web)!;
            if (at.Number == -2) break;
            if (!at.Shown) faults.Add($"nothing shows that this has the focus: {at.What}");
            if (at.Number == -1) continue;
            if (at.Number != expected) faults.Add($"Tab went to stop {at.Number} instead of {expected}: {at.What}");
            expected = at.Number + 1;
        }
        if (expected < Math.Min(stops, StopsLookedAt)) faults.Add($"Tab reached {expected} of {stops} links, folds, controls and scrolling boxes");
        return faults;
    }
}
