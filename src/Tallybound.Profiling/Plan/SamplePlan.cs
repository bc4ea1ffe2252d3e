namespace Tallybound.Profiling.Plan;

/// <summary>Which windows of a source stand for all of it: those with the smallest hashes of (seed, window index).</summary>
/// <remarks>One rule for known and unknown lengths: the windows kept of a stream are those that would have been chosen had its length been known.
/// Everything that looks at a sample looks at these windows.</remarks>
public readonly record struct SamplePlan(long Seed)
{
    /// <summary>Bytes of a window; windows are aligned to this, and only whole windows are taken.</summary>
    public const int WindowBytes = 1 << 20;

    /// <summary>Windows taken at most.</summary>
    public const int MostWindows = 64;

    /// <summary>The hash by which windows are ranked: a 64-bit finaliser of seed and index (Steele, Lea &amp; Flood 2014, SplitMix).</summary>
    public ulong Rank(long window)
    {
        ulong z = unchecked(((ulong)Seed * 0x9E3779B97F4A7C15UL) + ((ulong)window * 0xD1B54A32D192ED03UL) + 0x9E3779B97F4A7C15UL);
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9UL;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EBUL;
        return z ^ (z >> 31);
    }

    /// <summary>The windows taken of a source of known length, ascending; empty where it holds no whole window.</summary>
    /// <param name="bytes">Length of the source.</param>
    public long[] Choose(long bytes)
    {
        long windows = bytes / WindowBytes;
        var kept = new PriorityQueue<long, (ulong Rank, long Window)>(Comparer<(ulong, long)>.Create((a, b) => b.CompareTo(a)));
        for (long window = 0; window < windows; window++)
        {
            kept.Enqueue(window, (Rank(window), window));
            if (kept.Count > MostWindows) kept.Dequeue();
        }
        long[] chosen = [.. kept.UnorderedItems.Select(item => item.Element)];
        Array.Sort(chosen);
        return chosen;
    }
}
