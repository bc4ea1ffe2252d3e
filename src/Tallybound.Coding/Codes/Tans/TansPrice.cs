using System.Buffers;
using System.Numerics;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>What a tANS machine spends on symbols drawn independently, in its steady state.</summary>
/// <remarks>The encoder's states form a Markov chain. The states from which symbol s leads to one certain cell are neighbours, so one sweep over the cells needs two prefix sums a cell and
/// no sum over symbols. The sweep uses the values it has just set (Gauss–Seidel): a symbol of nearly all the weight moves the state up a little each time, and such a slow round trip is one sweep then.</remarks>
public static class TansPrice
{
    private const int MostSweeps = 2000;

    private const double Settled = 1e-12;

    /// <summary>Expected payload of the source: N times the steady rate, rounded once, plus the R bits of the last state.</summary>
    /// <param name="counts">n(s), at least 0.</param>
    /// <param name="tableLog">R, 5 to 16.</param>
    /// <param name="payloadBits">The price; R where one symbol is in use.</param>
    /// <returns>False, and 0 bits, where no symbol or more than 2^R symbols are in use.</returns>
    public static bool TryPrice(ReadOnlySpan<long> counts, int tableLog, out long payloadBits)
    {
        int[] frequencies = ArrayPool<int>.Shared.Rent(counts.Length);
        try
        {
            Span<int> fitted = frequencies.AsSpan(0, counts.Length);
            payloadBits = 0;
            if (!QuantizedFrequencies.TryFit(counts, tableLog, fitted)) return false;
            payloadBits = PayloadBits(counts, fitted, tableLog);
            return true;
        }
        finally
        {
            ArrayPool<int>.Shared.Return(frequencies);
        }
    }

    /// <summary>The same with given frequencies, each at least 1 where the symbol is in use, in all 2^R.</summary>
    public static long PayloadBits(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        double symbols = 0;
        foreach (long count in counts) symbols += count;
        return (long)Math.Round(symbols * BitsPerSymbol(counts, frequencies, tableLog), MidpointRounding.AwayFromZero) + tableLog;
    }

    /// <summary>The steady rate of a machine with these frequencies on a source with these counts, in bits a symbol; 0 where one symbol is in use.</summary>
    /// <exception cref="ArgumentException">The frequencies do not take 2^R cells, or a symbol in use has none.</exception>
    public static double BitsPerSymbol(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        int size = 1 << tableLog;
        int[] symbolOfCell = ArrayPool<int>.Shared.Rent(size);
        Source[] sources = ArrayPool<Source>.Shared.Rent(size);
        double[] sums = ArrayPool<double>.Shared.Rent(size + 1);
        try
        {
            TansSpread.Fill(frequencies, tableLog, symbolOfCell.AsSpan(0, size));
            FindSources(counts, frequencies, tableLog, symbolOfCell.AsSpan(0, size), sources.AsSpan(0, size));
            return Settle(sources.AsSpan(0, size), sums.AsSpan(0, size + 1));
        }
        finally
        {
            ArrayPool<int>.Shared.Return(symbolOfCell);
            ArrayPool<Source>.Shared.Return(sources);
            ArrayPool<double>.Shared.Return(sums);
        }
    }

    private static void FindSources(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog, ReadOnlySpan<int> symbolOfCell, Span<Source> sources)
    {
        double symbols = 0;
        foreach (long count in counts) symbols += count;
        int[] nextRank = ArrayPool<int>.Shared.Rent(counts.Length);
        double[] chances = ArrayPool<double>.Shared.Rent(counts.Length);
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            if (counts[symbol] > 0 && frequencies[symbol] == 0) throw new ArgumentException($"Symbol {symbol} is in use and has no cell.", nameof(frequencies));
            nextRank[symbol] = frequencies[symbol];
            chances[symbol] = counts[symbol] / symbols;
        }
        int size = 1 << tableLog;
        for (int cell = 0; cell < sources.Length; cell++)
        {
            int symbol = symbolOfCell[cell], rank = nextRank[symbol]++, bits = tableLog - BitOperations.Log2((uint)rank);
            int first = (rank << bits) - size;
            sources[cell] = new Source(chances[symbol], first, first + (1 << bits), bits);
        }
        ArrayPool<int>.Shared.Return(nextRank);
        ArrayPool<double>.Shared.Return(chances);
    }

    private static double Settle(ReadOnlySpan<Source> sources, Span<double> sums)
    {
        int size = sources.Length;
        for (int cell = 0; cell <= size; cell++) sums[cell] = Math.Log2(1 + ((double)cell / size));
        double rate = double.NaN;
        int calm = 0;
        for (int sweep = 0; sweep < MostSweeps && calm < 2; sweep++)
        {
            double before = rate;
            rate = Sweep(sources, sums);
            calm = Math.Abs(rate - before) <= Settled * rate ? calm + 1 : 0;
        }
        return rate;
    }

    /// <summary>Sets each cell's weight from the weights of the states that lead to it and returns the mean of the bits given off on the way.</summary>
    /// <remarks><paramref name="sums"/> holds the sums before each cell: new ones up to the cell at hand, and beyond it old ones, which count from the old sum there.</remarks>
    private static double Sweep(ReadOnlySpan<Source> sources, Span<double> sums)
    {
        double total = 0, bits = 0, oldAtCell = 0;
        for (int cell = 0; cell < sources.Length; cell++)
        {
            ref readonly Source source = ref sources[cell];
            double weight;
            if (source.End <= cell) weight = sums[source.End] - sums[source.First];
            else if (source.First > cell) weight = sums[source.End] - sums[source.First];
            else weight = total - (source.First == cell ? total : sums[source.First]) + sums[source.End] - oldAtCell;
            weight *= source.Chance;
            bits += weight * source.Bits;
            total += weight;
            oldAtCell = sums[cell + 1];
            sums[cell + 1] = total;
        }
        double scale = 1 / total;
        for (int cell = 1; cell <= sources.Length; cell++) sums[cell] *= scale;
        return bits * scale;
    }

    /// <summary>The states [First, End), as cells, from which a cell is reached by its symbol, with that symbol's chance and the bits given off.</summary>
    private readonly record struct Source(double Chance, int First, int End, int Bits);
}
