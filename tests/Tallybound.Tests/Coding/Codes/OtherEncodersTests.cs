using System.IO.Compression;
using ICSharpCode.SharpZipLib.Zip.Compression;
using Tallybound.Coding.Codes;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

/// <summary>Blocks of literals by other encoders: none is cheaper than ours, and all are equal where the free code keeps Deflate's limit of 15.</summary>
public sealed class OtherEncodersTests
{
    private static byte[] Made(int kind)
    {
        var random = new Random(kind);
        var bytes = new byte[200_000];
        for (int i = 0; i < bytes.Length; i++)
        {
            bytes[i] = kind switch
            {
                0 => (byte)random.Next(256),
                1 => (byte)(random.Next(16) * random.Next(16)),
                2 => (byte)Math.Min(255, -Math.Log(random.NextDouble()) * 20),
                // Each value half as likely as the one before: free codes deeper than 15.
                3 => (byte)System.Numerics.BitOperations.TrailingZeroCount(random.Next() | (1 << 25)),
                _ => (byte)(random.Next(40) == 0 ? random.Next(256) : i % 7),
            };
        }
        return bytes;
    }

    private static void Compare(List<LiteralBlock> blocks, int atLeast)
    {
        Assert.True(blocks.Count >= atLeast, $"{blocks.Count} blocks were found.");
        foreach (LiteralBlock block in blocks)
        {
            var lengths = new byte[257];
            Huffman.Lengths(block.Counts, lengths);
            long ours = Huffman.PayloadDigits(block.Counts, lengths);
            if (lengths.Max() <= 15) Assert.Equal(ours, block.PayloadBits);
            else Assert.True(block.PayloadBits >= ours);
            var limited = new byte[257];
            Assert.True(LengthLimited.TryLengths(block.Counts, 15, limited));
            Assert.True(block.PayloadBits >= Huffman.PayloadDigits(block.Counts, limited));
        }
    }

    [Fact]
    public void Blocks_of_zlib_cost_what_ours_cost()
    {
        var blocks = new List<LiteralBlock>();
        for (int kind = 0; kind < 5; kind++)
        {
            using var output = new MemoryStream();
            using (var deflate = new DeflateStream(output, new ZLibCompressionOptions { CompressionLevel = 6, CompressionStrategy = ZLibCompressionStrategy.HuffmanOnly }, leaveOpen: true)) deflate.Write(Made(kind));
            blocks.AddRange(new DeflateBlocks(output.ToArray()).Dynamic());
        }
        Compare(blocks, 20);
    }

    [Fact]
    public void Blocks_of_a_second_encoder_cost_what_ours_cost()
    {
        var blocks = new List<LiteralBlock>();
        for (int kind = 0; kind < 5; kind++)
        {
            var deflater = new Deflater(6, noZlibHeaderOrFooter: true);
            deflater.SetStrategy(DeflateStrategy.HuffmanOnly);
            deflater.SetInput(Made(kind));
            deflater.Finish();
            var output = new byte[400_000];
            int length = deflater.Deflate(output);
            Assert.True(deflater.IsFinished);
            blocks.AddRange(new DeflateBlocks(output[..length]).Dynamic());
        }
        Compare(blocks, 20);
    }

    /// <summary>Golden files of Go's compress/flate (Debian package golang-1.19-src): payload bits of the first block, read off by independent code.</summary>
    [Theory]
    [InlineData("pi", 12_709)]
    [InlineData("shifts", 14_360)]
    [InlineData("text", 1_562)]
    [InlineData("text-shift", 1_451)]
    [InlineData("zero", 309)]
    [InlineData("null-max", 65_536)]
    public void Golden_blocks_of_a_third_encoder_are_optimal(string name, long payloadBits)
    {
        string golden = Prerequisites.RequireFile($"/usr/share/go-1.19/src/compress/flate/testdata/huffman-{name}.golden", "golang-1.19-src");
        LiteralBlock first = new DeflateBlocks([.. File.ReadAllBytes(golden), .. new byte[8]]).DynamicFirst();
        Assert.Equal(payloadBits, first.PayloadBits);
        var lengths = new byte[257];
        Huffman.Lengths(first.Counts, lengths);
        Assert.Equal(payloadBits, Huffman.PayloadDigits(first.Counts, lengths));
    }
}
