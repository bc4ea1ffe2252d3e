using CsCheck;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>The block-size curve against its definition: kinds, ties, the format of a whole point, and the whole-byte sum.</summary>
public sealed class BlockSizeCurveTests
{
    [Fact]
    public void Every_exact_point_is_what_the_definition_gives()
    {
        int[] kinds = new int[4];
        int cases = 0;
        MixedSource.Any.Sample(source =>
        {
            IReadOnlyList<TableBlockPrice> curve = BlockSizeCurve.Exact(Counted(source));
            int size = source.SegmentSymbols;
            foreach (TableBlockPrice point in curve)
            {
                var blocks = Cut(source, size);
                NaiveBlocks.Price naive = NaiveBlocks.Cheapest(blocks, source.AlphabetSize);
                Assert.Equal((size, true), ((int)point.BlockBytes, point.Exact));
                Assert.Equal((naive.Payload, naive.Table, naive.Framing), (point.PayloadBits, point.TableBits, point.FramingBits));
                Assert.Equal(naive.Kinds[(int)BlockKind.OwnTable] == 0 ? null : naive.Format.Name(), point.TableFormat);
                Assert.Equal(new BlockKindCounts(naive.Kinds[0], naive.Kinds[3], naive.Kinds[2], naive.Kinds[1]), point.Kinds);
                for (int kind = 0; kind < 4; kind++) Interlocked.Add(ref kinds[kind], (int)naive.Kinds[kind]);
                size *= 2;
            }
            Assert.True(size / 2 >= source.Symbols.Length && (curve.Count == 1 || size / 4 < source.Symbols.Length));
            Interlocked.Increment(ref cases);
        }, iter: 300);
        Assert.True(cases >= 300);
        Assert.All(kinds, count => Assert.True(count > 100, $"Kinds occurred {string.Join(", ", kinds)} times."));
    }

    [Fact]
    public void Parts_sum_to_whole_bytes_and_the_loss_is_nought_at_the_cheapest_point() =>
        MixedSource.Any.Sample(source =>
        {
            IReadOnlyList<TableBlockPrice> curve = BlockSizeCurve.Exact(Counted(source));
            long least = curve.Min(point => point.TotalBits);
            Assert.All(curve, point =>
            {
                Assert.Equal(point.TotalBits, point.PayloadBits + point.TableBits + point.FramingBits);
                Assert.Equal(0, point.TotalBits % 8);
                Assert.Equal(point.TotalBits - least, point.LossBits);
            });
        }, iter: 100);

    [Fact]
    public void The_whole_source_costs_no_more_than_one_block_of_the_cheapest_table_or_stored() =>
        MixedSource.Any.Sample(source =>
        {
            long[] counts = source.Counts(0, source.Symbols.Length);
            byte[] lengths = new byte[source.AlphabetSize];
            Huffman.Lengths(counts, lengths);
            long table = TablePricing.Cheapest(lengths).TableBits, payload = Huffman.PayloadDigits(counts, lengths), stored = source.Symbols.Length * (long)TableBlockPricer.PlainBits(source.AlphabetSize);
            long own = table + payload + Framing.Bits(source.Symbols.Length, table, payload), plain = stored + Framing.Bits(source.Symbols.Length, 0, stored);
            TableBlockPrice whole = BlockSizeCurve.Exact(Counted(source))[^1];
            if (counts.Count(n => n > 0) > 1) Assert.Equal(Math.Min(own, plain), whole.TotalBits);
            else Assert.True(whole.TotalBits <= Math.Min(own, plain));
        }, iter: 200);

    [Fact]
    public void A_source_without_symbols_has_no_curve_and_one_segment_has_one_point()
    {
        Assert.Empty(BlockSizeCurve.Exact(new SegmentCounts([], 256, 4096)));
        long[] counts = new long[256];
        counts['a'] = 3;
        TableBlockPrice point = Assert.Single(BlockSizeCurve.Exact(new SegmentCounts(counts, 256, 4096)));
        // 2 bits of kind, 5 of δ(4), 8 of the symbol, 1 of padding.
        Assert.Equal((4096, 8, 0, 8, 16), (point.BlockBytes, point.PayloadBits, point.TableBits, point.FramingBits, point.TotalBits));
        Assert.Equal(new BlockKindCounts(0, 1, 0, 0), point.Kinds);
        Assert.Null(point.TableFormat);
    }

    /// <summary>Ties go to stored, then one symbol: a single symbol takes 8 bits either way.</summary>
    [Fact]
    public void A_block_of_one_symbol_is_stored()
    {
        long[] counts = new long[256];
        counts[7] = 1;
        Assert.Equal(new BlockKindCounts(1, 0, 0, 0), BlockSizeCurve.Exact(new SegmentCounts(counts, 256, 4096))[0].Kinds);
    }

    internal static SegmentCounts Counted(MixedSource source) => new(source.Counts(), source.AlphabetSize, source.SegmentSymbols);

    internal static List<long[]> Cut(MixedSource source, int size)
    {
        var blocks = new List<long[]>();
        for (int from = 0; from < source.Symbols.Length; from += size) blocks.Add(source.Counts(from, Math.Min(from + size, source.Symbols.Length)));
        return blocks;
    }
}
