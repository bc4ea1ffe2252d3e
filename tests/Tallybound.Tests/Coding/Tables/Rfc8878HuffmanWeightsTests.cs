using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Xunit;
using ZstdSharp;
using ZstdSharp.Unsafe;

namespace Tallybound.Tests.Coding.Tables;

public sealed class Rfc8878HuffmanWeightsTests
{
    private const uint FrameMagic = 0xFD2FB528;

    /// <summary>RFC 8878 §4.2.1: weights 4, 3, 2, 0, 1, and a last 1 that is not sent.</summary>
    [Fact]
    public void The_last_length_follows_from_the_weights_sent()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("zstd-weights");
        byte[] lengths = new byte[6];
        Rfc8878HuffmanWeights.FromWeights(vector.Bytes("input"), lengths);
        Assert.Equal(vector.Bytes("expected"), lengths);
        var writer = new LowBitWriter();
        Rfc8878HuffmanWeights.Encode(lengths, ref writer);
        // Five weights directly: 127 + 5, then 4|3, 2|0, 1|–.
        Assert.Equal([132, 0x43, 0x20, 0x10], writer.ToArray());
    }

    [Fact]
    public void A_published_header_reads_as_its_walk_through_says()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("zstd-worked-header");
        byte[] header = vector.Bytes("input"), lengths = new byte[256];
        var reader = new LowBitReader(header);
        Rfc8878HuffmanWeights.Decode(ref reader, lengths);
        Assert.Equal(36 * 8, reader.Position);
        Assert.Equal(122, Array.FindLastIndex(lengths, length => length > 0));
        int[] ofLength = vector.Integers("expected");
        for (int length = 1; length < ofLength.Length; length++) Assert.Equal(ofLength[length], lengths.Count(one => one == length));
        Assert.Equal(ofLength[0], lengths[..123].Count(one => one == 0));
        Assert.Equal(256, lengths.Where(length => length > 0).Sum(length => 256 >> length));
        Assert.True(TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, lengths, out long bits));
        Assert.True(bits <= 36 * 8, $"Ours has {bits} bits.");
    }

    [Fact]
    public void The_distribution_of_that_header_is_the_one_of_its_walk_through()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("zstd-worked-header-fse");
        var reader = new LowBitReader(vector.Bytes("input"));
        int[] frequencies = new int[12];
        Assert.Equal(5, Rfc8878FseDistribution.Decode(ref reader, frequencies));
        Assert.Equal(vector.Integers("expected"), frequencies.Where(frequency => frequency != 0).Select(Math.Abs));
    }

    /// <summary>The referee is ZstdSharp, a port of the reference decoder: a frame whose literals carry our table.</summary>
    [Fact]
    public void A_frame_with_our_table_decompresses()
    {
        int direct = 0, coded = 0;
        using var referee = new Decompressor();
        Gen.Select(Gen.Int[2, 256], Gen.Int[256, 1000], Gen.Int[1, 8], Gen.Bool).Sample(
            (symbols, size, skew, lowest) =>
            {
                byte[] bytes = SkewedBytes.Of(lowest ? 2 + (symbols % 12) : symbols, size, skew, lowest);
                byte[]? frame = Frame(bytes, out bool isDirect);
                if (frame is null) return;
                Assert.Equal(bytes, referee.Unwrap(frame).ToArray());
                if (isDirect) direct++;
                else coded++;
            },
            threads: 1);
        Assert.True(direct >= 5 && coded >= 20, $"{direct} direct, {coded} coded.");
    }

    /// <summary>The referee is ZstdSharp, a port of the reference encoder, on blocks in which it found no match, so that all bytes are literals.</summary>
    [Fact]
    public void Our_code_is_never_longer_than_the_one_Zstandard_wrote()
    {
        int compared = 0, equal = 0;
        long ourTables = 0, theirTables = 0;
        using var referee = new Compressor(1);
        referee.SetParameter(ZSTD_cParameter.ZSTD_c_minMatch, 7);
        referee.SetParameter(ZSTD_cParameter.ZSTD_c_strategy, 1);
        Gen.Select(Gen.Int[20, 256], Gen.Int[1100, 3000], Gen.Int[1, 5]).Sample(
            (symbols, size, skew) =>
            {
                byte[] bytes = SkewedBytes.Of(symbols, size, skew);
                if (LiteralTable(referee.Wrap(bytes).ToArray(), size) is not { } table) return;
                byte[] theirs = new byte[256];
                var reader = new LowBitReader(table);
                Rfc8878HuffmanWeights.Decode(ref reader, theirs);
                long[] counts = new long[256];
                foreach (byte one in bytes) counts[one]++;
                byte[] ours = CodeLengths.Limited(counts, 11);
                Assert.True(counts.Zip(theirs).All(pair => pair.First == 0 || pair.Second > 0));
                long ourBits = Huffman.PayloadDigits(counts, ours), theirBits = Huffman.PayloadDigits(counts, theirs);
                Assert.True(ourBits <= theirBits, $"Ours has {ourBits} bits, theirs {theirBits}.");
                if (DepthWithPackagesFirst(counts) <= theirs.Max())
                {
                    Assert.Equal(theirBits, ourBits);
                    equal++;
                }
                var writer = new LowBitWriter();
                Rfc8878HuffmanWeights.Encode(theirs, ref writer);
                byte[] back = new byte[256];
                var ourReader = new LowBitReader(writer.ToArray());
                Rfc8878HuffmanWeights.Decode(ref ourReader, back);
                Assert.Equal(theirs, back);
                // Frequencies are fitted to the payload without the states' fractions of a bit, which now and then turn a byte against us.
                Assert.True(writer.Bits <= reader.Position + 8, $"Our table has {writer.Bits} bits, theirs {reader.Position}.");
                ourTables += writer.Bits;
                theirTables += reader.Position;
                compared++;
            },
            threads: 1);
        Assert.True(compared >= 30 && equal >= 10, $"{compared} compared, {equal} equal.");
        Assert.True(ourTables <= theirTables, $"Our tables have {ourTables} bits in all, theirs {theirTables}.");
    }

    [Fact]
    public void Damage_is_refused()
    {
        Assert.Throws<InvalidDataException>(() => Decode([0]));
        Assert.Throws<InvalidDataException>(() => Decode([129, 0x00]));
        Assert.Throws<InvalidDataException>(() => Decode([131, 0x44, 0x42]));
        Assert.Throws<InvalidDataException>(() => Decode([3, 0x30, 0x6f, 0x9b]));
    }

    private static void Decode(byte[] table)
    {
        var reader = new LowBitReader(table);
        Rfc8878HuffmanWeights.Decode(ref reader, new byte[256]);
    }

    /// <summary>One block, its literals in one stream (RFC 8878 §3.1.1.3.1), no sequence; null where our table has no legal form or a size does not fit 10 bits.</summary>
    private static byte[]? Frame(byte[] bytes, out bool isDirect)
    {
        long[] counts = new long[256];
        foreach (byte one in bytes) counts[one]++;
        byte[] lengths = CodeLengths.Limited(counts, 11);
        isDirect = false;
        if (!TablePricing.TryPrice(TableFormat.Rfc8878HuffmanWeights, lengths, out _)) return null;
        var literals = new LowBitWriter();
        Rfc8878HuffmanWeights.Encode(lengths, ref literals);
        isDirect = literals.ToArray()[0] >= 128;
        uint[] words = WordsFromTheLongest(lengths);
        for (int i = bytes.Length - 1; i >= 0; i--) literals.Write(words[bytes[i]], lengths[bytes[i]]);
        literals.Write(1, 1);
        byte[] coded = literals.ToArray();
        // A block may not be larger than its window, which is the whole content here (RFC 8878 §3.1.1.2.4).
        if (3 + coded.Length + 1 > Math.Min(1023, bytes.Length)) return null;
        var frame = new LowBitWriter();
        frame.Write(FrameMagic, 32);
        frame.Write(0b0110_0000, 8);
        frame.Write((ulong)bytes.Length - 256, 16);
        int blockBytes = 3 + coded.Length + 1;
        frame.Write(1, 1);
        frame.Write(2, 2);
        frame.Write((ulong)blockBytes, 21);
        frame.Write(2, 2);
        frame.Write(0, 2);
        frame.Write((ulong)bytes.Length, 10);
        frame.Write((ulong)coded.Length, 10);
        foreach (byte one in coded) frame.Write(one, 8);
        frame.Write(0, 8);
        return frame.ToArray();
    }

    /// <summary>RFC 8878 §4.2.1.3: words from 0 upwards, the longest first, within a length by symbol.</summary>
    private static uint[] WordsFromTheLongest(byte[] lengths)
    {
        uint[] words = new uint[lengths.Length];
        uint next = 0;
        for (int length = lengths.Max(); length > 0; length--, next >>= 1)
        {
            for (int symbol = 0; symbol < lengths.Length; symbol++)
            {
                if (lengths[symbol] == length) words[symbol] = next++;
            }
        }
        return words;
    }

    /// <summary>Depth of the optimal code that takes a package before a leaf of equal weight, as the reference encoder does: where its table shows that depth, it had nothing to cut.</summary>
    private static int DepthWithPackagesFirst(long[] counts)
    {
        List<(long Weight, int Age, int Depth)> open = [.. counts.Where(count => count > 0).Select(count => (count, int.MaxValue, 0))];
        for (int age = 0; open.Count > 1; age++)
        {
            open.Sort();
            open.Add((open[0].Weight + open[1].Weight, age, 1 + Math.Max(open[0].Depth, open[1].Depth)));
            open.RemoveRange(0, 2);
        }
        return open[0].Depth;
    }

    /// <summary>What follows the literals header of the first block; null unless the block is compressed, its literals carry a table and are all of the source, and no sequence follows.</summary>
    private static byte[]? LiteralTable(byte[] frame, int size)
    {
        var reader = new LowBitReader(frame);
        if (reader.Read(32) != FrameMagic) return null;
        int descriptor = (int)reader.Read(8);
        if ((descriptor & 0x20) == 0) reader.Read(8);
        int contentBytes = (descriptor >> 6) switch { 0 => (descriptor & 0x20) >> 5, 1 => 2, 2 => 4, _ => 8 };
        reader.Read(8 * contentBytes);
        reader.Read(1);
        if (reader.Read(2) != 2) return null;
        int blockBytes = (int)reader.Read(21);
        int block = (int)reader.Position / 8;
        if (reader.Read(2) != 2) return null;
        int sizeBits = (int)reader.Read(2) switch { 0 or 1 => 10, 2 => 14, _ => 18 };
        if ((int)reader.Read(sizeBits) != size) return null;
        int coded = (int)reader.Read(sizeBits), start = (int)reader.Position / 8;
        return start + coded + 1 == block + blockBytes && frame[start + coded] == 0 ? frame[start..(start + coded)] : null;
    }
}
