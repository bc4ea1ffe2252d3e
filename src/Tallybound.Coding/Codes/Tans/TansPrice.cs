using System.Buffers;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>What a tANS machine spends on symbols drawn independently, in its steady state.</summary>
public static class TansPrice
{
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

    /// <summary>The same with given frequencies: each at least 1 where the symbol is in use, in all 2^R. The rate is followed until it moves the total by no more than a hundredth of a bit.</summary>
    /// <exception cref="ArgumentException">The frequencies do not take 2^R cells, or a symbol in use has none.</exception>
    public static long PayloadBits(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        double symbols = 0;
        foreach (long count in counts) symbols += count;
        if (symbols == 0) return tableLog;
        double rate = TansChain.OfThisThread.SteadyRate(counts, frequencies, tableLog, Math.Max(1e-13, 1e-2 / symbols));
        return (long)Math.Round(symbols * rate, MidpointRounding.AwayFromZero) + tableLog;
    }

    /// <summary>The steady rate of a machine with these frequencies on a source with these counts, in bits a symbol; 0 where one symbol is in use.</summary>
    /// <exception cref="ArgumentException">The frequencies do not take 2^R cells, or a symbol in use has none, or no symbol is in use.</exception>
    public static double BitsPerSymbol(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        if (!counts.ContainsAnyExcept(0L)) throw new ArgumentException("No symbol is in use, so there is no rate.", nameof(counts));
        return TansChain.OfThisThread.SteadyRate(counts, frequencies, tableLog, 1e-13);
    }
}
