using MathNet.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>How far counts lie from all symbols equally likely.</summary>
public static class Uniformity
{
    /// <summary>Pearson's chi-square test against the uniform distribution over all symbols of the span, used or not.</summary>
    /// <param name="counts">One entry for each symbol of the alphabet, A of them; 1 or more.</param>
    /// <returns>χ² = Σ (n - N/A)²/(N/A), at least 0; A - 1 degrees of freedom; the chance of a larger χ² on uniform data, 0 to 1, with its full digits in the far tail
    /// down to 1e-300. Nothing counted, or A = 1: χ² 0 and chance 1.</returns>
    /// <exception cref="ArgumentException">The span is empty.</exception>
    /// <remarks>The tail is the regularised upper incomplete gamma function Q((A-1)/2, χ²/2), NIST DLMF 8.2.4; one minus the distribution function would lose it.
    /// The test needs N/A of 5 or more to mean what it says.</remarks>
    public static (double Statistic, int DegreesOfFreedom, double UpperTailProbability) ChiSquare(ReadOnlySpan<long> counts)
    {
        if (counts.IsEmpty) throw new ArgumentException("The alphabet has 0 symbols; the test needs at least 1.", nameof(counts));
        int degrees = counts.Length - 1;
        long total = 0;
        foreach (long count in counts) total += count;
        if (total == 0 || degrees == 0) return (0, degrees, 1);
        double expected = (double)total / counts.Length, sum = 0;
        foreach (long count in counts)
        {
            double off = count - expected;
            sum += off * off;
        }
        double statistic = sum / expected;
        return (statistic, degrees, SpecialFunctions.GammaUpperRegularized(degrees / 2.0, statistic / 2));
    }
}
