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

    [Fact]
    public void Golomb_codes_the_largest_numbers_too()
    {
        foreach (long m in new[] { (1L << 62) - 1, 1L << 62 })
        {
            foreach (long value in new[] { 0, m - 1, m, long.MaxValue - 1, long.MaxValue })
            {
                var writer = new BitWriter();
                GolombCode.Encode(value, m, ref writer);
                var reader = new BitReader(writer.ToArray());
                Assert.Equal(value, GolombCode.Decode(ref reader, m));
                Assert.Equal(GolombCode.Length(value, m), writer.Bits);
            }
        }
        Assert.Throws<ArgumentOutOfRangeException>(() => GolombCode.Length(1, (1L << 62) + 1));
    }

    [Fact]
    public void Words_of_numbers_that_are_too_large_are_refused_not_wrapped()
    {
        Assert.Throws<InvalidDataException>(() =>
        {
            // A quotient of 3 by 2^62 makes 3·2^62, above 2^63.
            byte[] bits = [0b1110_0000, .. new byte[16]];
            var reader = new BitReader(bits);
            GolombCode.Decode(ref reader, 1L << 62);
        });
        foreach (int k in new[] { 1, 8, 32 })
        {
            // γ of 2^(62 − k) + 1, so that value/2^k is 2^(62 − k): one doubling too many.
            var writer = new BitWriter();
            EliasGamma.Encode((1L << (62 - k)) + 1, ref writer);
            writer.Write(0, k);
            byte[] bits = writer.ToArray();
            Assert.Throws<InvalidDataException>(() =>
            {
                var reader = new BitReader(bits);
                ExpGolombCode.Decode(ref reader, k);
            });
        }
    }

    [Fact]
    public void A_parameter_searched_is_the_cheapest_of_all_and_never_dearer_than_the_rule_or_rice()
    {
        int cases = 0;
        Gen.Select(Gen.Long[0, 60], Gen.Long[0, 50]).Array[1, 20].Sample(
            numbers =>
            {
                cases++;
                long[] values = [.. numbers.Select(number => number.Item1)], counts = [.. numbers.Select(number => number.Item2)];
                long Bits(long m) => numbers.Sum(number => number.Item2 * GolombCode.Length(number.Item1, m));
                (long m, long bits) = GolombParameter.BySearch(values, counts);
                (int k, long riceBits) = GolombParameter.Rice(values, counts);
                return bits == Enumerable.Range(1, 200).Min(each => Bits(each)) && bits == Bits(m) && bits <= Bits(GolombParameter.ByRule(values, counts))
                    && riceBits == Enumerable.Range(0, 10).Min(each => Bits(1L << each)) && riceBits == Bits(1L << k);
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    [Fact]
    public void A_search_among_large_numbers_beats_rice_and_the_rule()
    {
        int cases = 0;
        Gen.Select(Gen.Int[1, 61].SelectMany(bit => Gen.Long[0, 1L << bit]), Gen.Long[1, 1_000_000]).Array[1, 12].Sample(
            numbers =>
            {
                cases++;
                long[] values = [.. numbers.Select(number => number.Item1)], counts = [.. numbers.Select(number => number.Item2)];
                long bits = GolombParameter.BySearch(values, counts).PayloadBits, rule = GolombParameter.ByRule(values, counts);
                UInt128 byRule = 0;
                foreach ((long value, long count) in numbers) byRule += (UInt128)count * (UInt128)GolombCode.Length(value, rule);
                return (UInt128)bits <= byRule && bits <= GolombParameter.Rice(values, counts).PayloadBits;
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
        Assert.Equal((1, 0L), GolombParameter.BySearch([], []));
        Assert.Equal((1, 9L), GolombParameter.BySearch([0], [9]));
        Assert.Equal((0, 9L), GolombParameter.Rice([0], [9]));
        Assert.Equal(GolombCode.ParameterFor(0.9), GolombParameter.ByRule([9], [1]));
    }

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
