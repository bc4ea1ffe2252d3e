using CsCheck;
using MathNet.Numerics;
using Tallybound.Coding.Numerics;
using Tallybound.Tests.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Numerics;

public sealed class NumericsTests
{
    [Fact]
    public void LnGamma_agrees_with_MathNet_to_fourteen_digits() =>
        Gen.Double[-9, 12].Sample(exponent =>
        {
            double x = Math.Pow(10, exponent), expected = SpecialFunctions.GammaLn(x);
            return Math.Abs(GammaFunction.LnGamma(x) - expected) <= 1e-14 * Math.Max(1, Math.Abs(expected));
        });

    /// <summary>Γ(n) = (n-1)!, summed in logarithms of integers.</summary>
    [Fact]
    public void LnGamma_of_integers_is_the_log_of_the_factorial()
    {
        int cases = 0;
        var sum = new NeumaierSum();
        for (int n = 1; n <= 5000; n++, cases++)
        {
            Assert.Equal(sum.Value, GammaFunction.LnGamma(n), 1e-14 * Math.Max(1, sum.Value));
            sum.Add(Math.Log(n));
        }
        Assert.Equal(5000, cases);
    }

    /// <summary>Γ(½) = √π, NIST DLMF 5.4.6.</summary>
    [Fact]
    public void LnGamma_of_a_half_is_half_ln_pi() => Assert.Equal(Math.Log(Math.PI) / 2, GammaFunction.LnGamma(0.5), 1e-14);

    [Theory]
    [InlineData(0)]
    [InlineData(-1)]
    [InlineData(double.NaN)]
    public void LnGamma_refuses_what_is_not_positive(double x) =>
        Assert.Throws<ArgumentOutOfRangeException>(() => GammaFunction.LnGamma(x));

    /// <summary>The rising factorial a(a+1)…(a+n-1), multiplied out in logarithms.</summary>
    [Fact]
    public void The_excess_of_a_rising_factorial_is_its_log_beyond_n_ln_n_less_n()
    {
        int cases = 0;
        for (int exponent = -16; exponent <= 16; exponent += 2)
        {
            double a = Math.ScaleB(1, exponent);
            var log = new NeumaierSum();
            for (int n = 1; n <= 2000; n++, cases++)
            {
                log.Add(Math.Log(a + n - 1));
                double expected = log.Value - n * Math.Log(n) + n, scale = Math.Max(Math.Abs(log.Value), n * Math.Log(n));
                Assert.Equal(expected, GammaFunction.RisingFactorialExcess(n, a), 4e-15 * Math.Max(10, scale));
            }
        }
        Assert.Equal(17 * 2000, cases);
        Assert.Equal(0, GammaFunction.RisingFactorialExcess(0, 0.5));
    }

    /// <summary>For α = 1 the excess is ln n! - n ln n + n = ½ ln(2πn) + 1/(12n) - …, where ln n! itself would drown it.</summary>
    [Fact]
    public void The_excess_keeps_its_digits_at_large_counts() =>
        Assert.Equal(0.5 * Math.Log(2 * Math.PI * 1e12) + 1 / 12e12, GammaFunction.RisingFactorialExcess(1_000_000_000_000, 1), 1e-13);

    [Fact]
    public void The_series_for_large_counts_gives_the_same_excess() =>
        Gen.Select(Gen.Int[0, 16], Gen.Int[0, 40], Gen.Long[0, 1L << 40]).Sample((exponent, shift, more) =>
        {
            double a = Math.ScaleB(1, -exponent);
            long n = RisingFactorialSeries.From + (more >> shift);
            double expected = GammaFunction.RisingFactorialExcess(n, a);
            return Math.Abs(new RisingFactorialSeries(a).At(Math.Log(n), 1.0 / n) - expected) <= 1e-14 * Math.Max(1, Math.Abs(expected)) * 2;
        });

    [Fact]
    public void Log1p_keeps_the_digits_of_small_arguments() =>
        Gen.Double[-300, -0.1].Sample(exponent =>
        {
            double x = Math.Pow(10, exponent);
            double expected = x < 1e-4 ? x - x * x / 2 + x * x * x / 3 - x * x * x * x / 4 : Math.Log(1 + x);
            return Math.Abs(Logarithm.Log1p(x) - expected) <= (x < 1e-4 ? 1e-15 : 1e-11) * expected
                && Math.Abs(Logarithm.Log1p(-x / 2) + x / 2) <= x * x;
        });

    [Fact]
    public void Log1p_is_defined_at_its_edges()
    {
        Assert.Equal(0, Logarithm.Log1p(0));
        Assert.Equal(double.NegativeInfinity, Logarithm.Log1p(-1));
        Assert.Equal(double.PositiveInfinity, Logarithm.Log1p(double.PositiveInfinity));
        Assert.True(double.IsNaN(Logarithm.Log1p(-2)));
    }

    /// <summary>Neumaier 1974: 1 + 1e100 + 1 - 1e100 is 2; Kahan's sum answers 0.</summary>
    [Fact]
    public void A_compensated_sum_survives_a_large_term()
    {
        var sum = new NeumaierSum();
        foreach (double term in (double[])[1, 1e100, 1, -1e100]) sum.Add(term);
        Assert.Equal(2, sum.Value);
    }

    [Fact]
    public void The_generator_gives_the_numbers_of_its_algorithm()
    {
        var random = new SplitMix64(1234567);
        ulong[] expected = [.. MeasureVectors.Of("splitmix64").GetProperty("expected").EnumerateArray().Select(value => ulong.Parse(value.GetString()!))];
        Assert.Equal(5, expected.Length);
        foreach (ulong number in expected) Assert.Equal(number, random.Next());
    }

    [Fact]
    public void Bounded_numbers_fill_their_range_evenly()
    {
        var random = new SplitMix64(7);
        var counts = new long[10];
        for (int i = 0; i < 100_000; i++) counts[random.Below(10)]++;
        Assert.InRange(Tallybound.Coding.Measures.Uniformity.ChiSquare(counts).UpperTailProbability, 0.001, 0.999);
        Assert.Equal(0, random.Below(1));
        Assert.Throws<ArgumentOutOfRangeException>(() => random.Below(0));
    }
}
