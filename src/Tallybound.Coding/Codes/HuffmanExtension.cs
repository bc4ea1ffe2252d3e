using System.Numerics;
using System.Runtime.InteropServices;

namespace Tallybound.Coding.Codes;

/// <summary>The Huffman code of the n-th extension of a memoryless source: what coding n symbols as one wins back of the loss by whole lengths.</summary>
/// <param name="ExpectedBitsPerSymbol">Expected length ÷ n.</param>
/// <param name="LengthHistogram">How many of the m^n blocks get each length, 256 entries; null where there are more than 2^18 combinations of different counts, whose lengths would
/// take hundreds of megabytes to find for a table that no one sends.</param>
public sealed record HuffmanExtension(double ExpectedBitsPerSymbol, long[]? LengthHistogram)
{
    private const int SortedAsNumbersFrom = 256;

    /// <summary>Sums of weights of so many bits fit a long.</summary>
    private const int LongBits = 62;
    private const double ExactAtMost = 1 << 16;
    private const double LengthsAtMost = 1 << 18;

    /// <summary>The code of the extension.</summary>
    /// <param name="counts">n(s) of each symbol, at least one above 0.</param>
    /// <param name="blockLength">n, at least 1.</param>
    /// <remarks>Blocks whose symbols have the same counts weigh the same, so only combinations of different counts are listed, each with its number of blocks.
    /// Weights are exact products where N^n fits 128 bits and combinations are few, else floating point, which changes the rate by less than 1 part in 10^14.</remarks>
    public static HuffmanExtension Of(ReadOnlySpan<long> counts, int blockLength)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(blockLength, 1);
        CountGroups groups = CountGroups.Of(counts);
        long total = 0;
        foreach (long count in counts) total += count;
        if (total == 0) throw new ArgumentException("No symbol is in use; an extension needs one.", nameof(counts));
        double combinations = Combinations(groups.Counts.Length, blockLength);
        long[]? histogram = combinations <= LengthsAtMost ? new long[256] : null;
        int bits = (BitOperations.Log2((ulong)total) + 1) * blockLength;
        double cost = bits <= LongBits ? Cost(groups, blockLength, count => count, histogram)
            : bits <= 128 && combinations <= ExactAtMost ? Cost(groups, blockLength, count => (UInt128)count, histogram)
            : Cost(groups, blockLength, count => (double)count, histogram);
        return new HuffmanExtension(cost / Math.Pow(total, blockLength) / blockLength, histogram);
    }

    private static double Cost<TWeight>(CountGroups groups, int blockLength, Func<long, TWeight> weightOf, long[]? histogram)
        where TWeight : struct, INumber<TWeight>
    {
        TWeight[] bases = Array.ConvertAll(groups.Counts, count => weightOf(count));
        int combinations = checked((int)Combinations(bases.Length, blockLength));
        var sorted = new TWeight[combinations];
        var many = new long[combinations];
        int listed = 0;
        List(bases, groups.Times, blockLength, 0, TWeight.One, 1, sorted, many, ref listed);
        Sort(sorted, many);
        int used = Unite(sorted, many);
        ApproximateCost<TWeight> cost = default;
        WeightRuns.Build<TWeight, ApproximateCost<TWeight>>(sorted.AsSpan(0, used), many.AsSpan(0, used), histogram, ref cost);
        return cost.Total;
    }

    /// <summary>Lists each multiset of n count groups once, with the number of blocks that have it.</summary>
    private static void List<TWeight>(TWeight[] bases, long[] sizes, int left, int from, TWeight weight, long blocks, TWeight[] weights, long[] times, ref int listed)
        where TWeight : struct, INumber<TWeight>
    {
        if (left == 0)
        {
            (weights[listed], times[listed++]) = (weight, blocks);
            return;
        }
        if (from == bases.Length - 1)
        {
            for (int i = 0; i < left; i++) (weight, blocks) = (weight * bases[from], blocks * sizes[from]);
            (weights[listed], times[listed++]) = (weight, blocks);
            return;
        }
        for (int take = 0; take <= left; take++)
        {
            // The places of the symbols taken: a binomial of what is left; the size of the group for each.
            List(bases, sizes, left - take, from + 1, weight, blocks * Binomial(left, take), weights, times, ref listed);
            (weight, blocks) = (weight * bases[from], blocks * sizes[from]);
        }
    }

    /// <summary>Sorts by weight. The bits of a positive floating-point number rise with it, so both it and a long are sorted as whole numbers.</summary>
    private static void Sort<TWeight>(TWeight[] weights, long[] times)
        where TWeight : struct, INumber<TWeight>
    {
        if (weights.Length > SortedAsNumbersFrom && (typeof(TWeight) == typeof(double) || typeof(TWeight) == typeof(long)))
            RadixSort.ByWeight(times.AsSpan(), MemoryMarshal.Cast<TWeight, long>(weights.AsSpan()));
        else Array.Sort(weights, times);
    }

    private static int Unite<TWeight>(TWeight[] weights, long[] times)
        where TWeight : struct, INumber<TWeight>
    {
        int used = 0;
        for (int i = 0; i < weights.Length; i++)
        {
            if (used > 0 && weights[used - 1] == weights[i])
            {
                times[used - 1] += times[i];
                continue;
            }
            (weights[used], times[used]) = (weights[i], times[i]);
            used++;
        }
        return used;
    }

    /// <summary>Multisets of n out of the groups.</summary>
    private static double Combinations(int groups, int n)
    {
        double value = 1;
        for (int i = 1; i <= n; i++) value = value * (groups + i - 1) / i;
        return Math.Round(value);
    }

    private static long Binomial(int n, int k)
    {
        long value = 1;
        for (int i = 1; i <= k; i++) value = value * (n - k + i) / i;
        return value;
    }
}
