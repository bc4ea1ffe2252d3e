using System.Text.Json;
using Tallybound.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class UniformityTests
{
    /// <summary>Counts with a chosen statistic: two of 256 symbols lie off the mean of 10^14 by the same amount.</summary>
    [Fact]
    public void Upper_points_of_255_degrees_are_those_of_the_tables()
    {
        JsonElement vector = MeasureVectors.Of("chi2-255");
        double[] points = vector.Expected();
        string[] chances = [.. vector.GetProperty("input").EnumerateArray().Select(value => value.GetString()!)];
        for (int i = 0; i < points.Length; i++)
        {
            const long mean = 100_000_000_000_000;
            long off = (long)Math.Round(Math.Sqrt(points[i] * mean / 2));
            var counts = new long[256];
            Array.Fill(counts, mean);
            counts[3] += off;
            counts[200] -= off;
            (double statistic, int degrees, double chance) = Uniformity.ChiSquare(counts);
            Assert.Equal(points[i], statistic, 1e-5);
            Assert.Equal(255, degrees);
            Assert.Equal(double.Parse(chances[i]), chance, vector.Tolerance());
        }
        Assert.Equal(5, points.Length);
    }

    /// <summary>With 2 degrees of freedom the upper tail is exp(-χ²/2), exactly.</summary>
    [Fact]
    public void The_far_tail_keeps_its_digits()
    {
        (double statistic, _, double chance) = Uniformity.ChiSquare([1000, 1000, 1600]);
        Assert.Equal(200, statistic, 1e-10);
        Assert.Equal(Math.Exp(-100), chance, 1e-10 * Math.Exp(-100));
    }

    /// <summary>A die thrown 60 times: (4 + 1 + 4 + 1 + 16 + 16)/10 by hand.</summary>
    [Fact]
    public void The_statistic_of_a_die_is_the_one_worked_by_hand() =>
        Assert.Equal(4.2, Uniformity.ChiSquare([8, 9, 12, 11, 6, 14]).Statistic, 1e-12);

    [Fact]
    public void Nothing_counted_and_one_symbol_say_nothing_against_uniformity()
    {
        Assert.Equal((0, 255, 1), Uniformity.ChiSquare(new long[256]));
        Assert.Equal((0, 0, 1), Uniformity.ChiSquare([12]));
        Assert.Throws<ArgumentException>(() => Uniformity.ChiSquare([]));
    }

    [Fact]
    public void One_symbol_alone_in_a_large_alphabet_has_no_chance()
    {
        var counts = new long[65_536];
        counts[9] = 1L << 40;
        (double statistic, int degrees, double chance) = Uniformity.ChiSquare(counts);
        Assert.Equal(65_535, degrees);
        Assert.Equal(65_535.0 * (1L << 40), statistic, 1e6);
        Assert.Equal(0, chance);
    }
}
