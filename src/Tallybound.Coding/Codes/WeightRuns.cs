using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Huffman's construction over runs of equal weights: millions of symbols with few different counts cost as much as the counts.</summary>
/// <remarks>A run of t equal weights at the head of a queue makes ⌊t/2⌋ equal packages in one step, since nothing lighter can come between them. The order in which
/// leaves and packages are paired is that of <see cref="Huffman"/>, and so is the histogram of lengths.</remarks>
internal static class WeightRuns
{
    /// <summary>Builds the code.</summary>
    /// <param name="weights">Different weights, ascending, each above 0.</param>
    /// <param name="times">How many symbols have each, at least 1.</param>
    /// <param name="histogram">Takes the number of symbols of each length; 256 entries, cleared. Empty: lengths are not wanted, and the steps need no memory.</param>
    /// <param name="cost">Takes the weight of every package made; their sum is Σ weight × length.</param>
    public static void Build<TWeight, TCost>(ReadOnlySpan<TWeight> weights, ReadOnlySpan<long> times, Span<long> histogram, ref TCost cost)
        where TWeight : struct, INumber<TWeight>
        where TCost : struct, IPackageCost<TWeight>
    {
        if (weights.Length == 0) return;
        if (weights.Length == 1 && times[0] == 1)
        {
            if (!histogram.IsEmpty) histogram[1] = 1;
            cost.Add(weights[0], 1);
            return;
        }
        MergeSteps? steps = histogram.IsEmpty ? null : new MergeSteps(weights.Length);
        Merge(weights, times, steps, ref cost);
        steps?.CountDepths(histogram);
    }

    private static void Merge<TWeight, TCost>(ReadOnlySpan<TWeight> weights, ReadOnlySpan<long> times, MergeSteps? steps, ref TCost cost)
        where TWeight : struct, INumber<TWeight>
        where TCost : struct, IPackageCost<TWeight>
    {
        var packages = new Queue<(TWeight Weight, long Times)>(weights.Length + 4);
        int leaf = 0, package = -1;
        long leafLeft = times[0], packageLeft = 0;
        TWeight packageWeight = default;
        while (true)
        {
            bool firstIsLeaf = TakesLeaf(weights);
            TWeight weight = firstIsLeaf ? weights[leaf] : packageWeight;
            int first = firstIsLeaf ? leaf : weights.Length + package;
            long left = firstIsLeaf ? leafLeft : packageLeft;
            if (left > 1)
            {
                Use(firstIsLeaf, left / 2 * 2, times);
                Add(weight + weight, left / 2, first, first, ref cost);
                continue;
            }
            Use(firstIsLeaf, 1, times);
            if (leaf == weights.Length && packageLeft == 0) return;
            bool secondIsLeaf = TakesLeaf(weights);
            TWeight sum = weight + (secondIsLeaf ? weights[leaf] : packageWeight);
            int second = secondIsLeaf ? leaf : weights.Length + package;
            Use(secondIsLeaf, 1, times);
            Add(sum, 1, first, second, ref cost);
        }

        bool TakesLeaf(ReadOnlySpan<TWeight> of) => leaf < of.Length && (packageLeft == 0 || of[leaf] <= packageWeight);

        // Takes items off the head of a queue, and brings the next run to the head when it is used up.
        void Use(bool ofLeaves, long items, ReadOnlySpan<long> leafTimes)
        {
            if (ofLeaves)
            {
                leafLeft -= items;
                if (leafLeft == 0 && ++leaf < leafTimes.Length) leafLeft = leafTimes[leaf];
                return;
            }
            packageLeft -= items;
            if (packageLeft == 0) NextPackage();
        }

        void Add(TWeight packed, long made, int one, int two, ref TCost to)
        {
            packages.Enqueue((packed, made));
            steps?.Add(one, two);
            to.Add(packed, made);
            if (packageLeft == 0) NextPackage();
        }

        void NextPackage()
        {
            if (!packages.TryDequeue(out (TWeight Weight, long Times) next)) return;
            package++;
            (packageWeight, packageLeft) = next;
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
