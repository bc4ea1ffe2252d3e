using CsCheck;
using Tallybound.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class DivergenceTests
{
    /// <summary>Two aligned sets of counts, small or past 2^31, neither empty.</summary>
    private static readonly Gen<(long[] A, long[] B)> s_pairs =
        Gen.Select(Gen.Int[0, 40], Gen.Int[1, 20]).SelectMany((shift, symbols) =>
            Gen.Select(Gen.Long[0, 1L << 42].Select(n => n >> shift).Array[symbols], Gen.Long[0, 1L << 42].Select(n => n >> shift).Array[symbols]))
            .Where((a, b) => a.Sum() > 0 && b.Sum() > 0);

    [Fact]
    public void Jensen_Shannon_lies_between_0_and_1_and_is_symmetric() =>
        s_pairs.Sample(p =>
        {
            double there = Divergence.JensenShannonBits(p.A, p.B), back = Divergence.JensenShannonBits(p.B, p.A);
            return there is >= 0 and <= 1 && Math.Abs(there - back) <= 1e-14;
        });

    /// <summary>Lin 1991, equation 4.1: the entropy of the mean less the mean of the entropies.</summary>
    [Fact]
    public void Jensen_Shannon_is_the_entropy_that_mixing_adds() =>
        s_pairs.Sample(p =>
        {
            double mixed = 0, a = p.A.Sum(), b = p.B.Sum();
            for (int i = 0; i < p.A.Length; i++)
            {
                double share = (p.A[i] / a + p.B[i] / b) / 2;
                if (share > 0) mixed -= share * Math.Log2(share);
            }
            double expected = mixed - (Entropy.BitsPerSymbol(p.A) + Entropy.BitsPerSymbol(p.B)) / 2;
            return Math.Abs(Divergence.JensenShannonBits(p.A, p.B) - expected) <= 1e-12;
        });

    [Fact]
    public void Proportional_counts_do_not_diverge_at_all() =>
        Gen.Select(Gen.Long[0, 1L << 30].Array[1, 20], Gen.Long[1, 1L << 20]).Where((a, _) => a.Sum() > 0).Sample((a, times) =>
        {
            long[] b = [.. a.Select(n => n * times)];
            return Divergence.JensenShannonBits(a, b) == 0 && Divergence.KullbackLeiblerBits(a, b) == 0 && Divergence.CrossEntropyBits(a, b) == Entropy.BitsPerSymbol(a);
        });

    [Fact]
    public void Counts_without_a_common_symbol_diverge_by_one_bit() =>
        s_pairs.Sample(p => Math.Abs(Divergence.JensenShannonBits([.. p.A, .. new long[p.B.Length]], [.. new long[p.A.Length], .. p.B]) - 1) <= 1e-14);

    [Fact]
    public void Cross_entropy_is_never_below_the_entropy() =>
        s_pairs.Sample(p => Divergence.CrossEntropyBits(p.A, p.B) >= Entropy.BitsPerSymbol(p.A));

    [Fact]
    public void Cross_entropy_is_the_mean_length_of_the_other_s_ideal_words() =>
        s_pairs.Sample(p =>
        {
            double expected = 0, a = p.A.Sum(), b = p.B.Sum();
            for (int i = 0; i < p.A.Length; i++)
            {
                if (p.A[i] > 0) expected -= p.A[i] / a * Math.Log2(p.B[i] / b);
            }
            double stated = Divergence.CrossEntropyBits(p.A, p.B);
            return double.IsPositiveInfinity(expected) ? double.IsPositiveInfinity(stated) : Math.Abs(stated - expected) <= 1e-12 * Math.Max(1, expected);
        });

    /// <summary>For shares off by ε both divergences begin with ε² terms: χ²/(8 ln 2) and χ²/(2 ln 2).</summary>
    [Fact]
    public void Small_divergences_keep_their_digits()
    {
        const long n = 1L << 50, off = 1L << 20;
        double chi = Math.ScaleB(1, -60);   // Σ (p-q)²/q with shares ½ ± 2^-31 against ½
        Assert.Equal(chi / (8 * Math.Log(2)), Divergence.JensenShannonBits([n + off, n - off], [n, n]), 1e-8 * chi);
        Assert.Equal(chi / (2 * Math.Log(2)), Divergence.KullbackLeiblerBits([n + off, n - off], [n, n]), 1e-4 * chi);
    }

    [Fact]
    public void Empty_sides_and_unequal_spans()
    {
        Assert.Equal(0, Divergence.JensenShannonBits([0, 0], [1, 2]));
        Assert.Equal(0, Divergence.JensenShannonBits([1, 2], [0, 0]));
        Assert.Equal(0, Divergence.CrossEntropyBits([0, 0], [1, 2]));
        Assert.Equal(double.PositiveInfinity, Divergence.KullbackLeiblerBits([1, 1], [1, 0]));
        Assert.Equal(double.PositiveInfinity, Divergence.KullbackLeiblerBits([1, 1], [0, 0]));
        Assert.Throws<ArgumentException>(() => Divergence.JensenShannonBits([1], [1, 2]));
        Assert.Throws<ArgumentException>(() => Divergence.KullbackLeiblerBits([1], [1, 2]));
    }
}
