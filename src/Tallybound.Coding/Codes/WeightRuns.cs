using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Huffman's construction over runs of equal weights: millions of symbols with few different counts cost as much as the counts.</summary>
/// <remarks>A run of t equal weights at the head of a queue makes ⌊t/2⌋ equal packages in one step, since nothing lighter can come between them. The order in which
/// leaves and packages are paired is that of <see cref="Huffman"/>, and so is the histogram of lengths.</remarks>
internal static class WeightRuns
{
    /// <summary>One step: packages made from two items each.</summary>
    /// <param name="First">Index of the run of the first item: leaves first, packages after them.</param>
    /// <param name="Second">Index of the run of the second item.</param>
    /// <param name="Made">How many packages.</param>
    private readonly record struct Step(int First, int Second, long Made);

    /// <summary>Builds the code.</summary>
    /// <param name="weights">Different weights, ascending, each above 0.</param>
    /// <param name="times">How many symbols have each, at least 1.</param>
    /// <param name="histogram">Takes the number of symbols of each length; 256 entries, cleared.</param>
    /// <param name="cost">Takes the weight of every package made; their sum is Σ weight × length.</param>
    public static void Build<TWeight, TCost>(ReadOnlySpan<TWeight> weights, ReadOnlySpan<long> times, Span<long> histogram, ref TCost cost)
        where TWeight : struct, INumber<TWeight>
        where TCost : struct, IPackageCost<TWeight>
    {
        if (weights.Length == 0) return;
        if (weights.Length == 1 && times[0] == 1)
        {
            histogram[1] = 1;
            cost.Add(weights[0], 1);
            return;
        }
        var steps = new List<Step>(2 * weights.Length);
        Merge(weights, times, steps, ref cost);
        Depths(weights.Length, steps, histogram);
    }

    private static void Merge<TWeight, TCost>(ReadOnlySpan<TWeight> weights, ReadOnlySpan<long> times, List<Step> steps, ref TCost cost)
        where TWeight : struct, INumber<TWeight>
        where TCost : struct, IPackageCost<TWeight>
    {
        int leaves = weights.Length, leaf = 0, package = 0;
        long leafLeft = times[0], packageLeft = 0;
        var packages = new List<(TWeight Weight, long Times)>(2 * leaves);
        while (true)
        {
            if (packageLeft == 0 && package < packages.Count) packageLeft = packages[package].Times;
            bool leafFirst = leaf < leaves && (packageLeft == 0 || weights[leaf] <= packages[package].Weight);
            TWeight weight = leafFirst ? weights[leaf] : packages[package].Weight;
            int first = leafFirst ? leaf : leaves + package;
            ref long left = ref leafFirst ? ref leafLeft : ref packageLeft;
            if (left > 1)
            {
                long made = left / 2;
                left -= 2 * made;
                TWeight pair = weight + weight;
                packages.Add((pair, made));
                steps.Add(new Step(first, first, made));
                cost.Add(pair, made);
            }
            else
            {
                left = 0;
                Advance(leafFirst, ref leaf, ref package, ref leafLeft, times);
                if (packageLeft == 0 && package < packages.Count) packageLeft = packages[package].Times;
                if (leaf == leaves && packageLeft == 0) return;
                bool secondLeaf = leaf < leaves && (packageLeft == 0 || weights[leaf] <= packages[package].Weight);
                TWeight sum = weight + (secondLeaf ? weights[leaf] : packages[package].Weight);
                packages.Add((sum, 1));
                steps.Add(new Step(first, secondLeaf ? leaf : leaves + package, 1));
                cost.Add(sum, 1);
                left = ref secondLeaf ? ref leafLeft : ref packageLeft;
                left--;
                if (left == 0) Advance(secondLeaf, ref leaf, ref package, ref leafLeft, times);
                continue;
            }
            if (left == 0) Advance(leafFirst, ref leaf, ref package, ref leafLeft, times);
        }
    }

    private static void Advance(bool ofLeaves, ref int leaf, ref int package, ref long leafLeft, ReadOnlySpan<long> times)
    {
        if (!ofLeaves)
        {
            package++;
            return;
        }
        leaf++;
        leafLeft = leaf < times.Length ? times[leaf] : 0;
    }

    /// <summary>Walks the steps from the root down. The items of a run are used up in order, so its depths are runs too; they are gathered last item first.</summary>
    private static void Depths(int leaves, List<Step> steps, Span<long> histogram)
    {
        var depths = new List<(int Depth, long Times)>?[steps.Count];
        depths[^1] = [(0, 1)];
        for (int step = steps.Count - 1; step >= 0; step--)
        {
            Step made = steps[step];
            foreach ((int depth, long times) in depths[step]!)
            {
                if (made.First == made.Second)
                {
                    Give(made.First, depth + 1, 2 * times, histogram);
                    continue;
                }
                Give(made.Second, depth + 1, times, histogram);
                Give(made.First, depth + 1, times, histogram);
            }
            depths[step] = null;
        }

        void Give(int run, int depth, long times, Span<long> into)
        {
            if (run < leaves)
            {
                into[depth] += times;
                return;
            }
            List<(int Depth, long Times)> list = depths[run - leaves] ??= new List<(int, long)>(1);
            if (list.Count > 0 && list[^1].Depth == depth) list[^1] = (depth, list[^1].Times + times);
            else list.Add((depth, times));
        }
    }
}

/// <summary>Adds up package weights in a number that can hold their sum.</summary>
internal interface IPackageCost<TWeight>
{
    /// <summary>Takes <paramref name="times"/> packages of one weight.</summary>
    void Add(TWeight weight, long times);
}

/// <summary>Σ count × length as an exact number of bits.</summary>
internal struct ExactCost : IPackageCost<long>
{
    /// <summary>The sum so far.</summary>
    public long Total { get; private set; }

    /// <exception cref="OverflowException">The sum does not fit a long.</exception>
    public void Add(long weight, long times) => Total = checked(Total + (weight * times));
}

/// <summary>Σ weight × length in floating point, for weights that are products.</summary>
internal struct ApproximateCost<TWeight> : IPackageCost<TWeight>
    where TWeight : struct, INumber<TWeight>
{
    /// <summary>The sum so far.</summary>
    public double Total { get; private set; }

    public void Add(TWeight weight, long times) => Total += double.CreateChecked(weight) * times;
}
