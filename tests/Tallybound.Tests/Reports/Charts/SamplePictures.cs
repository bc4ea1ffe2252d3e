using Tallybound.Reports.Charts.Frame;
using Tallybound.Reports.Html.Corpus;
using Tallybound.Reports.Html.Sections;
using Tallybound.Reports.Json;
using Tallybound.Tests.Repository;

namespace Tallybound.Tests.Reports.Charts;

/// <summary>The pictures of the committed sample report, drawn anew from its record.</summary>
internal static class SamplePictures
{
    /// <summary>The sample's folder.</summary>
    public static string Folder { get; } = Path.Combine(Checkout.Root, "reports", "sample");

    /// <summary>What the sample is drawn from.</summary>
    public static ReportContent Content { get; } = RunDocument.Read(Path.Combine(Folder, "profile.json"));

    /// <summary>All pictures of the corpus page and of source pages, with the stem of their file.</summary>
    public static IEnumerable<(string Stem, Picture Picture)> All()
    {
        List<Chart> corpus = [CorpusSections.Front(Content), .. CorpusSections.Of(Content).SelectMany(section => section.Charts)];
        foreach (Chart chart in corpus) if (chart.Picture is { } picture) yield return ("corpus", picture);
        foreach (DrawnSource source in Content.Drawn)
            foreach ((_, IReadOnlyList<Section> sections) in SourceSections.Of(source))
                foreach (Chart chart in sections.SelectMany(section => section.Charts))
                    if (chart.Picture is { } picture) yield return ($"{source.Number:0000}", picture);
    }
}
