using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Adds findings of sources up, rule by rule, to the list of a run. Not safe for use from several threads at once.</summary>
internal sealed class CorpusFindings
{
    private readonly Dictionary<string, FindingTotal> totals = new(StringComparer.Ordinal);
    private long sourcesRead;
    private (string Name, IReadOnlyList<Finding>? Findings) only = ("", null);

    /// <summary>Adds a source that was read.</summary>
    public void Add(SourceProfile source)
    {
        sourcesRead++;
        only = (source.Name, source.Findings);
        foreach (Finding finding in source.Findings ?? [])
        {
            var one = FindingTotal.Of(source, finding);
            totals[finding.Id] = totals.TryGetValue(finding.Id, out FindingTotal? sum) ? sum.Plus(one) : one;
        }
    }

    /// <summary>The run's findings by bytes at stake, then by id. Of a single source they are that source's own, in its order.</summary>
    /// <param name="corpus">The whole of the run.</param>
    public IReadOnlyList<Finding> Finish(CorpusProfile corpus)
    {
        if (sourcesRead == 1) return [.. (only.Findings ?? []).Select(finding => finding with { Sources = 1, HeaviestSource = only.Name })];
        var found = new List<Finding>();
        foreach (IFindingRule rule in FindingRules.All)
            if (totals.TryGetValue(rule.Id, out FindingTotal? total)) found.Add(Of(rule, total));
        if (sourcesRead > 1) found.AddRange(FindingRules.OfCorpus.Select(rule => rule.Judge(corpus)).OfType<Finding>());
        return [.. found.OrderByDescending(finding => finding.BytesAtStake).ThenBy(finding => finding.Id, StringComparer.Ordinal)];
    }

    private static Finding Of(IFindingRule rule, FindingTotal total)
    {
        var evidence = new List<FindingEvidence>
        {
            Count("sources in which it holds", total.Sources, total.Sources == 1 ? "source" : "sources"),
            Count("size of these sources", total.Bytes, "bytes"),
        };
        if (total.BytesAtStake > 0) evidence.Add(Count("at stake in the source with the most", total.HeaviestBytesAtStake, "bytes"));
        return rule.Claim(rule.ClaimOfMany(total), total.BytesAtStake, evidence) with
        {
            BytesAtStakeInterval = total.Interval is (var low, var high) ? [low, high] : null,
            Sources = total.Sources,
            HeaviestSource = total.HeaviestSource,
        };
    }
}
