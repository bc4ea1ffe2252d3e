namespace Tallybound.Profiling.Findings;

/// <summary>Which findings speak of the same bytes: their savings must not be added.</summary>
internal static class FindingExclusions
{
    /// <summary>Groups within which each rule excludes every other one.</summary>
    private static readonly string[][] Groups =
    [
        // Blocks of one size or one table for all: both end where tables stop costing.
        ["table-eats-gain", "static-table-does"],
    ];

    private static readonly Dictionary<string, IReadOnlyList<string>> ById = Table();

    /// <summary>Ids that a rule excludes, in ordinal order; null: none.</summary>
    public static IReadOnlyList<string>? Of(string id) => ById.GetValueOrDefault(id);

    private static Dictionary<string, IReadOnlyList<string>> Table()
    {
        var found = new Dictionary<string, SortedSet<string>>(StringComparer.Ordinal);
        foreach (string[] group in Groups)
        {
            foreach (string id in group)
            {
                if (!found.TryGetValue(id, out SortedSet<string>? others)) found.Add(id, others = new SortedSet<string>(StringComparer.Ordinal));
                others.UnionWith(group);
            }
        }
        var table = new Dictionary<string, IReadOnlyList<string>>(StringComparer.Ordinal);
        foreach ((string id, SortedSet<string> others) in found) table.Add(id, [.. others.Where(other => other != id)]);
        return table;
    }
}
