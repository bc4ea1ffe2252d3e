using CsCheck;
using Tallybound.Coding;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>Drift along a source: payloads under own, source's and previous table, and divergence.</summary>
public sealed class SegmentPricingTests
{
    [Fact]
    public void No_other_table_is_cheaper_than_a_segment_s_own() =>
        MixedSource.Any.Sample(source =>
        {
            SegmentSeries series = SegmentPricing.Series(BlockSizeCurveTests.Counted(source))!;
            Assert.Equal(source.Segments, series.OwnTableBits.Count);
            for (int i = 0; i < source.Segments; i++)
            {
                Assert.InRange(series.OwnTableBits[i], 1, Math.Min(series.SourceTableBits[i], series.PreviousTableBits[i]));
                Assert.InRange(series.DivergenceBits[i], 0, 1);
            }
            Assert.Equal(series.OwnTableBits[0], series.PreviousTableBits[0]);
        }, iter: 200);

    [Fact]
    public void Under_the_source_s_table_the_segments_sum_to_the_source() =>
        MixedSource.Any.Sample(source =>
        {
            long[] whole = source.Counts(0, source.Symbols.Length);
            byte[] lengths = new byte[source.AlphabetSize];
            Huffman.Lengths(whole, lengths);
            SegmentSeries series = SegmentPricing.Series(BlockSizeCurveTests.Counted(source))!;
            return series.SourceTableBits.Sum() == Huffman.PayloadDigits(whole, lengths);
        }, iter: 200);

    /// <summary>Training a×4, b×2 and the escape ×1: lengths 1, 2, 2. Coding a, b, c costs 1 + 2 + (2 + 8) bits.</summary>
    [Fact]
    public void An_unseen_symbol_pays_the_escape_and_its_plain_bits()
    {
        long[] training = new long[256], counts = new long[256];
        training['a'] = 4;
        training['b'] = 2;
        counts['a'] = counts['b'] = counts['c'] = 1;
        Assert.Equal(13, SegmentPricing.BitsWithEscape(counts, training));
        Assert.Equal(0, SegmentPricing.BitsWithEscape(new long[256], training));
        Assert.Equal(3 * (1 + 8), SegmentPricing.BitsWithEscape(counts, new long[256]));
    }

    [Fact]
    public void The_previous_table_is_trained_on_the_previous_segment_alone() =>
        MixedSource.Any.Sample(source =>
        {
            SegmentSeries series = SegmentPricing.Series(BlockSizeCurveTests.Counted(source))!;
            List<long[]> segments = BlockSizeCurveTests.Cut(source, source.SegmentSymbols);
            for (int i = 1; i < segments.Count; i++)
            {
                long[] training = [.. segments[i - 1], 1];
                byte[] lengths = new byte[training.Length];
                Huffman.Lengths(training, lengths);
                long expected = segments[i].Select((n, s) => n * (segments[i - 1][s] > 0 ? lengths[s] : lengths[^1] + TableBlockPricer.PlainBits(source.AlphabetSize))).Sum();
                Assert.Equal(expected, series.PreviousTableBits[i]);
            }
        }, iter: 200);

    [Fact]
    public void Equal_segments_do_not_drift()
    {
        long[] segment = [5, 3, 2, 1], counts = [.. segment, .. segment, .. segment];
        SegmentSeries series = SegmentPricing.Series(new SegmentCounts(counts, 4, 4096))!;
        Assert.Equal(4096, series.SegmentBytes);
        Assert.Equal([0, 0, 0], series.DivergenceBits);
        Assert.Equal(series.OwnTableBits, series.SourceTableBits);
        Assert.Null(SegmentPricing.Series(new SegmentCounts([], 4, 4096)));
    }

    [Fact]
    public void The_entropy_s_interval_stands_from_16_segments_on()
    {
        var random = new Random(5);
        long[] counts = [.. Enumerable.Range(0, 16 * 4).Select(_ => (long)random.Next(1, 100))];
        Estimate interval = SegmentPricing.EntropyInterval(new SegmentCounts(counts, 4, 4096), 1)!.Value;
        long[] whole = [.. Enumerable.Range(0, 4).Select(s => Enumerable.Range(0, 16).Sum(i => counts[(i * 4) + s]))];
        Assert.Equal(Entropy.BitsPerSymbol(whole), interval.Value, 1e-12);
        Assert.True(interval.Low <= interval.Value && interval.Value <= interval.High + 0.05 && interval.Low < interval.High);
        Assert.Null(SegmentPricing.EntropyInterval(new SegmentCounts(counts.AsSpan(4), 4, 4096), 1));
    }
}
