using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes.Tans;
using Tallybound.Tests.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Codes.Tans;

public sealed class TansPriceTests
{
    [Theory]
    [InlineData("tans-dyadic")]
    [InlineData("tans-20-12")]
    [InlineData("tans-10-10-6-6")]
    [InlineData("tans-31-1")]
    public void The_steady_rate_is_the_one_computed_elsewhere(string id)
    {
        System.Text.Json.JsonElement vector = TableVectors.Of(id);
        int[] frequencies = vector.Integers("input");
        double rate = TansPrice.BitsPerSymbol([.. frequencies.Select(frequency => (long)frequency)], frequencies, 5);
        Assert.Equal(vector.GetProperty("expected").GetDouble(), rate, vector.GetProperty("tolerance").GetDouble());
    }

    /// <summary>The chain built from the encoder's own steps, symbol by symbol, and solved by elimination.</summary>
    [Fact]
    public void The_steady_rate_is_that_of_the_chain_of_the_encoders_own_steps()
    {
        int compared = 0;
        Gen.Select(Gen.Long[0, 2000].Array[2, 12], Gen.Int[5, 7], Gen.Int[1, 400]).Sample((drawn, log, weight) =>
        {
            long[] counts = [(drawn[0] + 1) * weight, drawn[1] + 1, .. drawn[2..]];
            int[] frequencies = new int[counts.Length];
            Assert.True(QuantizedFrequencies.TryFit(counts, log, frequencies));
            // A chain that falls apart, as powers of two alone may make it, has no one steady state.
            double eliminated = Eliminated(counts, frequencies, log);
            if (!double.IsFinite(eliminated)) return;
            Assert.Equal(eliminated, TansPrice.BitsPerSymbol(counts, frequencies, log), 1e-9);
            Interlocked.Increment(ref compared);
        });
        Assert.True(compared >= 80, $"{compared} are too few.");
    }

    /// <summary>The steady rate is N times what long runs spend: independent symbols, three tables, within five standard errors.</summary>
    [Theory]
    [InlineData(new long[] { 900, 80, 15, 5 }, 8)]
    [InlineData(new long[] { 31, 29, 23, 19, 17, 13, 11, 7, 5, 3, 2, 1 }, 9)]
    [InlineData(new long[] { 995, 5 }, 10)]
    public void Written_bits_follow_the_price(long[] counts, int log)
    {
        const int length = 200_000;
        int[] source = [.. counts.SelectMany((count, symbol) => Enumerable.Repeat(symbol, (int)count))];
        var random = new Random(17);
        int[] symbols = new int[length];
        long[] drawn = new long[counts.Length];
        for (int i = 0; i < length; i++) drawn[symbols[i] = source[random.Next(source.Length)]]++;
        int[] frequencies = new int[counts.Length];
        Assert.True(QuantizedFrequencies.TryFit(drawn, log, frequencies));
        var counter = default(BitCounter);
        TansCoder.Encode(symbols, new TansTable(frequencies, log), ref counter);
        Assert.True(TansPrice.TryPrice(drawn, log, out long priced));
        Assert.Equal(priced, counter.Bits, 5 * Math.Sqrt(length));
    }

    /// <summary>By hand: powers of two give off log2(2^R/f) bits from every state.</summary>
    [Fact]
    public void Powers_of_two_cost_their_logarithm_whatever_the_source()
    {
        Assert.Equal(1, TansPrice.BitsPerSymbol([1029, 1207], [16, 16], 5), 1e-12);
        Assert.Equal((100 * 1) + (30 * 2) + (7 * 3) + (3 * 3) + 6, TansPrice.PayloadBits([100, 30, 7, 3], [32, 16, 8, 8], 6));
    }

    [Fact]
    public void One_symbol_costs_its_last_state_and_none_costs_nothing()
    {
        Assert.True(TansPrice.TryPrice([0, 12345, 0], 9, out long bits));
        Assert.Equal(9, bits);
        Assert.False(TansPrice.TryPrice(new long[3], 9, out bits));
        Assert.Equal(0, bits);
        Assert.False(TansPrice.TryPrice([.. Enumerable.Repeat(1L, 33)], 5, out _));
    }

    /// <summary>By hand: N = 2,048 has 12 bits; 256 symbols ask for 9.</summary>
    [Fact]
    public void The_table_grows_with_the_source_and_holds_its_symbols()
    {
        Assert.Equal(5, TansTableLog.For(1, 1));
        Assert.Equal(10, TansTableLog.For(2048, 20));
        Assert.Equal(9, TansTableLog.For(300, 256));
        Assert.Equal(12, TansTableLog.For(1L << 40, 256));
        Assert.Equal(12, TansTableLog.For(70_000, 65_536));
    }

    private static double Eliminated(long[] counts, int[] frequencies, int log)
    {
        int size = 1 << log;
        var table = new TansTable(frequencies, log);
        double total = counts.Sum();
        // Columns hold P − I; the last equation says that the weights add up to 1.
        var rows = MathNet.Numerics.LinearAlgebra.Matrix<double>.Build.Dense(size, size);
        double[] given = new double[size];
        for (int cell = 0; cell < size; cell++)
        {
            rows[cell, cell] -= 1;
            for (int symbol = 0; symbol < counts.Length; symbol++)
            {
                if (counts[symbol] == 0) continue;
                (int next, _, int bits) = table.Step(cell, symbol);
                rows[next, cell] += counts[symbol] / total;
                given[cell] += bits * counts[symbol] / total;
            }
        }
        var right = MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(size);
        for (int cell = 0; cell < size; cell++) rows[size - 1, cell] = 1;
        right[size - 1] = 1;
        return rows.Solve(right).DotProduct(MathNet.Numerics.LinearAlgebra.Vector<double>.Build.Dense(given));
    }
}
