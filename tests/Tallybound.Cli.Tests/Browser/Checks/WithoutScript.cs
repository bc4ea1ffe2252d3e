using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>A page says the same with scripts and without: what a script adds is controls, and it takes nothing away.</summary>
/// <remarks>Compared are the texts that can be seen once all folds are open, which needs no script, in the order of the document. A text that only the page with scripts shows must stand in a control
/// or in its label or answer (button, label, input, output, a part with the role status or search).</remarks>
internal static class WithoutScript
{
    private const string Unfold = "() => document.querySelectorAll('details').forEach(fold => fold.open = true)";

    private const string Texts = """
        () => {
          const texts = [];
          const walker = document.createTreeWalker(document.body, NodeFilter.SHOW_TEXT);
          for (let node = walker.nextNode(); node; node = walker.nextNode()) {
            const parent = node.parentElement, text = node.data.replace(/\s+/g, ' ').trim();
            if (!text || parent.closest('script,style,template,noscript') || !parent.checkVisibility({ visibilityProperty: true, opacityProperty: true })) continue;
            texts.push({ text, control: parent.closest('button,label,input,output,[role=status],[role=search],search') !== null });
          }
          return JSON.stringify(texts);
        }
        """;

    private const string HiddenTables = """
        () => [...document.querySelectorAll('table')].filter(table => {
          const box = table.getBoundingClientRect();
          return !table.checkVisibility({ visibilityProperty: true, opacityProperty: true }) || box.width < 1 || box.height < 1 || [...table.rows].some(row => row.getBoundingClientRect().height < 1);
        }).map(table => `a table or a row of it cannot be seen: ${(table.caption ?? table).textContent.trim().slice(0, 60)}`)
        """;

    private sealed record Seen(string Text, bool Control);

    /// <summary>The faults of a page that was opened without scripts, beside the same page with them.</summary>
    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage without, OpenPage with)
    {
        foreach (OpenPage page in new[] { without, with }) await page.AskAsync<object?>(Unfold);
        Seen[] plain = await TextsAsync(without);
        Seen[] scripted = await TextsAsync(with);
        List<string> faults = [.. await without.AskAsync<string[]>(HiddenTables)];
        if (plain.Length == 0) faults.Add("nothing can be seen without scripts");
        int next = 0;
        foreach (Seen seen in scripted)
        {
            if (next < plain.Length && seen.Text == plain[next].Text) next++;
            else if (!seen.Control)
            {
                faults.Add($"with scripts the page says “{seen.Text}”, without them “{(next < plain.Length ? plain[next].Text : "nothing more")}”");
                return faults;
            }
        }
        if (next < plain.Length) faults.Add($"only without scripts the page says “{plain[next].Text}”");
        return faults;
    }

    private static async Task<Seen[]> TextsAsync(OpenPage page) => JsonSerializer.Deserialize<Seen[]>(await page.AskAsync<string>(Texts), JsonSerializerOptions.Web)!;
}
