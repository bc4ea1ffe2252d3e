using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>Which symbol follows which; in the ten heaviest sources.</summary>
internal static class PairSection
{
    private const int Shown = 20;

    /// <summary>Makes it; null where the record keeps no pair counts.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section? Of(ViewProfile view, string record)
    {
        if (view.PairCounts is not { Count: > 0 } pairs) return null;
        List<Pair> heaviest = [.. pairs.SelectMany(row => row.Value.Select((pair, index) => new Pair(int.Parse(row.Key, CultureInfo.InvariantCulture), (int)pair[0], pair[1], index)))
            .OrderByDescending(pair => pair.Count).ThenBy(pair => pair.Before).ThenBy(pair => pair.Symbol).Take(Shown)];
        double share = view.Symbols > 1 ? (double)heaviest.Sum(pair => pair.Count) / (view.Symbols - 1) : 0;
        return new Section("pairs", "Symbol pairs", $"The {heaviest.Count.ToString(CultureInfo.InvariantCulture)} most frequent pairs make up {(100 * share).ToString("0.0", CultureInfo.InvariantCulture)} % of all.")
        {
            Charts = [PairHeatMap.Of(view)],
            Tables = [Pairs(view, heaviest, record)],
            HowToRead = "Rows of the map are the symbol before, columns the symbol that follows. If neighbours were independent, every row would have the same pattern.",
        };
    }

    private static Table Pairs(ViewProfile view, List<Pair> heaviest, string record) => new("The most frequent pairs.", [new("symbol before", IsText: true), new("symbol", IsText: true), new("count"), new("share of pairs, %")],
        [.. heaviest.Select(pair => new Row(
        [
            new Cell(SymbolText.Of(view, pair.Before)) { SortKey = pair.Before.ToString(CultureInfo.InvariantCulture) }, new Cell(SymbolText.Of(view, pair.Symbol)) { SortKey = pair.Symbol.ToString(CultureInfo.InvariantCulture) },
            new Cell(SizeText.Count(pair.Count)) { Record = string.Create(CultureInfo.InvariantCulture, $"{record}/pairCounts/{pair.Before}/{pair.Index}/1"), Unit = "count" },
            new Cell((100.0 * pair.Count / (view.Symbols - 1)).ToString("0.00", CultureInfo.InvariantCulture)),
        ]))]);

    private readonly record struct Pair(int Before, int Symbol, long Count, int Index);
}
