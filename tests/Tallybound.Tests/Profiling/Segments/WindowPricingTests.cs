using CsCheck;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>Points below one segment, from sample windows.</summary>
public sealed class WindowPricingTests
{
    [Fact]
    public void One_window_that_is_the_source_gives_what_exact_counting_gives()
    {
        int points = 0;
        Gen.Select(Gen.Int[0, 1000], Gen.Int[1, 200_000]).Sample((seed, length) =>
        {
            byte[] bytes = Bytes(seed, length);
            IReadOnlyList<TableBlockPrice> estimates = WindowPricing.Points([WindowPricing.Price(bytes, 64 << 10)], length, 1);
            Assert.Equal([4 << 10, 8 << 10, 16 << 10, 32 << 10], estimates.Select(point => point.BlockBytes));
            foreach (TableBlockPrice point in estimates)
            {
                NaiveBlocks.Price naive = NaiveBlocks.Cheapest(BlockSizeCurveTests.Cut(new MixedSource(bytes, 256, 4096), (int)point.BlockBytes), 256);
                Assert.Equal((naive.Payload, naive.Table, naive.Framing, naive.Total), (point.PayloadBits, point.TableBits, point.FramingBits, point.TotalBits));
                Assert.False(point.Exact);
                Assert.True(point.TotalBitsInterval is null && point.LossBits is null && point.Kinds is null);
                Interlocked.Increment(ref points);
            }
        }, iter: 20);
        Assert.True(points >= 80);
    }

    [Fact]
    public void Windows_are_scaled_by_bytes_and_get_an_interval_from_16_on()
    {
        var windows = new List<WindowPrices>();
        for (int i = 0; i < 16; i++) windows.Add(WindowPricing.Price(Bytes(i, 32 << 10), 16 << 10));
        const long SourceBytes = 16 * (32 << 10) * 10L;
        IReadOnlyList<TableBlockPrice> points = WindowPricing.Points(windows, SourceBytes, 1), fifteen = WindowPricing.Points(windows.Take(15).ToList(), SourceBytes, 1);
        Assert.Equal([4 << 10, 8 << 10], points.Select(point => point.BlockBytes));
        Assert.All(points, point =>
        {
            Assert.Equal(0, point.TotalBits % 80);
            Assert.Equal(point.TotalBits, point.PayloadBits + point.TableBits + point.FramingBits);
            Assert.True(point.FramingBits >= 0);
            Assert.InRange(point.TotalBits, point.TotalBitsInterval![0], point.TotalBitsInterval[1]);
        });
        Assert.All(fifteen, point => Assert.Null(point.TotalBitsInterval));
    }

    [Fact]
    public void The_curve_begins_with_the_estimates_and_its_loss_is_against_exact_points()
    {
        byte[] bytes = Bytes(8, 64 << 10);
        long[] counts = new long[4 * 256];
        for (int i = 0; i < bytes.Length; i++) counts[(i >> 14 << 8) + bytes[i]]++;
        var source = new SegmentCounts(counts, 256, 16 << 10);
        IReadOnlyList<TableBlockPrice> curve = BlockSizeCurve.Whole(source, [WindowPricing.Price(bytes, 16 << 10)], bytes.Length, 1);
        Assert.Equal([4 << 10, 8 << 10, 16 << 10, 32 << 10, 64 << 10], curve.Select(point => point.BlockBytes));
        Assert.Equal([false, false, true, true, true], curve.Select(point => point.Exact));
        Assert.Equal(0, curve.Min(point => point.LossBits));
        Assert.Equal(BlockSizeCurve.Exact(source), curve.Skip(2));
    }

    /// <summary>Segments of 4 KiB leave no smaller size; segments above 2 MiB leave sizes up to the window.</summary>
    [Theory]
    [InlineData(4 << 10, 0)]
    [InlineData(8 << 10, 1)]
    [InlineData(1 << 20, 8)]
    [InlineData(16 << 20, 9)]
    public void Sizes_end_at_half_a_segment_and_at_a_window(long segmentBytes, int sizes) =>
        Assert.Equal(sizes, WindowPricing.Points([WindowPricing.Price(new byte[5000], segmentBytes)], 1 << 24, 1).Count);

    private static byte[] Bytes(int seed, int length)
    {
        var random = new Random(seed);
        byte[] bytes = new byte[length];
        for (int i = 0; i < length; i++)
        {
            int character = ((i >> 13) + seed) % 4;
            bytes[i] = (byte)(character switch { 0 => random.Next(256), 1 => seed, _ => (int)Math.Min(255, -Math.Log(1 - random.NextDouble()) * 6 * character) });
        }
        return bytes;
    }
}
