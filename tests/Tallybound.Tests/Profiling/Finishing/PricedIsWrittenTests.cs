using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Finishing;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;
using Tallybound.Tallies;
using Xunit;

namespace Tallybound.Tests.Profiling.Finishing;

/// <summary>The prices of a record against bits that are really written, and read back.</summary>
public sealed class PricedIsWrittenTests
{
    private static readonly Gen<byte[]> Sources = Gen.OneOf(Gen.Byte.Array[1, 60], Gen.Byte[0, 6].Array[1, 900], Gen.Byte[90, 130].Array[1, 3000]);

    private static ViewProfile Record(byte[] source, params int[] radices)
    {
        ISymbolTally tally = TallyChoice.Create(ViewNames.Bytes, 2, 3, source.Length);
        tally.Begin(0, []);
        tally.Append(source);
        var segments = new SegmentTally(4096, 1024);
        segments.Append(0, source);
        var finisher = new ViewFinisher(new RunParameters { Inputs = [], Radices = radices });
        return finisher.Finish(ViewNames.Bytes, tally, source.Length, ViewSegments.Of(ViewNames.Bytes, segments), [], keepCounts: true, keepPairs: true).Profile;
    }

    private static int[] Symbols(byte[] source) => Array.ConvertAll(source, each => (int)each);

    private static CodePrice Price(ViewProfile view, string code, int block = 1) => view.Codes.Single(price => price.Code == code && price.BlockLength == block && price.Radix == 2);

    [Theory]
    [InlineData(2)]
    [InlineData(3)]
    public void A_block_code_is_written_in_the_bits_it_was_priced_at(int n)
    {
        int cases = 0;
        Sources.Where(source => source.Length >= n).Sample(
            source =>
            {
                cases++;
                CodePrice price = Price(Record(source), "block-huffman", n);
                var tally = new SparseByteTally(0, n);
                tally.Begin(0, []);
                tally.Append(source);
                BlockCounts blocks = tally.Blocks(n);
                var lengths = new byte[blocks.Counts.Length];
                BlockHuffman.Lengths(blocks.Counts, lengths);
                var writer = new BitWriter();
                BlockHuffmanCoder.EncodeTable(blocks.Symbols, lengths, ref writer);
                long table = writer.Bits;
                BlockHuffmanCoder.EncodePayload(Symbols(source), 256, n, blocks.Symbols, lengths, ref writer);
                var back = new int[source.Length];
                var reader = new BitReader(writer.ToArray());
                BlockHuffmanCoder.Decode(ref reader, 256, n, back);
                return price.TableFormat == "sparse" && table == price.TableBits && writer.Bits - table == price.PayloadBits && back.AsSpan().SequenceEqual(Symbols(source));
            }, iter: 200, threads: 1);
        Assert.Equal(200, cases);
    }

    [Fact]
    public void One_table_a_context_is_written_in_the_bits_it_was_priced_at()
    {
        int cases = 0, sparse = 0;
        Sources.Where(source => source.Length > 1).Sample(
            source =>
            {
                cases++;
                CodePrice price = Price(Record(source), "context-huffman");
                var counts = new long[256][];
                for (int at = 1; at < source.Length; at++) (counts[source[at - 1]] ??= new long[256])[source[at]]++;
                byte[]?[] lengths = Array.ConvertAll(counts, row =>
                {
                    if (row is null) return null;
                    var of = new byte[256];
                    Huffman.Lengths(row, of);
                    return of;
                });
                var writer = new BitWriter();
                ContextHuffmanCoder.EncodeTables<BitWriter>(lengths, ref writer);
                long table = writer.Bits;
                ContextHuffmanCoder.EncodePayload(Symbols(source), lengths, ref writer);
                var back = new int[source.Length];
                var reader = new BitReader(writer.ToArray());
                ContextHuffmanCoder.Decode(ref reader, 256, back);
                if (price.TableFormat == "sparse") sparse++;
                return writer.Bits - table == price.PayloadBits && back.AsSpan().SequenceEqual(Symbols(source)) && (price.TableFormat == "sparse" ? table == price.TableBits : table >= price.TableBits);
            }, iter: 200, threads: 1);
        Assert.Equal(200, cases);
        Assert.True(sparse > 50);
    }

    [Fact]
    public void A_whole_record_keeps_its_sums()
    {
        int cases = 0;
        Sources.Sample(
            source =>
            {
                cases++;
                ViewProfile view = Record(source, 3, 16);
                foreach (CodePrice price in view.Codes)
                {
                    if (price.Radix != 2)
                    {
                        Assert.Null(price.TotalBits);
                        Assert.Null(price.PayloadBits);
                        continue;
                    }
                    Assert.Equal(price.TotalBits, price.PayloadBits + price.TableBits + price.FramingBits);
                    Assert.Equal(0, price.TotalBits % 8);
                    Assert.Equal(Framing.Bits(source.Length, price.TableBits!.Value, price.PayloadBits!.Value), price.FramingBits);
                    Assert.Equal((double)price.PayloadBits!.Value / source.Length, price.BitsPerSymbol);
                    if (price.Code is "huffman" or "fixed") Assert.True(price.BitsPerSymbol >= view.Orders[0].EntropyBitsPerSymbol - 1e-12);
                }
                Assert.Equal(view.Codes.Count, view.Codes.DistinctBy(price => (price.Code, price.Radix, price.LengthLimit, price.BlockLength, price.Parameter)).Count());
                Assert.All(view.TableBlocks!, point => Assert.Equal(point.TotalBits, point.PayloadBits + point.TableBits + point.FramingBits));
                return true;
            }, iter: 200, threads: 1);
        Assert.Equal(200, cases);
    }

    [Fact]
    public void An_adaptive_coder_never_beats_the_plug_in_bound_of_its_order()
    {
        int cases = 0;
        Sources.Sample(
            source =>
            {
                cases++;
                return Record(source).Orders.All(order => order.AdaptiveBitsPerSymbol * source.Length >= (order.EntropyBitsPerSymbol * (source.Length - order.Order)) - 1e-6);
            }, iter: 200, threads: 1);
        Assert.Equal(200, cases);
    }
}
