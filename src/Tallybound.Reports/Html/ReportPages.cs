using System.Collections.Concurrent;
using System.Runtime.ExceptionServices;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Charts.Frame;
using Tallybound.Reports.Files;
using Tallybound.Reports.Html.Corpus;
using Tallybound.Reports.Html.Pages;
using Tallybound.Reports.Html.Sections;
using Tallybound.Reports.Json;
using Tallybound.Reports.Run;

namespace Tallybound.Reports.Html;

/// <summary>Draws a report: <c>index.html</c>, a page for each heavy source, and pictures for slides.</summary>
internal static class ReportPages
{
    private const int SourcesWithPictures = 10;
    private const int MostThreads = 4;

    /// <summary>Draws it into a run folder.</summary>
    /// <param name="folder">The run folder.</param>
    /// <param name="content">What it is drawn from.</param>
    /// <param name="pictures">Which pictures are written as files.</param>
    /// <exception cref="IOException">A file cannot be written.</exception>
    public static void Draw(string folder, ReportContent content, PictureChoice pictures)
    {
        string charts = Path.Combine(folder, "charts"), sources = Path.Combine(folder, "sources");
        var written = new ConcurrentBag<string>();
        Directory.CreateDirectory(charts);
        Directory.CreateDirectory(sources);
        using (var renderer = new PageRenderer()) DrawCorpus(folder, charts, content, renderer, written);
        var threads = new ParallelOptions { MaxDegreeOfParallelism = Math.Clamp(Environment.ProcessorCount, 1, MostThreads) };
        try
        {
            Parallel.ForEach(content.Drawn, threads, static () => new PageRenderer(), (source, _, own) =>
            {
                DrawSource(folder, charts, content, source, own, pictures == PictureChoice.All || source.Number <= SourcesWithPictures ? written : null);
                return own;
            }, static own => own.Dispose());
        }
        catch (AggregateException failures)
        {
            ExceptionDispatchInfo.Throw(failures.InnerExceptions[0]);
        }
        DrawnFiles.RemoveOthers(sources, [.. content.Drawn.Select(source => SourceFile.Stem(source) + ".html")]);
        DrawnFiles.RemoveOthers(charts, written);
    }

    private static void DrawCorpus(string folder, string charts, ReportContent content, PageRenderer renderer, ConcurrentBag<string> written)
    {
        Chart front = CorpusSections.Front(content);
        IReadOnlyList<Section> sections = CorpusSections.Of(content);
        WritePictures(charts, "corpus", [front, .. sections.SelectMany(section => section.Charts)], written);
        renderer.Write<CorpusPage>(Path.Combine(folder, "index.html"), new()
        {
            [nameof(CorpusPage.Content)] = content,
            [nameof(CorpusPage.Front)] = front,
            [nameof(CorpusPage.Sections)] = sections,
        });
        Release(sections);
        front.Picture?.Dispose();
    }

    private static void DrawSource(string folder, string charts, ReportContent content, DrawnSource source, PageRenderer renderer, ConcurrentBag<string>? written)
    {
        var views = SourceSections.Of(source);
        renderer.Write<SourcePage>(Path.Combine(folder, SourceFile.Of(source)), new()
        {
            [nameof(SourcePage.Content)] = content,
            [nameof(SourcePage.Source)] = source,
            [nameof(SourcePage.Views)] = views,
        });
        for (int i = 0; i < views.Count; i++)
        {
            string stem = i == 0 ? SourceFile.Stem(source) : $"{SourceFile.Stem(source)}-{views[i].View.View}";
            if (written is not null) WritePictures(charts, stem, [.. views[i].Sections.SelectMany(section => section.Charts)], written);
            Release(views[i].Sections);
        }
    }

    private static void WritePictures(string charts, string stem, IReadOnlyList<Chart> drawn, ConcurrentBag<string> written)
    {
        foreach (Chart chart in drawn)
        {
            if (chart.Picture is not { } picture) continue;
            string name = $"{stem}-{picture.Slug}.png";
            WholeFile.Write(Path.Combine(charts, name), stream => stream.Write(picture.ToPng()));
            written.Add(name);
        }
    }

    private static void Release(IReadOnlyList<Section> sections)
    {
        foreach (Section section in sections) foreach (Chart chart in section.Charts) chart.Picture?.Dispose();
    }
}
