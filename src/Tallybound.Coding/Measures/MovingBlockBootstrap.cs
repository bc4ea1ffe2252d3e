using System.Buffers;
using System.Numerics;
using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>A figure of summed counts, such as <see cref="Entropy.BitsPerSymbol"/>. Symbols that the whole source never used are left out of the span, which must not be kept.</summary>
public delegate double CountStatistic(ReadOnlySpan<long> counts);

/// <summary>95 % intervals of figures of a source that was tallied in segments, by drawing runs of neighbouring segments again and again.</summary>
/// <remarks>
/// Neighbouring segments resemble each other, so whole runs are drawn: H. Künsch, The jackknife and the bootstrap for general stationary observations,
/// Annals of Statistics 17 (1989). A replicate draws blocks of neighbours, each start equally likely, until it has as many segments as the source, the last
/// block cut short. The interval is the 25th and the 975th of 1,000 replicates in ascending order (B. Efron's percentile interval, by nearest rank); it need not
/// lie evenly about the value. The generator is <see cref="SplitMix64"/>, so a seed gives the same interval on every platform.
/// Below 16 segments there is no interval, and the answer is null.
/// </remarks>
public static class MovingBlockBootstrap
{
    /// <summary>Replicates of an interval.</summary>
    public const int Replicates = 1000;

    /// <summary>Fewer segments than this give no interval.</summary>
    public const int FewestSegments = 16;

    private const int LowRank = 24, HighRank = 974;

    /// <summary>⌈√segments⌉, the length of a block of neighbours.</summary>
    public static int BlockLength(int segments)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(segments);
        int root = (int)Math.Sqrt(segments);
        return root * root < segments ? root + 1 : root;
    }

    /// <summary>The interval of a figure of summed counts.</summary>
    /// <param name="counts">Segment after segment, <paramref name="alphabetSize"/> counts each.</param>
    /// <param name="alphabetSize">1 or more.</param>
    /// <param name="statistic">The figure; it is taken of the whole once and of each replicate.</param>
    /// <param name="seed">Recorded beside the figure.</param>
    /// <param name="blockLength">Neighbours drawn together; null for <see cref="BlockLength"/>, 1 for parts that are not neighbours (windows): the plain bootstrap.</param>
    /// <returns>The figure of the whole and its interval; null below 16 segments.</returns>
    /// <exception cref="ArgumentException">The counts are not whole segments.</exception>
    public static Estimate? OfCounts(ReadOnlySpan<long> counts, int alphabetSize, CountStatistic statistic, ulong seed, int? blockLength = null)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(alphabetSize);
        if (counts.Length % alphabetSize != 0)
            throw new ArgumentException($"{counts.Length} counts are no whole segments of {alphabetSize} symbols.", nameof(counts));
        int segments = counts.Length / alphabetSize;
        if (segments < FewestSegments) return null;
        var plan = new ResamplingPlan(segments, blockLength ?? BlockLength(segments), Replicates, seed);
        int[] used = PrefixSums.ColumnsInUse(counts, alphabetSize);
        int row = used.Length;
        long[] sums = ArrayPool<long>.Shared.Rent((Replicates + 1) * row);
        long[] prefix = ArrayPool<long>.Shared.Rent((segments + 1) * PrefixSums.Columns);
        try
        {
            // Replicate 0 is the whole. A few columns at a time, so that their prefix sums stay in the cache however many segments there are.
            for (int first = 0; first < row; first += PrefixSums.Columns)
            {
                int width = Math.Min(PrefixSums.Columns, row - first);
                PrefixSums.Build(counts, alphabetSize, used.AsSpan(first, width), prefix);
                PrefixSums.SumBlocks(prefix, plan, sums, row, first, width);
            }
            var replicates = new double[Replicates];
            for (int r = 0; r < Replicates; r++) replicates[r] = statistic(sums.AsSpan((r + 1) * row, row));
            return Interval(statistic(sums.AsSpan(0, row)), replicates);
        }
        finally
        {
            ArrayPool<long>.Shared.Return(prefix);
            ArrayPool<long>.Shared.Return(sums);
        }
    }

    /// <summary>The interval of a sum of one number a segment (bits spent, bytes saved).</summary>
    /// <param name="perSegment">One finite number a segment, in order.</param>
    /// <param name="seed">Recorded beside the figure.</param>
    /// <param name="blockLength">As in <see cref="OfCounts"/>.</param>
    /// <returns>The sum and its interval; null below 16 segments.</returns>
    public static Estimate? OfSum(ReadOnlySpan<double> perSegment, ulong seed, int? blockLength = null) =>
        OfNumbers(perSegment, default, seed, blockLength);

    /// <summary>The interval of a ratio of two sums, such as bits a symbol: numerator and denominator are drawn together.</summary>
    /// <param name="numerators">One finite number a segment, in order.</param>
    /// <param name="denominators">One number above 0 a segment, aligned.</param>
    /// <param name="seed">Recorded beside the figure.</param>
    /// <param name="blockLength">As in <see cref="OfCounts"/>.</param>
    /// <returns>The ratio of the whole and its interval; null below 16 segments.</returns>
    /// <exception cref="ArgumentException">The spans differ in length.</exception>
    public static Estimate? OfRatio(ReadOnlySpan<double> numerators, ReadOnlySpan<double> denominators, ulong seed, int? blockLength = null)
    {
        if (numerators.Length != denominators.Length)
            throw new ArgumentException($"{numerators.Length} numerators, {denominators.Length} denominators; they must be aligned.", nameof(denominators));
        return OfNumbers(numerators, denominators, seed, blockLength);
    }

    private static Estimate? OfNumbers(ReadOnlySpan<double> numerators, ReadOnlySpan<double> denominators, ulong seed, int? blockLength)
    {
        int segments = numerators.Length;
        if (segments < FewestSegments) return null;
        var plan = new ResamplingPlan(segments, blockLength ?? BlockLength(segments), Replicates, seed);
        var replicates = new double[Replicates];
        double value = 0;
        for (int r = 0; r <= Replicates; r++)
        {
            NeumaierSum above = default, below = default;
            foreach ((int start, int length) in plan.Blocks(r))
            {
                for (int i = start; i < start + length; i++)
                {
                    above.Add(numerators[i]);
                    if (!denominators.IsEmpty) below.Add(denominators[i]);
                }
            }
            double figure = denominators.IsEmpty ? above.Value : above.Value / below.Value;
            if (r == 0) value = figure;
            else replicates[r - 1] = figure;
        }
        return Interval(value, replicates);
    }

    private static Estimate Interval(double value, double[] replicates)
    {
        Array.Sort(replicates);
        return new Estimate(value, replicates[LowRank], replicates[HighRank]);
    }
}
