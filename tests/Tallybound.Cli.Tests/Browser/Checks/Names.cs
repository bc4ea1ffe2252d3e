using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>Names of sources stand on a page as text and nothing else.</summary>
internal static class Names
{
    /// <summary>Texts of elements that hold no elements, and of headings.</summary>
    private const string Texts = """
        () => JSON.stringify([...document.querySelectorAll('body *')]
          .filter(e => !e.closest('script,style') && (e.childElementCount === 0 || /^(H[1-6]|TH|TD|A|DD|LI)$/.test(e.tagName))).map(e => e.textContent.trim()))
        """;

    /// <summary>What no page of ours holds: elements and attributes that only a name could bring in.</summary>
    private const string Injected = """
        () => {
          const faults = [];
          for (const e of document.querySelectorAll('x-injected,iframe,object,embed,link,base,form,audio,video,frame,applet,noscript,math')) faults.push(`an element ${e.tagName.toLowerCase()}`);
          for (const e of document.querySelectorAll('*')) for (const a of e.attributes) {
            if (/^on/i.test(a.name)) faults.push(`an attribute ${a.name} of ${e.tagName.toLowerCase()}`);
            if (/^(href|src|xlink:href|action|formaction)$/i.test(a.name) && /^\s*(javascript|vbscript|https?|file):/i.test(a.value)) faults.push(`an address ${a.value}`);
          }
          return faults;
        }
        """;

    private const string Scripts = "() => [...document.querySelectorAll('script')].map(s => s.textContent)";

    /// <summary>Faults of a page on which each of some names must stand by itself.</summary>
    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page, IReadOnlyList<string> shown, IReadOnlyList<string> scripts)
    {
        string[] texts = JsonSerializer.Deserialize<string[]>(await page.AskAsync<string>(Texts))!;
        var present = new HashSet<string>(texts, StringComparer.Ordinal);
        IEnumerable<string> missing = shown.Where(name => !present.Contains(name.Trim())).Select(name => $"the name {name} does not stand on the page by itself");
        IEnumerable<string> strange = (await ScriptsAsync(page)).Except(scripts, StringComparer.Ordinal).Select(script => $"a script of its own: {script}");
        return [.. await Silence.FaultsAsync(page), .. await page.AskAsync<string[]>(Injected), .. missing, .. strange];
    }

    /// <summary>The scripts of a page.</summary>
    public static async Task<string[]> ScriptsAsync(OpenPage page) => await page.AskAsync<string[]>(Scripts);
}
