using System.Numerics;

namespace Tallybound.Tests.Coding.Numerics;

/// <summary>Logarithms in integers with 256 bits after the point, sharing nothing with the code under test.</summary>
internal static class FixedPoint
{
    public const int Places = 256;

    private static readonly BigInteger s_one = BigInteger.One << Places;
    private static readonly BigInteger s_ln2 = TwiceArtanh(BigInteger.One, 3);

    /// <summary>log2(top/bottom) · 2^256, for top ≥ bottom ≥ 1.</summary>
    public static BigInteger Log2(BigInteger top, BigInteger bottom)
    {
        int whole = 0;
        while (bottom << (whole + 1) <= top) whole++;
        BigInteger scaled = bottom << whole;
        // ln(x) = 2 artanh((x-1)/(x+1)), x in [1, 2).
        return (new BigInteger(whole) << Places) + (TwiceArtanh(top - scaled, top + scaled) << Places) / s_ln2;
    }

    public static double ToDouble(BigInteger value)
    {
        if (value.IsZero) return 0;
        int surplus = Math.Max(0, (int)value.GetBitLength() - 64);
        return Math.ScaleB((double)(value >> surplus), surplus - Places);
    }

    private static BigInteger TwiceArtanh(BigInteger top, BigInteger bottom)
    {
        BigInteger ratio = (top << Places) / bottom, square = (ratio * ratio) >> Places, power = ratio, sum = BigInteger.Zero;
        for (int k = 1; !power.IsZero; k += 2)
        {
            sum += power / k;
            power = (power * square) >> Places;
        }
        return 2 * sum;
    }

    public static BigInteger One => s_one;
}
