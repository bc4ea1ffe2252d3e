using System.Buffers;
using Tallybound.Coding.Codes.Tans;

namespace Tallybound.Coding.Codes.Range;

/// <summary>What the range coder spends: the cross-entropy of the counts with its quantised frequencies, rounded once, plus its flush.</summary>
public static class RangePrice
{
    /// <summary>Bits that end a payload.</summary>
    public const int FlushBits = 2;

    /// <summary>The price with frequencies fitted to the counts.</summary>
    /// <param name="counts">n(s), at least 0.</param>
    /// <param name="frequencyBits">R, 12 to 16.</param>
    /// <param name="payloadBits">The price; <see cref="FlushBits"/> where one symbol is in use.</param>
    /// <returns>False, and 0 bits, where no symbol or more than 2^R symbols are in use.</returns>
    public static bool TryPrice(ReadOnlySpan<long> counts, int frequencyBits, out long payloadBits)
    {
        int[] frequencies = ArrayPool<int>.Shared.Rent(counts.Length);
        try
        {
            Span<int> fitted = frequencies.AsSpan(0, counts.Length);
            payloadBits = 0;
            if (!QuantizedFrequencies.TryFit(counts, frequencyBits, fitted)) return false;
            payloadBits = PayloadBits(counts, fitted, frequencyBits);
            return true;
        }
        finally
        {
            ArrayPool<int>.Shared.Return(frequencies);
        }
    }

    /// <summary>The price with given frequencies: at least 1 where the symbol is in use, in all 2^R.</summary>
    /// <exception cref="ArgumentException">A symbol in use has frequency 0.</exception>
    public static long PayloadBits(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int frequencyBits)
    {
        double bits = 0;
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            if (counts[symbol] == 0) continue;
            if (frequencies[symbol] == 0) throw new ArgumentException($"Symbol {symbol} is in use and has frequency 0.", nameof(frequencies));
            bits += counts[symbol] * (frequencyBits - Numerics.Log2Table.Of(frequencies[symbol]));
        }
        return (long)Math.Round(bits, MidpointRounding.AwayFromZero) + FlushBits;
    }
}
