using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Page one: the whole corpus under each code, tables and framing included, with bounds as rules.</summary>
internal static class CorpusSizesChart
{
    /// <summary>Draws it.</summary>
    public static Chart Of(CorpusProfile corpus)
    {
        if (corpus.Bytes == 0) return Chart.Instead("Nothing was read, so there are no sizes to draw.");
        (double scale, string unit) = ByteScale.For(corpus.Bytes);
        string best = corpus.Verdict?.Code ?? "raw";
        corpus.Totals.TryGetValue("huffman", out long free);
        List<KeyValuePair<string, long>> totals = [.. corpus.Totals.Where(total => !(total.Value == free && total.Key.StartsWith("huffman-limited-", StringComparison.Ordinal))).OrderBy(total => RankOf(total.Key))];
        List<BarRow> rows = [.. totals.Select(total => new BarRow(
            total.Key == "raw" ? "as it stands" : CodeText.Of(total.Key), total.Key == "bestPerSource" ? CodeFamily.Raw : Tones.FamilyOf(total.Key), total.Value / scale, 0, 0,
            $"{SizeText.Bytes(total.Value)}  {SizeText.Ratio(corpus.Bytes, total.Value)}", total.Key == best))];
        List<BoundRule> bounds = Bounds(corpus, scale, [.. totals.Select(total => total.Key)]);
        Verdict? verdict = corpus.Verdict;
        string title = verdict is null || verdict.Code == "raw"
            ? "No code priced here makes the whole smaller"
            : $"{CodeText.AtTheStart(verdict.Code)} is the smallest single choice: {SizeText.Bytes(verdict.CodedBytes)} of {SizeText.Bytes(verdict.RawBytes)}";
        string alternative = $"{title}. " + string.Join("; ", rows.Select(row => $"{row.Label} {row.Value.Replace("  ", ", ", StringComparison.Ordinal)}")) + ". " + string.Join("; ", bounds.Select(bound => bound.Label)) + ".";
        return Chart.Of(SizeBars.Draw("sizes", title, $"{unit} of the whole, tables and framing included, no source larger than stored; raw ÷ coded at the right", alternative, rows, bounds));
    }

    /// <summary>Memoryless codes together, so that their bound spans neighbours.</summary>
    private static int RankOf(string key) => key == "raw" ? 0 : key == "bestPerSource" ? 3 : Memoryless(key) ? 1 : 2;

    private static List<BoundRule> Bounds(CorpusProfile corpus, double scale, string[] keys)
    {
        if (corpus.Bounds is not { } bounds) return [];
        int first = Array.FindIndex(keys, Memoryless), last = Array.FindLastIndex(keys, Memoryless);
        if (first < 0) return [];
        long bytes = (bounds.Order0BoundBits + 7) / 8;
        return [new BoundRule(bytes / scale, first, last, $"static order-0 bounds of the sources, added up: {SizeText.Bytes(bytes)}")];
    }

    private static bool Memoryless(string key) => key != "bestPerSource" && Tones.FamilyOf(key) is CodeFamily.Fixed or CodeFamily.Huffman or CodeFamily.Arithmetic;
}
