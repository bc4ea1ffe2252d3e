using System.Numerics;
using System.Text.Json;
using CsCheck;
using MathNet.Numerics.Statistics;
using Tallybound.Coding;
using Tallybound.Coding.Measures;
using Tallybound.Tests.Coding.Numerics;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class EntropyTests
{
    /// <summary>Counts of every size from 1 to 2^40, few or many, with zeros among them.</summary>
    private static readonly Gen<long[]> s_counts = Gen.Select(Gen.Int[0, 40], Gen.Long[0, 1L << 40], (shift, n) => n >> shift).Array[1, 40];

    [Fact]
    public void Entropy_lies_between_nothing_and_log2_of_the_symbols_in_use() =>
        s_counts.Sample(counts =>
        {
            int inUse = counts.Count(n => n > 0);
            double h = Entropy.BitsPerSymbol(counts);
            return h >= 0 && !double.IsNegative(h) && h <= Math.Log2(Math.Max(1, inUse)) + 1e-12 && (inUse >= 2) == (h > 0);
        });

    [Fact]
    public void Entropy_does_not_depend_on_the_names_of_symbols() =>
        s_counts.Sample(counts => Math.Abs(Entropy.BitsPerSymbol(counts) - Entropy.BitsPerSymbol([.. counts.Reverse()])) <= 1e-13 * Entropy.BitsPerSymbol(counts));

    /// <summary>Shannon 1948, section 6, property 3: a choice in two steps holds what the one choice holds.</summary>
    [Fact]
    public void Entropy_of_a_choice_in_two_steps_adds_up() =>
        Gen.Select(s_counts, s_counts).Where((a, b) => a.Sum() > 0 && b.Sum() > 0).Sample((a, b) =>
        {
            double whole = Entropy.Bound([.. a, .. b]).Bits;
            double steps = Entropy.Bound([a.Sum(), b.Sum()]).Bits + Entropy.Bound(a).Bits + Entropy.Bound(b).Bits;
            return Math.Abs(whole - steps) <= 1e-12 * whole;
        });

    [Fact]
    public void Relative_error_stays_within_the_stated_bound() =>
        s_counts.Where(counts => counts.Count(n => n > 0) > 1).Sample(counts =>
        {
            BigInteger total = counts.Aggregate(BigInteger.Zero, (sum, n) => sum + n), bits = BigInteger.Zero;
            foreach (long n in counts.Where(n => n > 0)) bits += n * FixedPoint.Log2(total, n);
            BigInteger exact = bits / total;
            BigInteger stated = (BigInteger)Math.ScaleB(Entropy.BitsPerSymbol(counts), 200) << (FixedPoint.Places - 200);
            int inUse = counts.Count(n => n > 0);
            return BigInteger.Abs(stated - exact) << 53 <= (inUse + 16) * exact;
        }, iter: 2000);

    [Fact]
    public void Self_information_keeps_its_digits_next_to_certainty() =>
        Gen.Select(Gen.Long[1, 1L << 50], Gen.Long[1, 1L << 50]).Sample((a, b) =>
        {
            double exact = FixedPoint.ToDouble(FixedPoint.Log2((BigInteger)a + b, a));
            return Math.Abs(Entropy.SelfInformation(a, a + b) - exact) <= 8 * Math.ScaleB(exact, -53);
        }, iter: 2000);

    [Fact]
    public void MathNet_gives_the_same_entropy() =>
        Gen.Int[0, 20].Array[1, 400].Sample(symbols =>
        {
            var counts = new long[21];
            foreach (int symbol in symbols) counts[symbol]++;
            return Math.Abs(StreamingStatistics.Entropy(symbols.Select(symbol => (double)symbol)) - Entropy.BitsPerSymbol(counts)) <= 1e-12;
        });

    [Fact]
    public void The_standard_error_is_the_spread_of_self_information_over_root_N() =>
        s_counts.Where(counts => counts.Sum() > 0).Sample(counts =>
        {
            double total = counts.Sum(), h = Entropy.BitsPerSymbol(counts), variance = 0;
            foreach (long n in counts.Where(n => n > 0)) variance += n / total * Math.Pow(Entropy.SelfInformation(n, (long)total) - h, 2);
            return Math.Abs(Entropy.StandardErrorBits(counts) - Math.Sqrt(variance / total)) <= 1e-9 * Math.Sqrt(variance / total) + 1e-15;
        });

    [Fact]
    public void The_standard_error_of_uniform_counts_is_exactly_zero() =>
        Gen.Select(Gen.Int[1, 300], Gen.Long[1, 1L << 40]).Sample((symbols, n) => Entropy.StandardErrorBits([.. Enumerable.Repeat(n, symbols)]) == 0);

    [Fact]
    public void Nothing_and_one_symbol_hold_no_information_and_no_minus_sign()
    {
        int cases = 0;
        foreach (long[] counts in (long[][])[[], [0, 0], [7], [0, 1L << 60, 0]])
        {
            Assert.Equal(0, BitConverter.DoubleToInt64Bits(Entropy.BitsPerSymbol(counts)));
            Assert.Equal(new EntropyBound(0, BoundClass.Memoryless), Entropy.Bound(counts));
            Assert.Equal(0, BitConverter.DoubleToInt64Bits(Entropy.StandardErrorBits(counts)));
            cases++;
        }
        Assert.Equal(4, cases);
        Assert.Equal(1.25, Entropy.Corrected(1.25, 0, 0));
        Assert.Equal(0, BitConverter.DoubleToInt64Bits(Entropy.Corrected(0, 1, 5)));
    }

    [Theory]
    [InlineData("shannon48-4")]
    [InlineData("shannon48-3")]
    [InlineData("mackay-eng")]
    [InlineData("sayood-3.2.1")]
    [InlineData("sayood-ext")]
    [InlineData("shannon51-F0-26")]
    [InlineData("shannon51-F0-27")]
    public void Published_entropies(string id)
    {
        JsonElement vector = MeasureVectors.Of(id);
        Assert.Equal(vector.Expected()[0], Entropy.BitsPerSymbol(vector.Counts()), vector.Tolerance());
    }

    [Fact]
    public void One_odd_symbol_among_a_million_million_still_counts()
    {
        JsonElement vector = MeasureVectors.Of("skewed-1e12");
        double expected = vector.Expected()[0];
        Assert.Equal(expected, Entropy.Bound(vector.Counts()).Bits, expected * vector.Tolerance());
    }

    [Fact]
    public void Sending_each_symbol_twice_halves_the_rate()
    {
        JsonElement vector = MeasureVectors.Of("lntwww-q1");
        double h = Entropy.BitsPerSymbol(vector.Counts());
        Assert.Equal(vector.Expected()[0], h, vector.Tolerance());
        Assert.Equal(vector.Expected()[1], h / 2, vector.Tolerance());
    }

    [Fact]
    public void The_correction_is_that_of_Miller_and_Madow()
    {
        JsonElement vector = MeasureVectors.Of("mm-own");
        long[] counts = vector.Counts();
        double h = Entropy.BitsPerSymbol(counts);
        Assert.Equal(vector.Expected()[0], h, vector.Tolerance());
        Assert.Equal(vector.Expected()[1], Entropy.Corrected(h, counts.Length, counts.Sum()), vector.Tolerance());
    }

    [Fact]
    public void The_mean_over_all_tosses_of_a_fair_coin_is_too_low_by_the_known_amount()
    {
        JsonElement vector = MeasureVectors.Of("plugin-coin");
        long[] tosses = vector.Counts();
        double[] expected = vector.Expected();
        for (int i = 0; i < tosses.Length; i++)
        {
            double mean = 0;
            for (int sequence = 0; sequence < 1 << (int)tosses[i]; sequence++)
            {
                int heads = BitOperations.PopCount((uint)sequence);
                mean += Math.ScaleB(Entropy.BitsPerSymbol([heads, tosses[i] - heads]), -(int)tosses[i]);
            }
            Assert.Equal(expected[i], mean, vector.Tolerance());
        }
        Assert.Equal(4, tosses.Length);
    }

    [Fact]
    public void Every_stored_value_has_a_source_and_a_status()
    {
        Assert.Equal(19, MeasureVectors.Count);
        string path = Path.Combine(AppContext.BaseDirectory, "vectors", "measures", "measures.json");
        using JsonDocument document = JsonDocument.Parse(File.ReadAllBytes(path));
        foreach (JsonElement entry in document.RootElement.EnumerateArray())
        {
            Assert.NotEqual("", entry.GetProperty("source").GetString());
            Assert.All(entry.GetProperty("status").EnumerateArray(), word => Assert.Contains(word.GetString(), (string[])["verified", "recomputed", "memory"]));
        }
    }
}
