using System.Globalization;
using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Json;

/// <summary>Checks what a record's types do not say, so that whoever draws it meets no list of another length.</summary>
internal static class RecordShape
{
    private const int PairLength = 2;

    /// <summary>What is wrong with a source's record; null: nothing is.</summary>
    public static string? Fault(SourceProfile profile)
    {
        if (profile.Bytes < 0) return "bytes is below 0";
        foreach (ViewProfile view in profile.Views ?? [])
            if (Fault(view) is { } fault) return $"view {view.View}: {fault}";
        return Fault(profile.Findings ?? []);
    }

    /// <summary>What is wrong with findings; null: nothing is.</summary>
    public static string? Fault(IReadOnlyList<Finding> findings)
    {
        foreach (Finding finding in findings)
        {
            if (finding.BytesAtStake < 0) return $"finding {finding.Id}: bytesAtStake is below 0";
            if (finding.BytesAtStakeInterval is { Length: not PairLength }) return $"finding {finding.Id}: bytesAtStakeInterval holds no pair";
            if (finding.Evidence.Count == 0) return $"finding {finding.Id}: evidence is empty";
        }
        return null;
    }

    private static string? Fault(ViewProfile view)
    {
        if (view.Orders.Any(order => order.EntropyBitsPerSymbolInterval is { Length: not PairLength })) return "entropyBitsPerSymbolInterval holds no pair";
        if (view.TableBlocks is { } blocks && blocks.Any(block => block.TotalBitsInterval is { Length: not PairLength })) return "totalBitsInterval holds no pair";
        if (view.Segments is { } segments && !SameLength(segments)) return "the lists of segments differ in length";
        if (view.SymbolCounts is { } counts && !InAlphabet(counts, view.AlphabetSize)) return "symbolCounts holds symbols outside the alphabet";
        if (view.CodeLengths is { } lengths && !InAlphabet(lengths, view.AlphabetSize)) return "codeLengths holds symbols outside the alphabet";
        if (view.PairCounts is { } contexts && !contexts.All(context => InAlphabet(context.Key, context.Value, view.AlphabetSize))) return "pairCounts holds no pairs of the alphabet's symbols";
        return null;
    }

    private static bool SameLength(SegmentSeries segments) =>
        segments.SourceTableBits.Count == segments.OwnTableBits.Count && segments.PreviousTableBits.Count == segments.OwnTableBits.Count &&
        segments.DivergenceBits.Count == segments.OwnTableBits.Count;

    private static bool InAlphabet(SymbolSeries series, long size) =>
        (series.Dense?.Length ?? 0) <= size && (series.Pairs ?? []).All(pair => InAlphabet(pair[0], size));

    private static bool InAlphabet(string context, IReadOnlyList<long[]> counts, long size) =>
        long.TryParse(context, NumberStyles.None, CultureInfo.InvariantCulture, out long before) && InAlphabet(before, size) &&
        counts.All(pair => pair.Length == PairLength && InAlphabet(pair[0], size));

    private static bool InAlphabet(long symbol, long size) => symbol >= 0 && symbol < size;
}
