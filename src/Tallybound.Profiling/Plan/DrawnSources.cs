namespace Tallybound.Profiling.Plan;

/// <summary>Which sources may get a page, so that the counts for its drawings are kept: known from the plan, before sizes are final.</summary>
internal sealed class DrawnSources
{
    /// <summary>Sources with a page at most.</summary>
    public const int WithPage = 200;

    /// <summary>Sources with pair counts at most.</summary>
    public const int WithPairs = 10;

    private readonly HashSet<int> page;
    private readonly HashSet<int> pairs;

    public DrawnSources(RunPlan plan)
    {
        List<int> heaviest = [.. Enumerable.Range(0, plan.Entries.Count).Where(id => plan.Entries[id].Found?.Bytes is not null)
            .OrderByDescending(id => plan.Entries[id].Found!.Bytes).ThenBy(id => id).Take(WithPage)];
        page = [.. heaviest];
        pairs = [.. heaviest.Take(WithPairs)];
    }

    /// <summary>Whether a source may be among the heaviest; one of unknown size may.</summary>
    public bool MayHavePage(int id, PlanEntry entry) => entry.Found?.Bytes is null || page.Contains(id);

    /// <summary>Whether a source may be among the ten heaviest.</summary>
    public bool MayHavePairs(int id, PlanEntry entry) => entry.Found?.Bytes is null || pairs.Contains(id);
}
