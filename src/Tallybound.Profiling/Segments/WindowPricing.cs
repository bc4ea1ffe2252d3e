using System.Buffers;
using Tallybound.Coding;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Segments;

/// <summary>What one sample window costs in table blocks of each size below a segment. Windows are priced apart, in any order and on any thread.</summary>
public sealed class WindowPrices
{
    internal WindowPrices(long bytes, BlockTotals[][] totals) => (Bytes, Totals) = (bytes, totals);

    /// <summary>Bytes of the window.</summary>
    public long Bytes { get; }

    /// <summary>By size (4 KiB doubling), then by table format.</summary>
    internal BlockTotals[][] Totals { get; }
}

/// <summary>Points of the block-size curve below one segment, estimated from sample windows of the bytes themselves.</summary>
/// <remarks>Each window starts without a last table, as its neighbours are not in the sample; so the larger its blocks, the more the estimate leans to the dear side.</remarks>
public static class WindowPricing
{
    /// <summary>The smallest table block that is priced.</summary>
    public const int SmallestBlockBytes = 4096;

    /// <summary>Bytes of a sample window, and the largest table block that windows can price.</summary>
    public const int WindowBytes = 1 << 20;

    private const int Bytes = 256;

    /// <summary>Prices one window.</summary>
    /// <param name="window">Its bytes, 1 MiB or fewer at the end of a source, from an offset that is a multiple of the segment.</param>
    /// <param name="segmentBytes">Bytes of a segment of its source: blocks of half of it are the largest.</param>
    public static WindowPrices Price(ReadOnlySpan<byte> window, long segmentBytes)
    {
        long largest = Math.Min(segmentBytes / 2, WindowBytes);
        int blocks = (window.Length + SmallestBlockBytes - 1) / SmallestBlockBytes;
        var totals = new List<BlockTotals[]>();
        if (blocks == 0 || largest < SmallestBlockBytes) return new WindowPrices(window.Length, []);
        long[] counts = ArrayPool<long>.Shared.Rent(blocks * Bytes);
        try
        {
            counts.AsSpan(0, blocks * Bytes).Clear();
            for (int block = 0; block < blocks; block++)
            {
                int from = block * SmallestBlockBytes;
                ByteHistogram.Add(window[from..Math.Min(from + SmallestBlockBytes, window.Length)], counts.AsSpan(block * Bytes, Bytes));
            }
            for (long size = SmallestBlockBytes; size <= largest; size *= 2)
            {
                totals.Add(PriceBlocks(counts, blocks));
                blocks = BlockSizeCurve.MergePairs(counts, blocks, Bytes);
            }
        }
        finally
        {
            ArrayPool<long>.Shared.Return(counts);
        }
        return new WindowPrices(window.Length, [.. totals]);
    }

    /// <summary>The points of the curve: bits of the windows × bytes of the source ÷ bytes of the windows, with an interval by plain bootstrap over at least 16 windows.</summary>
    internal static IReadOnlyList<TableBlockPrice> Points(IReadOnlyList<WindowPrices> windows, long sourceBytes, ulong seed)
    {
        var points = new List<TableBlockPrice>();
        if (windows.Count == 0) return points;
        ReadOnlySpan<FormatChain> chains = TableBlockPricer.ForThread(Bytes).Chains;
        for (int size = 0; size < windows[0].Totals.Length; size++)
        {
            int cheapest = 0;
            BlockTotals least = Sum(windows, size, 0);
            for (int format = 1; format < chains.Length; format++)
            {
                BlockTotals sum = Sum(windows, size, format);
                if (sum.TotalBits < least.TotalBits) (cheapest, least) = (format, sum);
            }
            points.Add(Point(windows, size, cheapest, least, chains[cheapest].Format, sourceBytes, seed));
        }
        return points;
    }

    private static BlockTotals[] PriceBlocks(ReadOnlySpan<long> counts, int blocks)
    {
        var pricer = TableBlockPricer.ForThread(Bytes);
        for (int block = 0; block < blocks; block++) pricer.Add(counts.Slice(block * Bytes, Bytes));
        var totals = new BlockTotals[pricer.Chains.Length];
        for (int format = 0; format < totals.Length; format++) totals[format] = pricer.Chains[format].Totals;
        return totals;
    }

    private static BlockTotals Sum(IReadOnlyList<WindowPrices> windows, int size, int format)
    {
        BlockTotals sum = default;
        foreach (WindowPrices window in windows) sum.Add(window.Totals[size][format]);
        return sum;
    }

    private static TableBlockPrice Point(
        IReadOnlyList<WindowPrices> windows, int size, int format, BlockTotals sum, TableFormat name, long sourceBytes, ulong seed)
    {
        double[] bits = new double[windows.Count], bytes = new double[windows.Count];
        long sampled = 0;
        for (int i = 0; i < windows.Count; i++)
        {
            bits[i] = windows[i].Totals[size][format].TotalBits;
            bytes[i] = windows[i].Bytes;
            sampled += windows[i].Bytes;
        }
        Estimate? perByte = MovingBlockBootstrap.OfRatio(bits, bytes, seed, blockLength: 1);
        // Whole bytes first, then the two parts that are data; framing is what is left, so that the three still sum.
        long total = 8 * Scale(sum.TotalBits / 8, sourceBytes, sampled);
        long payload = Scale(sum.PayloadBits, sourceBytes, sampled), table = Math.Min(Scale(sum.TableBits, sourceBytes, sampled), total - payload);
        return new TableBlockPrice
        {
            BlockBytes = (long)SmallestBlockBytes << size,
            Exact = false,
            PayloadBits = payload,
            TableBits = table,
            FramingBits = total - payload - table,
            TotalBits = total,
            TotalBitsInterval = perByte is { } rate ? [(long)Math.Round(rate.Low * sourceBytes), (long)Math.Round(rate.High * sourceBytes)] : null,
            TableFormat = sum.OwnTable == 0 ? null : name.Name(),
        };
    }

    private static long Scale(long windowFigure, long sourceBytes, long windowBytes) =>
        (long)((((Int128)windowFigure * sourceBytes) + (windowBytes / 2)) / windowBytes);
}
