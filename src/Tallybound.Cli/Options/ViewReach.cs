using Tallybound.Profiling.Plan;

namespace Tallybound.Cli.Options;

/// <summary>How far each view is counted exactly, so that what nothing could answer is not asked for in vain.</summary>
internal static class ViewReach
{
    /// <summary>View, highest context order, longest symbol block: tables of at most 2^24 counters.</summary>
    private static readonly (string View, int Order, int Block)[] Reaches =
    [
        (ViewNames.Bytes, 2, 3),
        (ViewNames.Nibbles, 5, 6),
        (ViewNames.Bits, 23, 24),
        (ViewNames.WordsLittleEndian, 0, 1),
        (ViewNames.WordsBigEndian, 0, 1),
    ];

    /// <summary>The highest order of any view.</summary>
    public static int HighestOrder => Reaches.Max(reach => reach.Order);

    /// <summary>The longest block of any view.</summary>
    public static int LongestBlock => Reaches.Max(reach => reach.Block);

    /// <summary>Refuses an order that none of the views reaches.</summary>
    /// <exception cref="UsageException">None of them does.</exception>
    public static void CheckOrder(int order, IReadOnlyList<string> views)
    {
        if (Array.Exists(Reaches, reach => reach.Order >= order && views.Contains(reach.View))) return;
        throw new UsageException($"--order {order}: {Told(views, reach => reach.Order)}; give a lower order, or another --view");
    }

    /// <summary>Refuses a block length that none of the views reaches.</summary>
    /// <exception cref="UsageException">None of them does.</exception>
    public static void CheckBlockLength(int length, IReadOnlyList<string> views)
    {
        if (Array.Exists(Reaches, reach => reach.Block >= length && views.Contains(reach.View))) return;
        throw new UsageException($"--block-length {length}: {Told(views, reach => reach.Block)}; give a smaller length, or another --view");
    }

    private static string Told(IReadOnlyList<string> views, Func<(string View, int Order, int Block), int> limit) =>
        string.Join(", ", Reaches.Where(reach => views.Contains(reach.View)).Select(reach => $"{reach.View} reach {limit(reach)}"));
}
