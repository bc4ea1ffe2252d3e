using CsCheck;
using Tallybound.Coding.Codes.Tans;
using Tallybound.Tests.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Codes.Tans;

public sealed class QuantizedFrequenciesTests
{
    [Fact]
    public void Frequencies_are_those_of_taking_one_unit_after_another_where_it_saves_most()
    {
        int compared = 0;
        Gen.Select(CodeLengths.Counts, Gen.Int[5, 12]).Sample((counts, log) =>
        {
            int[] fitted = new int[counts.Length];
            if (!QuantizedFrequencies.TryFit(counts, log, fitted)) return;
            Assert.Equal(OneByOne(counts, log), fitted);
            Interlocked.Increment(ref compared);
        });
        Assert.True(compared >= 50, $"{compared} are too few.");
    }

    [Fact]
    public void No_move_of_a_unit_from_one_symbol_to_another_makes_the_payload_smaller() =>
        Gen.Select(CodeLengths.Counts, Gen.Int[12, 16]).Sample((counts, log) =>
        {
            int[] fitted = new int[counts.Length];
            Assert.True(QuantizedFrequencies.TryFit(counts, log, fitted));
            Assert.Equal(1 << log, fitted.Sum());
            Assert.All(counts.Zip(fitted), pair => Assert.Equal(pair.First > 0, pair.Second > 0));
            double most = 0, least = double.PositiveInfinity;
            for (int symbol = 0; symbol < counts.Length; symbol++)
            {
                if (counts[symbol] == 0) continue;
                most = Math.Max(most, counts[symbol] * Math.Log2((fitted[symbol] + 1.0) / fitted[symbol]));
                if (fitted[symbol] > 1) least = Math.Min(least, counts[symbol] * Math.Log2(fitted[symbol] / (fitted[symbol] - 1.0)));
            }
            Assert.True(most <= least * (1 + 1e-12), $"A unit would save {most} and cost {least}.");
        });

    [Fact]
    public void Too_many_symbols_or_none_have_no_frequencies()
    {
        Assert.False(QuantizedFrequencies.TryFit(new long[4], 5, new int[4]));
        Assert.False(QuantizedFrequencies.TryFit([.. Enumerable.Repeat(1L, 33)], 5, new int[33]));
        int[] all = new int[32];
        Assert.True(QuantizedFrequencies.TryFit([.. Enumerable.Range(1, 32).Select(n => (long)n)], 5, all));
        Assert.All(all, frequency => Assert.Equal(1, frequency));
    }

    [Fact]
    public void Counts_that_are_a_table_already_stay_as_they_are()
    {
        int[] fitted = new int[4];
        Assert.True(QuantizedFrequencies.TryFit([160, 80, 40, 40], 5, fitted));
        Assert.Equal([16, 8, 4, 4], fitted);
    }

    private static int[] OneByOne(long[] counts, int log)
    {
        int[] frequencies = [.. counts.Select(count => count > 0 ? 1 : 0)];
        for (int left = (1 << log) - frequencies.Sum(); left > 0; left--)
        {
            int best = -1;
            double bestSaving = -1;
            for (int symbol = 0; symbol < counts.Length; symbol++)
            {
                if (counts[symbol] == 0) continue;
                double saving = counts[symbol] * Math.Log2((frequencies[symbol] + 1.0) / frequencies[symbol]);
                if (saving > bestSaving) (best, bestSaving) = (symbol, saving);
            }
            frequencies[best]++;
        }
        return frequencies;
    }
}
