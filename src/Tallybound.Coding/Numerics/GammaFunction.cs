namespace Tallybound.Coding.Numerics;

/// <summary>The logarithm of the gamma function, quick enough to be taken once a counted pair.</summary>
public static class GammaFunction
{
    /// <summary>From here on the Stirling series is exact to double precision.</summary>
    private const double SeriesFrom = 10;

    /// <summary>½ ln 2π.</summary>
    internal const double HalfLnTwoPi = 0.918938533204672741780329736406;

    /// <summary>ln Γ(x), natural logarithm.</summary>
    /// <param name="x">Above 0 and finite.</param>
    /// <remarks>Error below 1e-14 relative or absolute, whichever is larger (near its zeros at 1 and 2 it is absolute). For x ≥ 10 the Stirling series,
    /// NIST Digital Library of Mathematical Functions, equation 5.11.1; below that after raising x by Γ(x+1) = xΓ(x), equation 5.5.1.</remarks>
    /// <exception cref="ArgumentOutOfRangeException">x is not a positive number.</exception>
    public static double LnGamma(double x)
    {
        if (!(x > 0)) throw new ArgumentOutOfRangeException(nameof(x), x, "The logarithm of the gamma function is taken of positive numbers only.");
        if (x is 1 or 2) return 0;
        double raised = 1;
        while (x < SeriesFrom) raised *= x++;
        double series = (x - 0.5) * Math.Log(x) - x + HalfLnTwoPi + StirlingRest(x);
        return raised == 1 ? series : series - Math.Log(raised);
    }

    /// <summary>ln[Γ(n + a)/Γ(a)] - n ln n + n: how far the log of the rising factorial a(a+1)…(a+n-1) lies above n ln n - n.</summary>
    /// <param name="n">A count, at least 0; 0 gives 0.</param>
    /// <param name="a">Above 0.</param>
    /// <remarks>
    /// A sequential Dirichlet coder pays ln[Γ(n+Aα)/Γ(Aα)] - Σ ln[Γ(n(s)+α)/Γ(α)] nats. The parts n ln n - n cancel between the
    /// two terms up to the plug-in entropy, and on redundant data they are a million times larger than the rest; this is the
    /// rest alone, of size (|a - ½| + 1)·ln n, so that nothing is lost. Relative error near 1e-14.
    /// </remarks>
    public static double RisingFactorialExcess(long n, double a)
    {
        if (n == 0) return 0;
        double x = n, end = x + a;
        if (end < SeriesFrom)
        {
            double product = 1;
            for (int i = 0; i < n; i++) product *= a + i;
            return Math.Log(product) - x * Math.Log(x) + x;
        }
        double stretch = x * Logarithm.Log1p(a / x);
        return a >= SeriesFrom
            ? (a - 0.5) * Logarithm.Log1p(x / a) + stretch + (StirlingRest(end) - StirlingRest(a))
            : (a - 0.5) * Math.Log(end) + stretch - a + HalfLnTwoPi + StirlingRest(end) - LnGamma(a);
    }

    /// <summary>Σ B(2k)/(2k(2k-1)x^(2k-1)), k = 1…8; for x ≥ 10 the first term left out is below 2e-17.</summary>
    private static double StirlingRest(double x)
    {
        double y = 1 / (x * x);
        return (1.0 / 12 + y * (-1.0 / 360 + y * (1.0 / 1260 + y * (-1.0 / 1680 + y * (1.0 / 1188
            + y * (-691.0 / 360360 + y * (1.0 / 156 + y * (-3617.0 / 122400)))))))) / x;
    }
}
