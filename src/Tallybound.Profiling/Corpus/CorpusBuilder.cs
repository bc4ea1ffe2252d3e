using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Corpus;

/// <summary>Adds records up to the whole of a run. Sums are integers, so the order of records never matters.</summary>
internal sealed class CorpusBuilder
{
    /// <summary>Sets of equal sources listed at most.</summary>
    public const int DuplicateSets = 100;

    private const int DuplicateNames = 20;
    private const int AdaptiveOrders = 3;

    private readonly Lock gate = new();
    private readonly Dictionary<string, CodeTotal> totals = new(StringComparer.Ordinal);
    private readonly List<double> huffmanRates = [];
    private readonly long[] byStatus = new long[Enum.GetValues<SourceStatus>().Length];
    private long bytes;
    private long storedBytes;
    private long bestBytes;
    private readonly long[] adaptiveBits = new long[AdaptiveOrders];
    private readonly bool[] anyAdaptive = new bool[AdaptiveOrders];
    private long order0BoundBits;
    private readonly CorpusFindings findings = new();
    private long empty;

    /// <summary>Adds one record. May be called from any thread.</summary>
    public void Add(SourceProfile profile)
    {
        lock (gate)
        {
            byStatus[(int)profile.Status]++;
            if (profile.Views is not { Count: > 0 } views) return;
            bytes += profile.Bytes ?? 0;
            if (profile.Bytes == 0) empty++;
            AddView(views[0], profile.Bytes ?? 0);
            findings.Add(profile);
        }
    }

    /// <summary>The roll-up of all that was added.</summary>
    /// <param name="ledger">Where duplicates are looked up.</param>
    /// <param name="excludedByRule">Names that no record stands for.</param>
    public CorpusProfile Finish(RunLedger ledger, long excludedByRule)
    {
        IReadOnlyList<DuplicateSet> duplicates = ledger.Duplicates(DuplicateSets, DuplicateNames);
        IReadOnlyDictionary<string, long> ordered = OrderedTotals();
        long read = byStatus[(int)SourceStatus.Profiled] + byStatus[(int)SourceStatus.Partial];
        return new CorpusProfile
        {
            Sources = byStatus.Sum(),
            Profiled = byStatus[(int)SourceStatus.Profiled],
            Partial = byStatus[(int)SourceStatus.Partial],
            Failed = byStatus[(int)SourceStatus.Failed],
            Skipped = byStatus[(int)SourceStatus.Skipped],
            ExcludedByRule = excludedByRule,
            Empty = empty,
            Bytes = bytes,
            Totals = ordered,
            Bounds = bytes == 0 ? null : new CorpusBounds(order0BoundBits, Adaptive(0), Adaptive(1), Adaptive(2)),
            Verdict = bytes == 0 ? null : VerdictRule.Of(ordered, read),
            Quantiles = Quantiles(),
            Duplicates = duplicates.Count == 0 ? null : duplicates,
        };
    }

    /// <summary>What the figures say of the whole, by bytes at stake, then by id; of a single source, its own findings. Empty when nothing fires.</summary>
    /// <param name="corpus">The roll-up of all that was added.</param>
    public IReadOnlyList<Finding> Findings(CorpusProfile corpus)
    {
        lock (gate) return findings.Finish(corpus);
    }

    private long? Adaptive(int order) => anyAdaptive[order] ? adaptiveBits[order] : null;

    private void AddBounds(ViewProfile view)
    {
        if (view.Orders.Count > 0) order0BoundBits += (long)Math.Round(view.Orders[0].EntropyBitsPerSymbol * view.Symbols);
        for (int order = 0; order < AdaptiveOrders; order++)
        {
            double? rate = order < view.Orders.Count ? view.Orders[order].AdaptiveBitsPerSymbol : null;
            anyAdaptive[order] |= rate is not null;
            adaptiveBits[order] += rate is { } bits ? (long)Math.Round(bits * view.Symbols) : view.RawBits;
        }
    }

    private void AddView(ViewProfile view, long sourceBytes)
    {
        long stored = view.StoredTotalBits / 8;
        storedBytes += stored;
        bestBytes += CodeChoice.Cheapest(view).TotalBits / 8;
        AddBounds(view);
        foreach (CodePrice code in view.Codes)
        {
            if (code.TotalBits is not { } bits) continue;
            string key = CodeChoice.KeyOf(code);
            totals.TryGetValue(key, out CodeTotal total);
            totals[key] = new CodeTotal(total.Taken + Math.Min(bits / 8, stored), total.StoredOfThese + stored);
            if (key == "huffman" && sourceBytes > 0) huffmanRates.Add((double)bits / sourceBytes);
        }
    }

    /// <summary>A source that does not have a code takes its stored size under it.</summary>
    private OrderedDictionary<string, long> OrderedTotals()
    {
        var ordered = new OrderedDictionary<string, long>(StringComparer.Ordinal) { ["raw"] = bytes };
        if (storedBytes > 0)
        {
            foreach ((string key, CodeTotal total) in totals.OrderBy(entry => CodeOrder.RankOf(entry.Key)))
                ordered[key] = total.Taken + (storedBytes - total.StoredOfThese);
        }
        ordered["bestPerSource"] = bestBytes;
        return ordered;
    }

    private CorpusQuantiles? Quantiles()
    {
        if (huffmanRates.Count == 0) return null;
        huffmanRates.Sort();
        return new CorpusQuantiles(At(0.05), At(0.25), At(0.5), At(0.75), At(0.95));
    }

    /// <summary>Nearest rank: the ⌈q·n⌉-th smallest.</summary>
    private double At(double quantile) => huffmanRates[Math.Max(0, (int)Math.Ceiling(quantile * huffmanRates.Count) - 1)];

    private readonly record struct CodeTotal(long Taken, long StoredOfThese);
}
