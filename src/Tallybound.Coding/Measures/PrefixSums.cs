using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Tallybound.Coding.Measures;

/// <summary>Running sums over segments of a few symbols at a time: a run of neighbours then costs one subtraction, however long it is.</summary>
internal static class PrefixSums
{
    /// <summary>Eight counts are one cache line.</summary>
    public const int Columns = 8;

    /// <summary>Fills prefix[segment × 8 + i] with the sum of column + i over the segments before it; lanes past <paramref name="width"/> stay 0.</summary>
    public static void Build(ReadOnlySpan<long> counts, int row, int column, int width, Span<long> prefix)
    {
        int segments = counts.Length / row;
        prefix[..Columns].Clear();
        for (int s = 0; s < segments; s++)
        {
            ReadOnlySpan<long> from = counts.Slice(s * row + column, width);
            Span<long> before = prefix.Slice(s * Columns, Columns), after = prefix.Slice((s + 1) * Columns, Columns);
            for (int i = 0; i < from.Length; i++) after[i] = before[i] + from[i];
            after[from.Length..].Clear();
        }
    }

    /// <summary>Writes the sums of every replicate of the plan into its row of <paramref name="sums"/>.</summary>
    public static void SumBlocks(ReadOnlySpan<long> prefix, ResamplingPlan plan, Span<long> sums, int row, int column, int width)
    {
        ref long origin = ref MemoryMarshal.GetReference(prefix);
        Span<long> lanes = stackalloc long[Columns];
        for (int r = 0; r <= plan.Replicates; r++)
        {
            Vector256<long> low = default, high = default;
            foreach ((int start, int length) in plan.Blocks(r))
            {
                nuint first = (nuint)start * Columns, end = (nuint)(start + length) * Columns;
                low += Vector256.LoadUnsafe(ref origin, end) - Vector256.LoadUnsafe(ref origin, first);
                high += Vector256.LoadUnsafe(ref origin, end + 4) - Vector256.LoadUnsafe(ref origin, first + 4);
            }
            low.CopyTo(lanes);
            high.CopyTo(lanes[4..]);
            lanes[..width].CopyTo(sums.Slice(r * row + column, width));
        }
    }
}
