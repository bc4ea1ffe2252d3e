using System.Buffers;
using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Optimal codes of limited length by package-merge: L. Larmore and D. Hirschberg, A fast algorithm for optimal length-limited Huffman codes, J. ACM 37 (1990).</summary>
public static class LengthLimited
{
    /// <summary>Longest limit.</summary>
    public const int LongestLimit = 63;

    /// <summary>Lengths of a cheapest binary code without a word longer than <paramref name="limit"/>.</summary>
    /// <param name="counts">n(s) of each symbol.</param>
    /// <param name="limit">1 to 63 bits.</param>
    /// <param name="lengths">Takes one length a symbol, as <see cref="Huffman.Lengths"/> gives them; the free code where it fits.</param>
    /// <returns>False, and lengths of 0, where 2^limit words are too few for the symbols in use.</returns>
    public static bool TryLengths(ReadOnlySpan<long> counts, int limit, Span<byte> lengths)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(limit, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(limit, LongestLimit);
        lengths.Clear();
        int used = counts.Length - counts.Count(0L);
        if (used == 0) return true;
        if (used > 1 && BitOperations.Log2((uint)used - 1) + 1 > limit) return false;
        int[] symbols = ArrayPool<int>.Shared.Rent(used);
        long[] weights = ArrayPool<long>.Shared.Rent(used);
        try
        {
            SortedWeights.Gather(counts, symbols.AsSpan(0, used), weights.AsSpan(0, used));
            Span<int> histogram = stackalloc int[256];
            Huffman.Histogram(weights.AsSpan(0, used), 2, histogram);
            if (histogram.LastIndexOfAnyExcept(0) > limit)
            {
                histogram.Clear();
                PackageMerge(weights.AsSpan(0, used), limit, histogram);
            }
            LengthRanks.HandOut(symbols.AsSpan(0, used), histogram, lengths);
            return true;
        }
        finally
        {
            ArrayPool<int>.Shared.Return(symbols);
            ArrayPool<long>.Shared.Return(weights);
        }
    }

    /// <summary>Keeps two rows of weights and, for each level, one bit an item that tells a leaf from a package.</summary>
    private static void PackageMerge(ReadOnlySpan<long> weights, int limit, Span<int> histogram)
    {
        int leaves = weights.Length, width = 2 * leaves, words = (width + 63) / 64;
        long[] row = ArrayPool<long>.Shared.Rent(width), next = ArrayPool<long>.Shared.Rent(width);
        ulong[] isLeaf = ArrayPool<ulong>.Shared.Rent(words * limit);
        int[] sizes = new int[limit];
        try
        {
            isLeaf.AsSpan(0, words * limit).Clear();
            weights.CopyTo(row);
            sizes[0] = leaves;
            isLeaf.AsSpan(0, words).Fill(ulong.MaxValue);
            for (int level = 1; level < limit; level++)
            {
                sizes[level] = MergeLevel(weights, row.AsSpan(0, sizes[level - 1]), next, isLeaf.AsSpan(level * words, words));
                (row, next) = (next, row);
            }
            CountLengths(isLeaf, words, sizes, leaves, limit, histogram);
        }
        finally
        {
            ArrayPool<long>.Shared.Return(row);
            ArrayPool<long>.Shared.Return(next);
            ArrayPool<ulong>.Shared.Return(isLeaf);
        }
    }

    private static int MergeLevel(ReadOnlySpan<long> weights, ReadOnlySpan<long> below, Span<long> level, Span<ulong> isLeaf)
    {
        int leaf = 0, pair = 0, pairs = below.Length / 2, at = 0;
        while (leaf < weights.Length || pair < pairs)
        {
            long package = pair < pairs ? below[2 * pair] + below[(2 * pair) + 1] : long.MaxValue;
            if (leaf < weights.Length && weights[leaf] <= package)
            {
                isLeaf[at >> 6] |= 1UL << (at & 63);
                level[at++] = weights[leaf++];
            }
            else
            {
                level[at++] = package;
                pair++;
            }
        }
        return at;
    }

    /// <summary>Walks the levels down: of the items taken at a level, the leaves get one more digit and the packages take twice their number below.</summary>
    private static void CountLengths(ReadOnlySpan<ulong> isLeaf, int words, int[] sizes, int leaves, int limit, Span<int> histogram)
    {
        int take = (2 * leaves) - 2;
        int before = leaves;
        for (int level = limit - 1; level >= 0 && take > 0; level--)
        {
            int taken = 0;
            ReadOnlySpan<ulong> bits = isLeaf.Slice(level * words, words);
            for (int i = 0; i < take; i++) taken += (int)((bits[i >> 6] >> (i & 63)) & 1);
            // The leaves taken at a level are the lightest ones; those taken at one level more have one digit more.
            if (level < limit - 1) histogram[limit - 1 - level] += before - taken;
            before = taken;
            take = Math.Min(sizes[level], 2 * (take - taken));
            if (take == 0 || level == 0)
            {
                histogram[limit - level] += before;
                break;
            }
        }
    }
}
