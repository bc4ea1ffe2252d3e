using CsCheck;
using Tallybound.Coding;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Numerics;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class MovingBlockBootstrapTests
{
    [Fact]
    public void Prefix_sums_give_the_interval_of_plain_adding() =>
        Gen.Select(Gen.Int[16, 70], Gen.Int[1, 20], Gen.ULong).SelectMany((segments, alphabet, seed) =>
            Gen.Long[0, 1000].Array[segments * alphabet].Select(counts => (segments, alphabet, seed, counts))).Sample(c =>
        {
            // Every third symbol is never used.
            for (int i = 0; i < c.counts.Length; i++)
            {
                if (i % c.alphabet % 3 == 1) c.counts[i] = 0;
            }
            var plan = new ResamplingPlan(c.segments, MovingBlockBootstrap.BlockLength(c.segments), MovingBlockBootstrap.Replicates, c.seed);
            var figures = new List<double>();
            for (int r = 1; r <= MovingBlockBootstrap.Replicates; r++)
            {
                var sums = new long[c.alphabet];
                int drawn = 0;
                foreach ((int start, int length) in plan.Blocks(r))
                {
                    drawn += length;
                    for (int i = start * c.alphabet; i < (start + length) * c.alphabet; i++) sums[i % c.alphabet] += c.counts[i];
                }
                if (drawn != c.segments) return false;
                figures.Add(Entropy.BitsPerSymbol(sums));
            }
            figures.Sort();
            var whole = new long[c.alphabet];
            for (int i = 0; i < c.counts.Length; i++) whole[i % c.alphabet] += c.counts[i];
            var expected = new Estimate(Entropy.BitsPerSymbol(whole), figures[24], figures[974]);
            return MovingBlockBootstrap.OfCounts(c.counts, c.alphabet, Entropy.BitsPerSymbol, c.seed) == expected;
        }, iter: 20);

    [Fact]
    public void A_sum_of_numbers_is_the_sum_of_one_count() =>
        Gen.Select(Gen.Int[0, 100_000].Array[16, 100], Gen.ULong).Sample((numbers, seed) =>
        {
            Estimate? ofSum = MovingBlockBootstrap.OfSum([.. numbers.Select(n => (double)n)], seed);
            Estimate? ofCounts = MovingBlockBootstrap.OfCounts([.. numbers.Select(n => (long)n)], 1, counts => counts[0], seed);
            Estimate? ofRatio = MovingBlockBootstrap.OfRatio([.. numbers.Select(n => (double)n)], [.. numbers.Select(_ => 1.0 / numbers.Length)], seed);
            return ofSum == ofCounts && Math.Abs(ofRatio!.Value.High - ofSum!.Value.High) <= 1e-9 * Math.Max(1, ofSum.Value.High);
        }, iter: 100);

    [Fact]
    public void Equal_segments_leave_nothing_uncertain()
    {
        Assert.Equal(new Estimate(160, 160, 160), MovingBlockBootstrap.OfSum([.. Enumerable.Repeat(10.0, 16)], 1));
        Assert.Equal(new Estimate(1, 1, 1), MovingBlockBootstrap.OfCounts([.. Enumerable.Repeat(3L, 40)], 2, Entropy.BitsPerSymbol, 1));
    }

    [Fact]
    public void Below_sixteen_segments_there_is_no_interval()
    {
        Assert.Null(MovingBlockBootstrap.OfSum(new double[15], 1));
        Assert.Null(MovingBlockBootstrap.OfCounts(new long[15 * 256], 256, Entropy.BitsPerSymbol, 1));
        Assert.Null(MovingBlockBootstrap.OfSum([], 1));
        Assert.NotNull(MovingBlockBootstrap.OfSum(new double[16], 1));
    }

    /// <summary>A fair process of Gaussian-like parts: the true sum lies in the interval about 95 times in 100; 16 neighbours drawn together from 256 cost little of it.</summary>
    [Fact]
    public void The_interval_holds_the_truth_about_as_often_as_it_says()
    {
        int held = 0;
        const int trials = 200;
        for (ulong trial = 0; trial < trials; trial++)
        {
            var random = new SplitMix64(trial);
            var parts = new double[256];
            for (int i = 0; i < parts.Length; i++) parts[i] = random.Below(1000) + random.Below(1000) - 999;
            Estimate estimate = MovingBlockBootstrap.OfSum(parts, trial, blockLength: 4)!.Value;
            if (estimate.Low <= 0 && estimate.High >= 0) held++;
        }
        Assert.InRange(held, trials * 86 / 100, trials * 99 / 100);
    }

    /// <summary>Long runs of like segments: drawn one by one they look far more certain than they are.</summary>
    [Fact]
    public void Blocks_of_neighbours_widen_the_interval_of_dependent_segments()
    {
        double[] parts = [.. Enumerable.Range(0, 256).Select(i => i / 16 % 2 == 0 ? 0.0 : 1.0)];
        Estimate blocks = MovingBlockBootstrap.OfSum(parts, 1)!.Value, plain = MovingBlockBootstrap.OfSum(parts, 1, blockLength: 1)!.Value;
        Assert.NotEqual(blocks, plain);
        double[] drifting = [.. Enumerable.Range(0, 256).Select(i => (double)i)];
        Estimate wide = MovingBlockBootstrap.OfSum(drifting, 1)!.Value, narrow = MovingBlockBootstrap.OfSum(drifting, 1, blockLength: 1)!.Value;
        Assert.True(wide.High - wide.Low > 2 * (narrow.High - narrow.Low));
    }

    [Fact]
    public void The_same_seed_gives_the_same_interval_and_another_seed_another()
    {
        double[] parts = [.. Enumerable.Range(0, 100).Select(i => Math.Sqrt(i))];
        Assert.Equal(MovingBlockBootstrap.OfSum(parts, 5), MovingBlockBootstrap.OfSum(parts, 5));
        Assert.NotEqual(MovingBlockBootstrap.OfSum(parts, 5), MovingBlockBootstrap.OfSum(parts, 6));
    }

    [Fact]
    public void A_block_is_the_root_of_the_segments_rounded_up()
    {
        int cases = 0;
        for (int segments = 0; segments <= 70_000; segments++, cases++)
        {
            int length = MovingBlockBootstrap.BlockLength(segments);
            Assert.True((long)length * length >= segments && (length == 0 || (long)(length - 1) * (length - 1) < segments));
        }
        Assert.Equal(70_001, cases);
    }

    [Fact]
    public void What_cannot_be_is_refused()
    {
        Assert.Throws<ArgumentException>(() => MovingBlockBootstrap.OfCounts(new long[257], 256, Entropy.BitsPerSymbol, 1));
        Assert.Throws<ArgumentException>(() => MovingBlockBootstrap.OfRatio(new double[16], new double[17], 1));
        Assert.Throws<ArgumentOutOfRangeException>(() => MovingBlockBootstrap.OfSum(new double[16], 1, blockLength: 17));
        Assert.Throws<ArgumentOutOfRangeException>(() => MovingBlockBootstrap.OfSum(new double[16], 1, blockLength: 0));
    }
}
