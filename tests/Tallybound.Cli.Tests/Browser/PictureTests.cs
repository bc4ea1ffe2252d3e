using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Inline pictures in a real browser: the embedded type is used, and no text leaves its picture.</summary>
public sealed class PictureTests(Chromium chromium, HardRuns runs)
{
    private const string Script = """
        async () => {
          await document.fonts.ready;
          const faults = [];
          const svgs = [...document.querySelectorAll('svg[role=img]')];
          for (const weight of ['400', '700'])
            if (![...document.fonts].some(face => face.family.includes('Noto Sans') && face.weight === weight && face.status === 'loaded')) faults.push(`the face of weight ${weight} is not loaded`);
          let texts = 0;
          for (const svg of svgs) {
            const box = svg.getBoundingClientRect();
            const boxes = [];
            for (const text of svg.querySelectorAll('text')) {
              const t = text.getBoundingClientRect();
              if (t.width === 0) continue;
              texts++;
              if (t.left < box.left - 1 || t.right > box.right + 1 || t.top < box.top - 1 || t.bottom > box.bottom + 1) faults.push(`“${text.textContent}” leaves its picture`);
              for (const [other, o] of boxes)
                if (t.left < o.right - 2 && o.left < t.right - 2 && t.top < o.bottom - 6 && o.top < t.bottom - 6) faults.push(`“${text.textContent}” lies on “${other}”`);
              boxes.push([text.textContent, t]);
            }
          }
          return JSON.stringify({ faults, pictures: svgs.length, texts });
        }
        """;

    private sealed record Found(string[] Faults, int Pictures, int Texts);

    [Fact]
    public async Task No_text_of_an_inline_picture_leaves_it_or_lies_on_another()
    {
        ReportRun run = runs.Of("the demo corpus");
        int pictures = 0;
        await Faults.NoneAsync(chromium, run.SourcePages, [new PageView()], async page =>
        {
            Found found = JsonSerializer.Deserialize<Found>(await page.AskAsync<string>(Script), JsonSerializerOptions.Web)!;
            pictures += found.Pictures;
            return found.Pictures == 0 ? [] : found.Texts >= 8 * found.Pictures ? found.Faults : [.. found.Faults, $"only {found.Texts} texts in {found.Pictures} pictures"];
        });
        Assert.True(pictures >= 80, $"only {pictures} pictures");
    }
}
