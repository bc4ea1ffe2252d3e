using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Sections;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>The sections behind page one: of the whole where there are several sources, of the source where there is one.</summary>
internal static class CorpusSections
{
    /// <summary>In reading order; none where nothing was read.</summary>
    public static IReadOnlyList<Section> Of(ReportContent content)
    {
        if (content.Corpus.Bytes == 0) return [];
        IReadOnlyList<DrawnSource> withBytes = [.. content.Drawn.Where(source => source.Profile.Bytes > 0)];
        if (withBytes.Count == 1) return [.. SourceSections.Of(withBytes[0]).Take(1).SelectMany(view => view.Sections)];
        Section ranking = new("ranking", "Heaviest sources", "Where the bytes are, and what each of the heaviest sources is with its own best code.") { Charts = [RankingChart.Of(content.Corpus, content.Listed)] };
        return
        [
            CorpusRatesSection.Of(content.Corpus), ranking, HeaviestSections.Orders(withBytes), HeaviestSections.Blocks(withBytes),
            HeaviestSections.Drift(withBytes), HeaviestSections.Symbols(withBytes),
        ];
    }
}
