using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>The code length of a coder that learns its table as it goes.</summary>
/// <remarks>
/// After n symbols of which n(s) were s, a sequential Dirichlet coder gives s the probability (n(s) + α)/(n + Aα). What it spends on a
/// sequence depends on the counts alone: ln Γ(N+Aα)/Γ(Aα) - Σ ln Γ(n(s)+α)/Γ(α) nats. α = ½ is the estimator of R. Krichevsky and V. Trofimov,
/// The performance of universal encoding, IEEE Transactions on Information Theory 27 (1981).
/// An arithmetic coder reaches it within 2 bits, so it is an achievable size and no bound.
/// </remarks>
public static class AdaptiveCost
{
    /// <summary>Bits that the coder of one context spends on symbols with these counts, α being known to the decoder.</summary>
    /// <param name="counts">Counts of the symbols of the context; zeros and symbols left out cost nothing by themselves.</param>
    /// <param name="alphabetSize">A, at least the symbols in use.</param>
    /// <param name="alpha">α, above 0.</param>
    /// <returns>At least N·H0, and 0 only when nothing is counted or A = 1. Relative error below 1e-12.</returns>
    /// <exception cref="ArgumentOutOfRangeException">α is not a positive number, or A is below the symbols in use.</exception>
    public static double Bits(ReadOnlySpan<long> counts, long alphabetSize, double alpha)
    {
        if (!(alpha > 0)) throw new ArgumentOutOfRangeException(nameof(alpha), alpha, "α must be above 0.");
        long total = 0, inUse = 0;
        foreach (long count in counts)
        {
            total += count;
            if (count != 0) inUse++;
        }
        if (inUse > alphabetSize)
            throw new ArgumentOutOfRangeException(nameof(alphabetSize), alphabetSize, $"{inUse} symbols are in use; the alphabet has {alphabetSize}.");
        var nats = new NeumaierSum();
        nats.Add(Entropy.InformationBits(counts, total) * Logarithm.Ln2);
        nats.Add(GammaFunction.RisingFactorialExcess(total, alphabetSize * alpha));
        foreach (long count in counts) nats.Add(-GammaFunction.RisingFactorialExcess(count, alpha));
        return Math.Max(0, nats.Value) / Logarithm.Ln2;
    }
}
