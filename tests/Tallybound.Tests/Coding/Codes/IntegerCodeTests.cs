using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

public sealed class IntegerCodeTests
{
    private delegate void Encoder(long value, ref BitWriter writer);

    private delegate long Decoder(ref BitReader reader);

    private static readonly Gen<long> Values = Gen.OneOf(Gen.Long[0, 300], Gen.Long[0, 1L << 40], Gen.Int[0, 61].Select(bit => (1L << bit) - 1));

    private static void Check(Gen<long> values, Func<long, long> length, Encoder encode, Decoder decode)
    {
        int cases = 0;
        values.Sample(
            value =>
            {
                cases++;
                var writer = new BitWriter();
                encode(value, ref writer);
                var reader = new BitReader(writer.ToArray());
                return writer.Bits == length(value) && decode(ref reader) == value && reader.Position == writer.Bits;
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    [Fact]
    public void Elias_gamma_writes_what_it_counts_and_reads_it_back() => Check(Values.Select(value => value + 1), value => EliasGamma.Length(value), EliasGamma.Encode, EliasGamma.Decode);

    [Fact]
    public void Elias_delta_writes_what_it_counts_and_reads_it_back() => Check(Values.Select(value => value + 1), value => EliasDelta.Length(value), EliasDelta.Encode, EliasDelta.Decode);

    [Fact]
    public void Elias_omega_writes_what_it_counts_and_reads_it_back() => Check(Values.Select(value => value + 1), value => EliasOmega.Length(value), EliasOmega.Encode, EliasOmega.Decode);

    [Fact]
    public void Leb128_writes_what_it_counts_and_reads_it_back() => Check(Values, value => Leb128.Length(value), Leb128.Encode, Leb128.Decode);

    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(5)]
    [InlineData(8)]
    [InlineData(100)]
    public void Golomb_writes_what_it_counts_and_reads_it_back(long m) => Check(
        Gen.Long[0, 3000], value => GolombCode.Length(value, m), (long value, ref BitWriter writer) => GolombCode.Encode(value, m, ref writer), (ref BitReader reader) => GolombCode.Decode(ref reader, m));

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(7)]
    public void Exp_golomb_writes_what_it_counts_and_reads_it_back(int k) => Check(
        Values, value => ExpGolombCode.Length(value, k), (long value, ref BitWriter writer) => ExpGolombCode.Encode(value, k, ref writer), (ref BitReader reader) => ExpGolombCode.Decode(ref reader, k));

    /// <summary>Expected lengths for a geometric distribution, computed by independent code: θ 0.7, 0.8, 0.9.</summary>
    [Theory]
    [InlineData(0.7, 2, 2.960784)]
    [InlineData(0.8, 3, 3.639344)]
    [InlineData(0.9, 7, 4.725119)]
    public void The_rule_gives_the_cheapest_parameter_of_a_geometric_distribution(double theta, long expected, double rate)
    {
        double Rate(long m) => Enumerable.Range(0, 2000).Sum(n => (1 - theta) * Math.Pow(theta, n) * GolombCode.Length(n, m));
        Assert.Equal(expected, GolombCode.ParameterFor(theta));
        Assert.Equal(rate, Rate(expected), 1e-6);
        for (long m = 1; m < 20; m++) Assert.True(Rate(m) >= Rate(expected) - 1e-12);
    }
}
