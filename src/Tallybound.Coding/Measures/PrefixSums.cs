using System.Runtime.InteropServices;
using System.Runtime.Intrinsics;

namespace Tallybound.Coding.Measures;

/// <summary>Running sums over segments of a few symbols at a time: a run of neighbours then costs one subtraction, however long it is.</summary>
internal static class PrefixSums
{
    /// <summary>Eight counts are one cache line.</summary>
    public const int Columns = 8;

    /// <summary>The symbols that any segment uses, ascending.</summary>
    public static int[] ColumnsInUse(ReadOnlySpan<long> counts, int alphabetSize)
    {
        var used = new bool[alphabetSize];
        for (int at = 0; at < counts.Length; at += alphabetSize)
        {
            ReadOnlySpan<long> segment = counts.Slice(at, alphabetSize);
            for (int i = 0; i < segment.Length; i++) used[i] |= segment[i] != 0;
        }
        var columns = new List<int>(alphabetSize);
        for (int i = 0; i < alphabetSize; i++)
        {
            if (used[i]) columns.Add(i);
        }
        return [.. columns];
    }

    /// <summary>Fills prefix[segment × 8 + i] with the sum of columns[i] over the segments before it; lanes past the columns are 0.</summary>
    public static void Build(ReadOnlySpan<long> counts, int alphabetSize, ReadOnlySpan<int> columns, Span<long> prefix)
    {
        int segments = counts.Length / alphabetSize;
        prefix[..Columns].Clear();
        for (int s = 0; s < segments; s++)
        {
            ReadOnlySpan<long> segment = counts.Slice(s * alphabetSize, alphabetSize);
            Span<long> before = prefix.Slice(s * Columns, Columns), after = prefix.Slice((s + 1) * Columns, Columns);
            for (int i = 0; i < columns.Length; i++) after[i] = before[i] + segment[columns[i]];
            after[columns.Length..].Clear();
        }
    }

    /// <summary>Writes the sums of every replicate of the plan into its row of <paramref name="sums"/>.</summary>
    public static void SumBlocks(ReadOnlySpan<long> prefix, ResamplingPlan plan, Span<long> sums, int row, int first, int width)
    {
        ref long origin = ref MemoryMarshal.GetReference(prefix);
        Span<long> lanes = stackalloc long[Columns];
        for (int r = 0; r <= plan.Replicates; r++)
        {
            Vector256<long> low = default, high = default;
            foreach ((int start, int length) in plan.Blocks(r))
            {
                nuint from = (nuint)start * Columns, end = (nuint)(start + length) * Columns;
                low += Vector256.LoadUnsafe(ref origin, end) - Vector256.LoadUnsafe(ref origin, from);
                high += Vector256.LoadUnsafe(ref origin, end + 4) - Vector256.LoadUnsafe(ref origin, from + 4);
            }
            low.CopyTo(lanes);
            high.CopyTo(lanes[4..]);
            lanes[..width].CopyTo(sums.Slice(r * row + first, width));
        }
    }
}
