using System.IO.Compression;
using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Tables;

public sealed class Rfc1951DynamicHeaderTests
{
    private const int EndOfBlock = 256;

    /// <summary>RFC 1951 §3.2.7: "8, 16 (+2 bits 11), 16 (+2 bits 10)" are twelve lengths of 8.</summary>
    [Fact]
    public void Twelve_equal_lengths_are_the_tokens_of_the_standard()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("rfc1951-rle");
        int[] tokens = vector.Integers("input");
        byte[] lengths = new byte[vector.GetProperty("expected").GetInt32()];
        Array.Fill(lengths, (byte)tokens[0]);
        var runs = new LengthRun[20];
        int made = LengthRun.Split(lengths, runs);
        Assert.Equal([new LengthRun(8, 0), new LengthRun(16, (byte)tokens[1]), new LengthRun(16, (byte)tokens[2])], runs[..made]);
        Assert.Equal(12, runs[..made].Sum(run => LengthRun.Repeats(run.Token, run.Extra)));
    }

    /// <summary>RFC 1951 §3.2.2.</summary>
    [Fact]
    public void Words_are_those_of_the_standard()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("rfc1951-canonical");
        ushort[] words = new ushort[8];
        CanonicalWords.Assign(vector.Bytes("input"), words);
        Assert.Equal(vector.Integers("expected"), words.Select(word => (int)word));
    }

    [Fact]
    public void Runs_stand_for_the_lengths_they_were_made_from() =>
        Gen.Select(Gen.Byte[0, 15], Gen.Int[1, 300]).Array[1, 6].Sample(stretches =>
        {
            byte[] lengths = [.. stretches.SelectMany(stretch => Enumerable.Repeat(stretch.Item1, stretch.Item2))];
            var runs = new LengthRun[lengths.Length];
            var read = new List<byte>();
            foreach (LengthRun run in runs[..LengthRun.Split(lengths, runs)])
            {
                byte length = run.Token < LengthRun.CopyToken ? run.Token : run.Token == LengthRun.CopyToken ? read[^1] : (byte)0;
                read.AddRange(Enumerable.Repeat(length, LengthRun.Repeats(run.Token, run.Extra)));
            }
            return read.SequenceEqual(lengths);
        });

    /// <summary>The referee is the zlib of the .NET runtime.</summary>
    [Fact]
    public void A_block_with_our_header_inflates()
    {
        int inflated = 0;
        Gen.Select(Gen.Int[1, 256], Gen.Int[0, 3000], Gen.Int[1, 8]).Sample((symbols, size, skew) =>
        {
            byte[] bytes = SkewedBytes.Of(symbols, size, skew);
            using var inflater = new DeflateStream(new MemoryStream(Deflated(bytes)), CompressionMode.Decompress);
            var read = new MemoryStream();
            inflater.CopyTo(read);
            Assert.Equal(bytes, read.ToArray());
            Interlocked.Increment(ref inflated);
        });
        Assert.True(inflated >= 100);
    }

    /// <summary>Compared with the zlib of the .NET runtime on its own lengths: never longer, and equal where zlib did not have to cut its precode.</summary>
    [Fact]
    public void Our_header_is_never_longer_than_the_one_zlib_wrote()
    {
        int compared = 0, equal = 0;
        Gen.Select(Gen.Int[2, 256], Gen.Int[1000, 12000], Gen.Int[1, 8]).Sample((symbols, size, skew) =>
        {
            var output = new MemoryStream();
            using (var deflater = new DeflateStream(output, new ZLibCompressionOptions { CompressionLevel = 6, CompressionStrategy = ZLibCompressionStrategy.HuffmanOnly }, leaveOpen: true)) deflater.Write(SkewedBytes.Of(symbols, size, skew));
            var reader = new LowBitReader(output.ToArray());
            reader.Read(1);
            if (reader.Read(2) != 2) return;
            long start = reader.Position;
            (byte[] literals, byte[] distances) = Rfc1951DynamicHeader.DecodeBlock(ref reader);
            var counter = default(BitCounter);
            Rfc1951DynamicHeader.EncodeBlock(literals, distances, ref counter);
            Assert.True(counter.Bits <= reader.Position - start, $"Ours has {counter.Bits} bits, zlib's {reader.Position - start}.");
            if (FreePrecodeDepth(literals, distances) <= 7)
            {
                Assert.Equal(reader.Position - start, counter.Bits);
                Interlocked.Increment(ref equal);
            }
            Interlocked.Increment(ref compared);
        });
        Assert.True(compared >= 50 && equal >= 25, $"{compared} compared, {equal} equal.");
    }

    [Fact]
    public void Damage_is_refused()
    {
        Assert.Throws<InvalidDataException>(() =>
        {
            var reader = new LowBitReader([0, 0, 0]);
            Rfc1951DynamicHeader.DecodeBlock(ref reader);
        });
        Assert.Throws<InvalidDataException>(() =>
        {
            // 14 bits of counts, then three precode words of one bit.
            var reader = new LowBitReader([0, 0, 0b0100_1001, 0b0010_0100, 0, 0, 0]);
            Rfc1951DynamicHeader.DecodeBlock(ref reader);
        });
        Assert.Throws<ArgumentException>(() =>
        {
            var counter = default(BitCounter);
            Rfc1951DynamicHeader.Encode([16, 16], ref counter);
        });
    }

    private static int FreePrecodeDepth(byte[] literals, byte[] distances)
    {
        var runs = new LengthRun[literals.Length + distances.Length];
        int made = LengthRun.Split(literals, runs);
        made += LengthRun.Split(distances, runs.AsSpan(made));
        long[] counts = new long[19];
        foreach (LengthRun run in runs[..made]) counts[run.Token]++;
        return CodeLengths.Free(counts).Max();
    }

    private static byte[] Deflated(byte[] bytes)
    {
        long[] counts = new long[EndOfBlock + 1];
        foreach (byte one in bytes) counts[one]++;
        counts[EndOfBlock] = 1;
        byte[] lengths = CodeLengths.Limited(counts, 15);
        ushort[] words = new ushort[lengths.Length];
        CanonicalWords.Assign(lengths, words);
        var writer = new LowBitWriter();
        writer.Write(0b101, 3);
        Rfc1951DynamicHeader.EncodeBlock(lengths, [0], ref writer);
        foreach (byte one in bytes) writer.Write(CanonicalWords.Reverse(words[one], lengths[one]), lengths[one]);
        writer.Write(CanonicalWords.Reverse(words[EndOfBlock], lengths[EndOfBlock]), lengths[EndOfBlock]);
        Assert.Equal(3 + HeaderBits(lengths) + Huffman.PayloadDigits(counts, lengths), writer.Bits);
        return writer.ToArray();
    }

    private static long HeaderBits(byte[] lengths)
    {
        var counter = default(BitCounter);
        Rfc1951DynamicHeader.EncodeBlock(lengths, [0], ref counter);
        return counter.Bits;
    }
}
