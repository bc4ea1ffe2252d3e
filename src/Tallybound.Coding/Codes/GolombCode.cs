using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>Golomb codes of numbers from 0: quotient by m in unary, remainder in truncated binary; Rice codes are those of m = 2^k.
/// S. Golomb, Run-length encodings, IEEE Trans. IT-12 (1966).</summary>
public static class GolombCode
{
    /// <summary>Largest parameter, 2^62.</summary>
    public const long LargestParameter = 1L << 62;

    private const int LongestQuotient = 1 << 20;

    /// <summary>Bits of a number's word.</summary>
    /// <param name="value">At least 0.</param>
    /// <param name="m">The parameter, 1 to 2^62.</param>
    public static long Length(long value, long m)
    {
        Check(value, m);
        long remainder = value % m;
        int bits = RemainderBits(m);
        return (value / m) + 1 + (m == 1 ? 0 : remainder < (1L << bits) - m ? bits - 1 : bits);
    }

    /// <summary>Writes a number's word: ones, a zero, the remainder; parameters as for <see cref="Length"/>.</summary>
    /// <exception cref="ArgumentException">The quotient is above 2^20: this parameter does not suit the number.</exception>
    public static void Encode<TSink>(long value, long m, ref TSink sink)
        where TSink : IBitSink
    {
        Check(value, m);
        long quotient = value / m, remainder = value % m;
        if (quotient > LongestQuotient) throw new ArgumentException($"{value} has a quotient of {quotient} by {m}; this code allows {LongestQuotient}.", nameof(value));
        for (; quotient >= 32; quotient -= 32) sink.Write(uint.MaxValue, 32);
        sink.Write(((1UL << (int)quotient) - 1) << 1, (int)quotient + 1);
        if (m == 1) return;
        int bits = RemainderBits(m);
        long shortWords = (1L << bits) - m;
        if (remainder < shortWords) sink.Write((ulong)remainder, bits - 1);
        else sink.Write((ulong)(remainder + shortWords), bits);
    }

    /// <summary>Reads a number.</summary>
    /// <exception cref="InvalidDataException">The bits end early, the quotient is above 2^20, or the number does not fit a long.</exception>
    public static long Decode(ref BitReader reader, long m)
    {
        Check(0, m);
        long quotient = 0;
        while (reader.Read(1) == 1)
            if (++quotient > LongestQuotient) throw new InvalidDataException($"The quotient is above {LongestQuotient}.");
        if (m == 1) return quotient;
        int bits = RemainderBits(m);
        long shortWords = (1L << bits) - m;
        long remainder = (long)reader.Read(bits - 1);
        if (remainder >= shortWords) remainder = ((remainder << 1) | (long)reader.Read(1)) - shortWords;
        if (quotient > (long.MaxValue - remainder) / m) throw new InvalidDataException($"The quotient {quotient} by {m} makes a number of more than 63 bits.");
        return (quotient * m) + remainder;
    }

    /// <summary>The best m for a geometric distribution P(n) = (1 − θ)θ^n: the one with θ^m + θ^(m+1) ≤ 1 &lt; θ^m + θ^(m−1).
    /// R. Gallager and D. van Voorhis, Optimal source codes for geometrically distributed integer alphabets, IEEE Trans. IT-21 (1975).</summary>
    /// <param name="theta">θ, 0 to below 1.</param>
    public static long ParameterFor(double theta)
    {
        if (!(theta >= 0 && theta < 1)) throw new ArgumentOutOfRangeException(nameof(theta), theta, "A geometric distribution has 0 ≤ θ < 1.");
        if (theta == 0) return 1;
        long m = Math.Max(1, (long)Math.Ceiling(-Math.Log2(1 + theta) / Math.Log2(theta)));
        // The closed form may miss by one where θ^m + θ^(m+1) is 1 to the last digit.
        while (m > 1 && Math.Pow(theta, m - 1) + Math.Pow(theta, m) <= 1) m--;
        while (Math.Pow(theta, m) + Math.Pow(theta, m + 1) > 1) m++;
        return m;
    }

    private static int RemainderBits(long m) => m == 1 ? 0 : BitOperations.Log2((ulong)m - 1) + 1;

    private static void Check(long value, long m)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(value);
        ArgumentOutOfRangeException.ThrowIfLessThan(m, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(m, LargestParameter);
    }
}
