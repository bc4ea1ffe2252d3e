namespace Tallybound.Profiling.Plan;

/// <summary>Which sources may get a page, so that the counts for its drawings are kept: known from the plan, before sizes are final.</summary>
internal sealed class DrawnSources
{
    /// <summary>Sources with a page at most.</summary>
    public const int WithPage = 200;

    /// <summary>Sources with pair counts at most.</summary>
    public const int WithPairs = 10;

    private readonly long pageFrom;
    private readonly long pairsFrom;

    public DrawnSources(RunPlan plan)
    {
        List<long> sizes = [.. plan.Entries.Where(entry => entry.Found?.Bytes is not null).Select(entry => entry.Found!.Bytes!.Value)];
        sizes.Sort((a, b) => b.CompareTo(a));
        pageFrom = sizes.Count > WithPage ? sizes[WithPage - 1] : 0;
        pairsFrom = sizes.Count > WithPairs ? sizes[WithPairs - 1] : 0;
    }

    /// <summary>Whether a source may be among the heaviest; one of unknown size may.</summary>
    public bool MayHavePage(PlanEntry entry) => entry.Found?.Bytes is not { } bytes || bytes >= pageFrom;

    /// <summary>Whether a source may be among the ten heaviest.</summary>
    public bool MayHavePairs(PlanEntry entry) => entry.Found?.Bytes is not { } bytes || bytes >= pairsFrom;
}
