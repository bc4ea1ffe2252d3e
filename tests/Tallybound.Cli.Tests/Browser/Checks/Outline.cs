namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>One heading of level 1, no level skipped on the way down, and every picture with a text in its place that holds a number.</summary>
/// <remarks>A picture that is hidden from readers of the screen must be inside something that has such a text, or be without meaning and without text.</remarks>
internal static class Outline
{
    private const string Script = """
        numbers => {
          const faults = [];
          const headings = [...document.querySelectorAll('h1,h2,h3,h4,h5,h6')].map(h => ({ level: +h.tagName[1], text: h.textContent.trim() }));
          if (headings.length === 0 || headings[0].level !== 1) faults.push('the first heading is not of level 1');
          if (headings.filter(h => h.level === 1).length !== 1) faults.push(`${headings.filter(h => h.level === 1).length} headings of level 1`);
          headings.forEach((h, i) => {
            if (!h.text) faults.push(`heading ${i + 1} is empty`);
            if (i > 0 && h.level > headings[i - 1].level + 1) faults.push(`level ${h.level} follows level ${headings[i - 1].level}: ${h.text}`);
          });
          for (const picture of document.querySelectorAll('img,svg')) {
            if (picture.closest('[aria-hidden=true]') || picture.parentElement.closest('svg')) {
              if (picture.textContent.trim() && picture.closest('[aria-hidden=true]') && !picture.closest('[role=img]')) faults.push('a picture with text is hidden from readers of the screen');
              continue;
            }
            const labelled = (picture.getAttribute('aria-labelledby') ?? '').split(' ').filter(id => id).map(id => document.getElementById(id)?.textContent ?? '').join(' ');
            const text = (picture.tagName === 'IMG' ? picture.alt : picture.getAttribute('aria-label') ?? labelled).trim();
            if (picture.tagName !== 'IMG' && picture.getAttribute('role') !== 'img') faults.push('a drawing without role="img"');
            if (!text) faults.push('a picture without a text in its place');
            else if (numbers && !/\d/.test(text)) faults.push(`a picture whose text holds no number: ${text}`);
          }
          return faults;
        }
        """;

    public static async Task<IReadOnlyList<string>> FaultsAsync(OpenPage page, bool numbersInPictures) => await page.AskAsync<string[]>(Script, numbersInPictures);
}
