using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html.Sections;

/// <summary>The sections of one source, view by view, in reading order.</summary>
internal static class SourceSections
{
    /// <summary>Views that hold at least one symbol, with their sections.</summary>
    public static IReadOnlyList<(ViewProfile View, IReadOnlyList<Section> Sections)> Of(DrawnSource source)
    {
        var views = new List<(ViewProfile, IReadOnlyList<Section>)>();
        for (int i = 0; i < (source.Profile.Views?.Count ?? 0); i++)
        {
            ViewProfile view = source.Profile.Views![i];
            if (view.Symbols == 0) continue;
            string record = string.Create(CultureInfo.InvariantCulture, $"/sources/{source.Place}/views/{i}");
            long bytes = source.Profile.Bytes ?? 0;
            Section?[] sections =
            [
                RatesSection.Of(view, record), OrderSection.Of(view, record), SymbolBlockSection.Of(view, record), TableBlockSection.Of(view, record, bytes),
                SegmentSection.Of(view, record, bytes), SymbolSection.Of(view, record), LimitSection.Of(view, record), PairSection.Of(view, record),
            ];
            views.Add((view, [.. sections.OfType<Section>()]));
        }
        return views;
    }
}
