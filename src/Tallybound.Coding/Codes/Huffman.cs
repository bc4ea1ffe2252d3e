using System.Buffers;

namespace Tallybound.Coding.Codes;

/// <summary>Optimal prefix codes by D. Huffman, A Method for the Construction of Minimum-Redundancy Codes, Proc. IRE 40 (1952), in any radix.</summary>
/// <remarks>Built by two queues over sorted weights (van Leeuwen 1976; Moffat &amp; Katajainen 1995): a leaf goes before a package of equal weight, packages first in first out.
/// The lengths are then handed out by rank, the longest to the lowest (count, symbol), so that equal counts give equal tables everywhere.</remarks>
public static class Huffman
{
    /// <summary>No code of counts that fit a long is longer.</summary>
    public const int LongestPossible = 91;

    /// <summary>Lengths of an optimal code, in digits.</summary>
    /// <param name="counts">n(s) of each symbol, at least 0; their sum fits a long.</param>
    /// <param name="lengths">Takes one length a symbol: 0 for a symbol not in use; 1 where one symbol alone is in use.</param>
    /// <param name="radix">Digits of the channel, 2 to 16.</param>
    public static void Lengths(ReadOnlySpan<long> counts, Span<byte> lengths, int radix = 2)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(radix, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(radix, 16);
        if (lengths.Length != counts.Length) throw new ArgumentException($"There are {counts.Length} counts and room for {lengths.Length} lengths.", nameof(lengths));
        lengths.Clear();
        int used = counts.Length - counts.Count(0L);
        if (used == 0) return;
        int[] symbols = ArrayPool<int>.Shared.Rent(used);
        long[] weights = ArrayPool<long>.Shared.Rent(used);
        try
        {
            SortedWeights.Gather(counts, symbols.AsSpan(0, used), weights.AsSpan(0, used));
            Span<int> histogram = stackalloc int[256];
            Histogram(weights.AsSpan(0, used), radix, histogram);
            LengthRanks.HandOut(symbols.AsSpan(0, used), histogram, lengths);
        }
        finally
        {
            ArrayPool<int>.Shared.Return(symbols);
            ArrayPool<long>.Shared.Return(weights);
        }
    }

    /// <summary>Σ count × length: digits of the coded symbols.</summary>
    /// <exception cref="OverflowException">The total does not fit a long.</exception>
    public static long PayloadDigits(ReadOnlySpan<long> counts, ReadOnlySpan<byte> lengths)
    {
        long total = 0;
        for (int i = 0; i < counts.Length; i++) total = checked(total + (counts[i] * lengths[i]));
        return total;
    }

    /// <summary>How many symbols get each length, from ascending weights.</summary>
    internal static void Histogram(ReadOnlySpan<long> weights, int radix, Span<int> histogram)
    {
        int leaves = weights.Length;
        if (leaves == 1)
        {
            histogram[1] = 1;
            return;
        }
        int dummies = (radix - 1 - ((leaves - 1) % (radix - 1))) % (radix - 1);
        int packages = (leaves + dummies - 1) / (radix - 1);
        long[] sums = ArrayPool<long>.Shared.Rent(packages);
        int[] parents = ArrayPool<int>.Shared.Rent(leaves + packages);
        try
        {
            int leaf = 0, package = 0;
            for (int made = 0; made < packages; made++)
            {
                long sum = 0;
                for (int child = made == 0 ? dummies : 0; child < radix; child++)
                {
                    bool takeLeaf = leaf < leaves && (package >= made || weights[leaf] <= sums[package]);
                    sum += takeLeaf ? weights[leaf] : sums[package];
                    parents[takeLeaf ? leaf++ : leaves + package++] = made;
                }
                sums[made] = sum;
            }
            CountDepths(parents.AsSpan(0, leaves + packages), leaves, packages, histogram);
        }
        finally
        {
            ArrayPool<long>.Shared.Return(sums);
            ArrayPool<int>.Shared.Return(parents);
        }
    }

    private static void CountDepths(Span<int> parents, int leaves, int packages, Span<int> histogram)
    {
        Span<int> depths = parents[leaves..];
        depths[packages - 1] = 0;
        for (int package = packages - 2; package >= 0; package--) depths[package] = depths[depths[package]] + 1;
        for (int leaf = 0; leaf < leaves; leaf++) histogram[depths[parents[leaf]] + 1]++;
    }
}
