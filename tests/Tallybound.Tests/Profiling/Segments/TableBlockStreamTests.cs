using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Xunit;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>What is priced is written, and what is written is read back.</summary>
public sealed class TableBlockStreamTests
{
    [Fact]
    public void A_source_written_block_by_block_takes_exactly_the_bits_of_its_curve_and_reads_back()
    {
        int[] kinds = new int[4], formats = new int[4];
        MixedSource.Any.Sample(source =>
        {
            foreach (TableBlockPrice point in BlockSizeCurve.Exact(BlockSizeCurveTests.Counted(source)))
            {
                TableFormat format = NaiveBlocks.Formats.FirstOrDefault(format => format.Name() == point.TableFormat);
                int[] blocks = [.. BlockSizeCurveTests.Cut(source, (int)point.BlockBytes).Select(counts => (int)counts.Sum())];
                byte[] written = TableBlockStream.Write(source.Symbols, source.AlphabetSize, blocks, format);
                Assert.Equal(point.TotalBits, written.Length * 8L);
                byte[] read = new byte[source.Symbols.Length];
                TableBlockStream.Read(written, source.AlphabetSize, format, read);
                Assert.Equal(source.Symbols, read);
                foreach ((int kind, long count) in new[] { point.Kinds!.Stored, point.Kinds.OwnTable, point.Kinds.LastTable, point.Kinds.OneSymbol }.Index()) Interlocked.Add(ref kinds[kind], (int)count);
                if (point.TableFormat is not null) Interlocked.Increment(ref formats[(int)format]);
            }
        }, iter: 300);
        Assert.All(kinds, count => Assert.True(count > 100, $"Kinds occurred {string.Join(", ", kinds)} times."));
        Assert.All(formats, count => Assert.True(count > 0, $"Formats won {string.Join(", ", formats)} points."));
    }

    [Fact]
    public void Every_format_writes_what_it_is_priced_at_also_where_it_is_not_the_cheapest()
    {
        int[] written = new int[4];
        MixedSource.Any.Sample(source =>
        {
            List<long[]> blocks = BlockSizeCurveTests.Cut(source, source.SegmentSymbols);
            foreach (TableFormat format in NaiveBlocks.Formats)
            {
                NaiveBlocks.Price price = NaiveBlocks.InFormat(blocks, source.AlphabetSize, format);
                byte[] stream = TableBlockStream.Write(source.Symbols, source.AlphabetSize, [.. blocks.Select(counts => (int)counts.Sum())], format);
                Assert.Equal(price.Total, stream.Length * 8L);
                byte[] read = new byte[source.Symbols.Length];
                TableBlockStream.Read(stream, source.AlphabetSize, format, read);
                Assert.Equal(source.Symbols, read);
                Interlocked.Add(ref written[(int)format], (int)price.Kinds[(int)BlockKind.OwnTable]);
            }
        }, iter: 150);
        Assert.All(written, tables => Assert.True(tables > 50, $"{string.Join(", ", written)} tables were written."));
    }

    [Fact]
    public void The_split_is_written_in_the_bits_it_is_priced_at() =>
        MixedSource.Any.Where(source => source.Segments > 1).Sample(source =>
        {
            SegmentCounts counts = BlockSizeCurveTests.Counted(source);
            AdaptiveSplitProfile split = AdaptiveSplit.Find(counts, BlockSizeCurve.Exact(counts))!;
            long[] ends = [.. split.Starts.Skip(1), source.Symbols.Length];
            TableFormat format = NaiveBlocks.Formats.FirstOrDefault(format => format.Name() == split.TableFormat);
            byte[] written = TableBlockStream.Write(source.Symbols, source.AlphabetSize, [.. split.Starts.Zip(ends, (from, to) => (int)(to - from))], format);
            return written.Length * 8L == split.TotalBits;
        }, iter: 100);

    [Fact]
    public void A_table_takes_the_bits_of_its_price_wherever_it_stands()
    {
        int tables = 0;
        Gen.Select(Gen.Long[0, 50].Array[2, 256].Where(counts => counts.Any(n => n > 0)), Gen.Int[0, 40]).Sample((counts, before) =>
        {
            byte[] lengths = new byte[counts.Length], read = new byte[counts.Length];
            Huffman.Lengths(counts, lengths);
            foreach (TableFormat format in NaiveBlocks.Formats)
            {
                if (!TablePricing.TryPrice(format, lengths, out long bits)) continue;
                var sink = new BitWriter();
                sink.Write(0, before);
                TableTransport.Encode(format, lengths, sink);
                Assert.Equal(before + bits, sink.Bits);
                sink.Write(5, 3);
                byte[] stream = sink.ToArray();
                var reader = new BitReader(stream);
                reader.Read(before);
                TableTransport.Decode(format, ref reader, (stream.Length * 8L) - before, read);
                Assert.Equal(lengths, read);
                Assert.Equal(5UL, reader.Read(3));
                Interlocked.Increment(ref tables);
            }
        }, iter: 300);
        Assert.True(tables > 600, $"{tables} tables were written.");
    }

    [Fact]
    public void Damage_is_refused_or_gives_another_source_and_never_runs_off()
    {
        byte[] source = [.. Enumerable.Range(0, 600).Select(i => (byte)(i % 7 * (i % 5)))];
        int refused = 0, cases = 0;
        foreach (TableFormat format in NaiveBlocks.Formats)
        {
            byte[] written = TableBlockStream.Write(source, 256, [300, 300], format);
            for (int bit = 0; bit < written.Length * 8; bit++, cases++)
            {
                byte[] damaged = [.. written], read = new byte[source.Length];
                damaged[bit / 8] ^= (byte)(1 << (bit % 8));
                if (Record.Exception(() => TableBlockStream.Read(damaged, 256, format, read)) is not { } exception) continue;
                Assert.IsType<InvalidDataException>(exception);
                refused++;
            }
            byte[] cut = written[..^1];
            Assert.Throws<InvalidDataException>(() => TableBlockStream.Read(cut, 256, format, new byte[source.Length]));
            Assert.Throws<InvalidDataException>(() => TableBlockStream.Read(written, 256, format, new byte[source.Length + 1]));
            Assert.Throws<InvalidDataException>(() => TableBlockStream.Read(written, 256, format, new byte[source.Length - 1]));
        }
        Assert.True(cases > 4000 && refused > cases / 10, $"{refused} of {cases} were refused.");
    }

    [Fact]
    public void Blocks_must_be_the_source()
    {
        Assert.Throws<ArgumentException>(() => TableBlockStream.Write([1, 2, 3], 256, [2], TableFormat.Flat));
        Assert.Throws<ArgumentException>(() => TableBlockStream.Write([1, 2, 3], 256, [2, 2], TableFormat.Flat));
        Assert.Throws<ArgumentException>(() => TableBlockStream.Write([1, 2, 3], 256, [0, 3], TableFormat.Flat));
        Assert.Empty(TableBlockStream.Write([], 256, [], TableFormat.Flat));
    }
}
