using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Findings;

/// <summary>All rules that judge one source, and what they find in it.</summary>
internal static class FindingRules
{
    /// <summary>The rules, in the order in which findings with equal bytes at stake stand.</summary>
    public static IReadOnlyList<IFindingRule> All => Rules;

    private static readonly IFindingRule[] Rules =
    [
        new TableEatsGain(),
        new OwnTableEatsGain(),
        new StaticTableDoes(),
        new IntegerLengthsLose(),
        new NearConstant(),
        new LimitCosts(),
        new LimitCostsNothing(),
        new Order1Structure(),
        new StatisticsChange(),
        new FixedCodeDoes(),
        new TernaryFits(),
        new AnotherView(),
        new AlreadyDense(),
        new StoreIt(),
    ];

    /// <summary>The rules that judge the whole of a run, in order of their ids.</summary>
    public static IReadOnlyList<ICorpusRule> OfCorpus { get; } = [new CodePerSource(), new Duplicates()];

    /// <summary>A source's findings, the most bytes at stake first, equal ones in the order of <see cref="All"/>; null when there are none.</summary>
    public static IReadOnlyList<Finding>? Of(SourceProfile source)
    {
        if (source.Views is not { Count: > 0 } views || views[0] is not { Symbols: > 0 } view) return null;
        List<Finding>? found = null;
        foreach (IFindingRule rule in Rules)
        {
            if (rule.Judge(source, view) is not { } finding) continue;
            found ??= [];
            // The rules are few, and a stable place is found by walking back over smaller ones.
            int at = found.Count;
            while (at > 0 && found[at - 1].BytesAtStake < finding.BytesAtStake) at--;
            found.Insert(at, finding);
        }
        return found;
    }
}
