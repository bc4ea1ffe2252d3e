using System.Numerics;
using System.Runtime.Intrinsics;

namespace Tallybound.Profiling.Segments;

/// <summary>What one walk over a block's counts tells before any code is built.</summary>
internal readonly struct BlockStatistics
{
    private BlockStatistics(long symbols, int inUse, Vector256<ulong> used, long payloadFloor) =>
        (Symbols, InUse, Used, PayloadFloor) = (symbols, inUse, used, payloadFloor);

    /// <summary>Symbols in the block, N.</summary>
    public long Symbols { get; }

    /// <summary>Distinct symbols, m.</summary>
    public int InUse { get; }

    /// <summary>One bit a symbol of the alphabet: set when it occurs.</summary>
    public Vector256<ulong> Used { get; }

    /// <summary>Bits that no Huffman code of these counts goes below.</summary>
    public long PayloadFloor { get; }

    /// <summary>True when a table for the symbols of <paramref name="table"/> has a word for every symbol of this block.</summary>
    public bool CoveredBy(Vector256<ulong> table) => Vector256.AndNot(Used, table) == Vector256<ulong>.Zero;

    /// <summary>Walks the counts of at most 256 symbols once.</summary>
    public static BlockStatistics Of(ReadOnlySpan<long> counts)
    {
        long symbols = 0, largest = 0;
        double weightedLogarithms = 0;
        Span<ulong> used = stackalloc ulong[4];
        used.Clear();
        for (int from = 0, word = 0; from < counts.Length; from += 64, word++)
        {
            ulong bits = 0;
            ReadOnlySpan<long> part = counts.Slice(from, Math.Min(64, counts.Length - from));
            for (int i = 0; i < part.Length; i++)
            {
                long count = part[i];
                if (count == 0) continue;
                bits |= 1UL << i;
                symbols += count;
                largest = Math.Max(largest, count);
                weightedLogarithms += WeightedLogarithm.Of(count);
            }
            used[word] = bits;
        }
        int inUse = BitOperations.PopCount(used[0]) + BitOperations.PopCount(used[1]) + BitOperations.PopCount(used[2]) + BitOperations.PopCount(used[3]);
        return new(symbols, inUse, Vector256.Create<ulong>(used), Floor(symbols, inUse, largest, weightedLogarithms));
    }

    /// <summary>With up to two symbols every word has 1 bit; with more only one word can have 1 bit, and N·H0 holds (Shannon 1948), here less all that its quick form may err.</summary>
    private static long Floor(long symbols, int inUse, long largest, double weightedLogarithms)
    {
        if (inUse <= 2) return symbols;
        double entropy = WeightedLogarithm.Of(symbols) - weightedLogarithms, slack = 1 + (symbols * 4 * WeightedLogarithm.Error) + (weightedLogarithms * 1e-12);
        return Math.Max((2 * symbols) - largest, (long)(entropy - slack));
    }
}
