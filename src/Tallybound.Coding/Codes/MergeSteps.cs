namespace Tallybound.Coding.Codes;

/// <summary>The steps of a construction over runs of equal weights, kept small: there may be millions.</summary>
/// <param name="leaves">Runs of leaves; runs of packages are numbered after them, in the order of their steps.</param>
internal sealed class MergeSteps(int leaves)
{
    // Made once at the size that nearly all constructions need.
    private readonly List<(int First, int Second)> runs = new((leaves * 2) + 16);

    /// <summary>Adds a step.</summary>
    /// <param name="first">Run of the first item of each package.</param>
    /// <param name="second">Run of the second item; the same run where a run is paired with itself.</param>
    public void Add(int first, int second) => runs.Add((first, second));

    /// <summary>Adds to the histogram how many leaves have each depth, from the root of the last step down.</summary>
    /// <remarks>The items of a run are used up in order, so that its depths are runs too; most have one. They are gathered last item first.</remarks>
    public void CountDepths(Span<long> histogram)
    {
        var depths = new byte[runs.Count];
        var times = new long[runs.Count];
        Dictionary<int, List<(byte Depth, long Times)>>? more = null;
        (depths[^1], times[^1]) = (0, 1);
        for (int step = runs.Count - 1; step >= 0; step--)
        {
            Share(step, depths[step], times[step], histogram);
            if (more is null || !more.Remove(step, out List<(byte Depth, long Times)>? others)) continue;
            foreach ((byte depth, long count) in others) Share(step, depth, count, histogram);
        }

        void Share(int step, byte depth, long count, Span<long> into)
        {
            (int first, int second) = runs[step];
            byte below = checked((byte)(depth + 1));
            if (first == second)
            {
                Give(first, below, 2 * count, into);
                return;
            }
            Give(second, below, count, into);
            Give(first, below, count, into);
        }

        void Give(int run, byte depth, long count, Span<long> into)
        {
            if (run < leaves)
            {
                into[depth] += count;
                return;
            }
            int package = run - leaves;
            if (times[package] == 0 || (depths[package] == depth && more?.ContainsKey(package) != true))
            {
                depths[package] = depth;
                times[package] += count;
                return;
            }
            more ??= [];
            if (!more.TryGetValue(package, out List<(byte Depth, long Times)>? others)) more.Add(package, others = []);
            if (others.Count > 0 && others[^1].Depth == depth) others[^1] = (depth, others[^1].Times + count);
            else others.Add((depth, count));
        }
    }
}
