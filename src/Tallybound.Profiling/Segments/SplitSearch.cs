using System.Buffers;

namespace Tallybound.Profiling.Segments;

/// <summary>A dynamic programme over where to begin a new table: the least sum, over stretches, of the quick estimate of their bits.</summary>
/// <remarks>A stretch is estimated at N·H0 + one table, or at its plain bits, or at one symbol's, whichever is least. Only these decisions rest on the estimate; what is
/// reported is priced exactly afterwards.</remarks>
internal static class SplitSearch
{
    /// <summary>The stretches of the cheapest division.</summary>
    /// <param name="counts">Counts of merged segments, one after the other.</param>
    /// <param name="alphabetSize">A.</param>
    /// <param name="tableBits">What a table is taken to cost.</param>
    /// <returns>The first merged segment of each stretch, ascending, 0 first.</returns>
    public static List<int> Starts(ReadOnlySpan<long> counts, int alphabetSize, long tableBits)
    {
        int cells = counts.Length / alphabetSize;
        double[] least = ArrayPool<double>.Shared.Rent(cells + 1);
        int[] lastStart = ArrayPool<int>.Shared.Rent(cells + 1);
        try
        {
            least.AsSpan(0, cells + 1).Fill(double.PositiveInfinity);
            least[0] = 0;
            for (int start = 0; start < cells; start++) Extend(counts, alphabetSize, tableBits, start, least, lastStart);
            var starts = new List<int>();
            for (int end = cells; end > 0; end = lastStart[end]) starts.Add(lastStart[end]);
            starts.Reverse();
            return starts;
        }
        finally
        {
            ArrayPool<double>.Shared.Return(least);
            ArrayPool<int>.Shared.Return(lastStart);
        }
    }

    /// <summary>Tries every stretch from <paramref name="start"/>; its way there is settled, as starts come in order.</summary>
    private static void Extend(ReadOnlySpan<long> counts, int alphabetSize, long tableBits, int start, Span<double> least, Span<int> lastStart)
    {
        Span<long> sum = stackalloc long[alphabetSize];
        Span<double> weighted = stackalloc double[alphabetSize];
        sum.Clear();
        weighted.Clear();
        int plainBits = TableBlockPricer.PlainBits(alphabetSize), inUse = 0;
        long symbols = 0;
        double weightedLogarithms = 0, before = least[start];
        for (int end = start + 1, at = start * alphabetSize; at < counts.Length; end++, at += alphabetSize)
        {
            ReadOnlySpan<long> cell = counts.Slice(at, alphabetSize);
            for (int symbol = 0; symbol < cell.Length; symbol++)
            {
                long count = cell[symbol];
                if (count == 0) continue;
                symbols += count;
                if (sum[symbol] == 0) inUse++;
                double grown = WeightedLogarithm.Of(sum[symbol] += count);
                weightedLogarithms += grown - weighted[symbol];
                weighted[symbol] = grown;
            }
            double plain = inUse == 1 ? plainBits : (double)symbols * plainBits;
            double bits = before + Math.Min(plain, WeightedLogarithm.Of(symbols) - weightedLogarithms + tableBits);
            if (bits < least[end]) (least[end], lastStart[end]) = (bits, start);
        }
    }
}
