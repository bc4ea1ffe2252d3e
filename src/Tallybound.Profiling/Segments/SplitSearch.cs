using System.Buffers;
using System.Runtime.Intrinsics;

namespace Tallybound.Profiling.Segments;

/// <summary>A dynamic programme over where to begin a new table: the least sum, over stretches, of the quick estimate of their bits.</summary>
/// <remarks>A stretch is estimated at N·H0 + one table, or at its plain bits, or at one symbol's, whichever is least. Only these decisions rest on the estimate; what is
/// reported is priced exactly afterwards.</remarks>
internal static class SplitSearch
{
    /// <summary>The stretches of the cheapest division; of equal ones the one whose last stretch is longest.</summary>
    /// <param name="counts">Counts of merged segments, one after the other; the first has a symbol.</param>
    /// <param name="alphabetSize">A, at most 256.</param>
    /// <param name="tableBits">What a table is taken to cost; at least what the estimate may be off.</param>
    /// <returns>The first merged segment of each stretch, ascending, 0 first.</returns>
    public static List<int> Starts(ReadOnlySpan<long> counts, int alphabetSize, long tableBits)
    {
        using var cells = new SplitCells(counts, alphabetSize);
        double[] least = ArrayPool<double>.Shared.Rent(cells.Count + 1);
        int[] lastStart = ArrayPool<int>.Shared.Rent(cells.Count + 1);
        try
        {
            least.AsSpan(0, cells.Count + 1).Fill(double.PositiveInfinity);
            least[0] = 0;
            int plainBits = TableBlockPricer.PlainBits(alphabetSize);
            for (int start = 0; start < cells.Count; start++) TryStretches(cells, start, plainBits, tableBits, least, lastStart);
            var starts = new List<int>();
            for (int end = cells.Count; end > 0; end = lastStart[end]) starts.Add(lastStart[end]);
            starts.Reverse();
            return starts;
        }
        finally
        {
            ArrayPool<double>.Shared.Return(least);
            ArrayPool<int>.Shared.Return(lastStart);
        }
    }

    /// <summary>Tries every stretch from <paramref name="start"/>, whose own way is settled, as starts come in order.</summary>
    private static void TryStretches(SplitCells cells, int start, int plainBits, long tableBits, Span<double> least, Span<int> lastStart)
    {
        Span<Vector256<float>> stretch = cells.Stretch;
        stretch.Clear();
        long symbols = 0;
        int only = cells[start].Only;
        for (int cell = start; cell < cells.Count; cell++)
        {
            symbols += cells[cell].Symbols;
            if (cells[cell].Only != only) only = -1;
            double coded = cells.Extend(cell, stretch, symbols) + tableBits, plain = only >= 0 ? plainBits : (double)symbols * plainBits;
            double bits = least[start] + Math.Min(plain, coded);
            if (bits < least[cell + 1]) (least[cell + 1], lastStart[cell + 1]) = (bits, start);
        }
    }
}
