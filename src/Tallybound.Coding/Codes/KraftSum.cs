using System.Globalization;
using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Σ D^−length of a code, in exact integers (Kraft 1949; McMillan 1956): at most 1 for every code that can be decoded.</summary>
public static class KraftSum
{
    /// <summary>The sum as a reduced fraction: <c>1</c>, <c>511/512</c>, <c>0</c> where no symbol has a code.</summary>
    /// <param name="lengths">One length a symbol, 0 for a symbol without a code.</param>
    /// <param name="radix">D, at least 2.</param>
    public static string Of(ReadOnlySpan<byte> lengths, int radix)
    {
        (BigInteger numerator, BigInteger denominator) = Fraction(lengths, radix);
        return denominator.IsOne ? numerator.ToString(CultureInfo.InvariantCulture) : string.Create(CultureInfo.InvariantCulture, $"{numerator}/{denominator}");
    }

    /// <summary>The sum as numerator and denominator without a common divisor.</summary>
    public static (BigInteger Numerator, BigInteger Denominator) Fraction(ReadOnlySpan<byte> lengths, int radix)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(radix, 2);
        Span<int> histogram = stackalloc int[256];
        histogram.Clear();
        foreach (byte length in lengths) histogram[length]++;
        int longest = histogram[1..].LastIndexOfAnyExcept(0) + 1;
        BigInteger numerator = BigInteger.Zero, denominator = BigInteger.One;
        for (int length = 1; length <= longest; length++)
        {
            numerator = (numerator * radix) + histogram[length];
            denominator *= radix;
        }
        BigInteger divisor = BigInteger.GreatestCommonDivisor(numerator, denominator);
        return (numerator / divisor, denominator / divisor);
    }
}
