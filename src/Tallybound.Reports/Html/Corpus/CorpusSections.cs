using Tallybound.Reports.Charts;
using Tallybound.Reports.Charts.Frame;
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
        IReadOnlyList<DrawnSource> withBytes = WithBytes(content);
        if (withBytes.Count == 1) return OfOne(withBytes[0]);
        Section ranking = new("ranking", "Heaviest sources", "Where the bytes are, and what each of the heaviest sources is with its own best code.") { Charts = [RankingChart.Of(content.Corpus, content.Listed)] };
        return
        [
            CorpusRatesSection.Of(content.Corpus), ranking, HeaviestSections.Orders(withBytes), HeaviestSections.Blocks(withBytes),
            HeaviestSections.Drift(withBytes), HeaviestSections.Symbols(withBytes),
        ];
    }

    /// <summary>The picture of page one: sizes of the whole, or the rates of the one source there is.</summary>
    public static Chart Front(ReportContent content) =>
        WithBytes(content) is [{ Profile.Views: [{ Symbols: > 0 } view, ..] }] ? RatesChart.Of(view) : CorpusSizesChart.Of(content.Corpus);

    /// <summary>Its rates are drawn on page one already.</summary>
    private static IReadOnlyList<Section> OfOne(DrawnSource source) =>
        [.. SourceSections.Of(source).Take(1).SelectMany(view => view.Sections).Select(section => section.Id == "rates" ? section with { Charts = [] } : section)];

    private static IReadOnlyList<DrawnSource> WithBytes(ReportContent content) => [.. content.Drawn.Where(source => source.Profile.Bytes > 0)];
}
