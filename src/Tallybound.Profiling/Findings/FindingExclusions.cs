namespace Tallybound.Profiling.Findings;

/// <summary>Which findings speak of the same bytes: their savings must not be added.</summary>
internal static class FindingExclusions
{
    /// <summary>Groups within which each rule excludes every other one.</summary>
    private static readonly string[][] Groups =
    [
        // Each proposes something else than one Huffman table, and counts from that table's size or below it.
        ["own-table-eats-gain", "integer-lengths-lose", "near-constant", "order-1-structure", "statistics-change", "fixed-code-does", "ternary-fits", "another-view", "code-per-source"],
        // Blocks of one size or one table for all: both end where tables stop costing.
        ["table-eats-gain", "static-table-does"],
        // The best block size and the best stretches take the same changes of statistics in.
        ["table-eats-gain", "statistics-change"],
        // Storing saves the table of a code that does not pay for it.
        ["store-it", "own-table-eats-gain"],
        ["store-it", "already-dense"],
    ];

    private static readonly Dictionary<string, IReadOnlyList<string>> ById = Table();

    /// <summary>Ids that stand in a group.</summary>
    public static IEnumerable<string> All => ById.Keys;

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
