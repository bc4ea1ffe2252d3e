namespace Tallybound.Coding.Numerics;

/// <summary>Logarithms that keep their digits near 1.</summary>
public static class Logarithm
{
    /// <summary>The natural logarithm of 2: divides nats into bits.</summary>
    public const double Ln2 = 0.693147180559945309417232121458;

    /// <summary>ln(1 + x), exact to a few units in the last place for every x &gt; -1, however small.</summary>
    /// <param name="x">Above -1. At -1 the answer is negative infinity, below it NaN.</param>
    /// <remarks><c>double.LogP1</c> is ln of the rounded sum 1 + x and loses every digit of a small x. Here the rounding of the sum is
    /// undone by the quotient, for ln(u)/(u - 1) varies slowly near 1: N. Higham, Accuracy and Stability of Numerical Algorithms,
    /// section 1.14.1 (the rearrangement is due to W. Kahan).</remarks>
    public static double Log1p(double x)
    {
        double u = 1 + x;
        if (u == 1) return x;
        return double.IsPositiveInfinity(u) || u <= 0 ? Math.Log(u) : Math.Log(u) * (x / (u - 1));
    }
}
