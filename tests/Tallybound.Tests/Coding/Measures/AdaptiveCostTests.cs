using System.Text.Json;
using CsCheck;
using Tallybound.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class AdaptiveCostTests
{
    [Fact]
    public void Krichevsky_and_Trofimov_s_table_of_probabilities()
    {
        JsonElement vector = MeasureVectors.Of("kt-table");
        int cases = 0;
        foreach (JsonProperty entry in vector.GetProperty("expected").EnumerateObject())
        {
            long[] counts = [.. entry.Name.Split(',').Select(long.Parse)];
            double[] fraction = [.. entry.Value.GetString()!.Split('/').Select(double.Parse)];
            double probability = fraction.Length == 1 ? fraction[0] : fraction[0] / fraction[1];
            Assert.Equal(-Math.Log2(probability), AdaptiveCost.Bits(counts, 2, 0.5), 1e-14);
            cases++;
        }
        Assert.Equal(15, cases);
    }

    [Fact]
    public void The_largest_redundancy_at_1024_bits_stays_below_half_log2_T_plus_1()
    {
        JsonElement vector = MeasureVectors.Of("kt-1024");
        int length = vector.GetProperty("input").GetInt32();
        double largest = Enumerable.Range(0, length + 1).Max(zeros => AdaptiveCost.Bits([zeros, length - zeros], 2, 0.5) - Entropy.Bound([zeros, length - zeros]).Bits);
        Assert.Equal(vector.Expected()[0], largest, vector.Tolerance());
        Assert.True(largest <= 0.5 * Math.Log2(length) + 1);
    }

    [Fact]
    public void A_short_text_over_256_symbols()
    {
        JsonElement vector = MeasureVectors.Of("kt-abra256");
        var counts = new long[256];
        foreach (char c in vector.Text()) counts[c]++;
        Assert.Equal(vector.Expected()[0], AdaptiveCost.Bits(counts, 256, 0.5), vector.Tolerance());
    }

    [Fact]
    public void It_is_what_the_sequential_coder_spends_in_any_order_of_symbols() =>
        Gen.Select(Gen.Int[0, 9].Array[0, 300], Gen.Double[-12, 3]).Sample((symbols, exponent) =>
        {
            double alpha = Math.Pow(2, exponent), bits = 0;
            var counts = new long[10];
            for (int i = 0; i < symbols.Length; i++) bits -= Math.Log2((counts[symbols[i]]++ + alpha) / (i + 10 * alpha));
            double stated = AdaptiveCost.Bits(counts, 10, alpha);
            return Math.Abs(stated - bits) <= 1e-11 * Math.Max(1, bits) && stated >= Entropy.Bound(counts).Bits;
        });

    [Fact]
    public void Nothing_costs_nothing_and_what_cannot_be_is_refused()
    {
        Assert.Equal(0, AdaptiveCost.Bits([], 256, 0.5));
        Assert.Equal(0, AdaptiveCost.Bits([12], 1, 0.5));
        Assert.Throws<ArgumentOutOfRangeException>(() => AdaptiveCost.Bits([1], 2, 0));
        Assert.Throws<ArgumentOutOfRangeException>(() => AdaptiveCost.Bits([1, 1, 1], 2, 0.5));
    }
}
