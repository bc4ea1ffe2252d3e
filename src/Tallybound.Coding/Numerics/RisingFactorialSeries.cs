namespace Tallybound.Coding.Numerics;

/// <summary><see cref="GammaFunction.RisingFactorialExcess"/> for one small a and many large n, with the one logarithm shared by all a.</summary>
/// <remarks>ln Γ(n+a) ~ (n+a-½) ln n - n + ½ ln 2π + Σ (-1)^k B_k(a)/(k(k-1)n^(k-1)), B_k the Bernoulli polynomials: NIST DLMF 5.11.8, here to k = 7.
/// For 0 &lt; a ≤ 1 and n ≥ <see cref="From"/> the terms left out are below 1e-18.</remarks>
internal readonly struct RisingFactorialSeries
{
    /// <summary>The smallest n it is exact for.</summary>
    public const int From = 256;

    private readonly double _power, _constant, _c1, _c2, _c3, _c4, _c5, _c6;

    /// <param name="a">Above 0, at most 1.</param>
    public RisingFactorialSeries(double a)
    {
        double a2 = a * a, a3 = a2 * a, a4 = a2 * a2;
        _power = a - 0.5;
        _constant = GammaFunction.HalfLnTwoPi - GammaFunction.LnGamma(a);
        _c1 = (a2 - a + 1.0 / 6) / 2;
        _c2 = -(a3 - 1.5 * a2 + a / 2) / 6;
        _c3 = (a4 - 2 * a3 + a2 - 1.0 / 30) / 12;
        _c4 = -(a4 * a - 2.5 * a4 + 5.0 / 3 * a3 - a / 6) / 20;
        _c5 = (a4 * a2 - 3 * a4 * a + 2.5 * a4 - a2 / 2 + 1.0 / 42) / 30;
        _c6 = -(a4 * a3 - 3.5 * a4 * a2 + 3.5 * a4 * a - 7.0 / 6 * a3 + a / 6) / 42;
    }

    /// <summary>The excess, from ln n and 1/n.</summary>
    public double At(double lnN, double inverse) =>
        _power * lnN + _constant + inverse * (_c1 + inverse * (_c2 + inverse * (_c3 + inverse * (_c4 + inverse * (_c5 + inverse * _c6)))));
}
