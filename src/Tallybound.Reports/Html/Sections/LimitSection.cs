using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>What a limit on code lengths costs, beside the decode table it allows.</summary>
internal static class LimitSection
{
    /// <summary>Limits above this make a one-level decode table nobody would build.</summary>
    private const int LargestOneLevel = 24;

    /// <summary>Makes it; null where no limit was priced.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section? Of(ViewProfile view, string record)
    {
        List<(CodePrice Code, int Index)> limited = [.. view.Codes.Select((code, index) => (code, index)).Where(pair => pair.code is { Code: "huffman-limited", LengthLimit: not null, LimitCostBits: not null })];
        if (limited.Count == 0 && view.LimitsNotMet is null) return null;
        string message = limited.Count == 0 ? "No limit that was asked for can hold the symbols in use."
            : $"The free code's longest word has {(view.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2 })?.LongestCode ?? 0).ToString(CultureInfo.InvariantCulture)} bits. A decoder with one look-up table needs 2^limit entries, usually of 2 to 4 bytes.";
        foreach (LimitNotMet missed in view.LimitsNotMet ?? [])
            message += $" A limit of {missed.LengthLimit.ToString(CultureInfo.InvariantCulture)} bits cannot hold {SizeText.Count(view.SymbolsInUse)} symbols; {missed.ShortestPossible.ToString(CultureInfo.InvariantCulture)} bits is the least that can.";
        return new Section("limits", "Length limits", message)
        {
            Charts = limited.Count == 0 ? [] : [LengthLimitChart.Of(view)],
            Tables = limited.Count == 0 ? [] : [Limits(limited, record)],
            HowToRead = "The cost is payload over the free Huffman code. A limit at or above the free code's longest word costs nothing.",
        };
    }

    private static Table Limits(List<(CodePrice Code, int Index)> limited, string record)
    {
        var cost = new SizeColumn(limited.Select(pair => (long?)RatesSection.Bytes(pair.Code.LimitCostBits!.Value)));
        var total = new SizeColumn(limited.Select(pair => (long?)RatesSection.Bytes(pair.Code.TotalBits!.Value)));
        return new Table("Length-limited codes by limit.", [new("limit, bits"), new($"costs, {cost.Unit}"), new("symbols at the limit"), new($"total, {total.Unit}"), new("one-level decode table, entries")],
            [.. limited.Select(pair =>
            {
                string at = $"{record}/codes/{pair.Index.ToString(CultureInfo.InvariantCulture)}";
                int limit = pair.Code.LengthLimit!.Value;
                return new Row([NumberCells.Count(limit, at + "/lengthLimit"), cost.Of(RatesSection.Bytes(pair.Code.LimitCostBits!.Value), at + "/limitCostBits"), NumberCells.Count(pair.Code.SymbolsAtLimit, at + "/symbolsAtLimit"),
                    total.Of(RatesSection.Bytes(pair.Code.TotalBits!.Value), at + "/totalBits"), limit <= LargestOneLevel ? NumberCells.Count(1L << limit) : Cell.Empty]);
            })]);
    }
}
