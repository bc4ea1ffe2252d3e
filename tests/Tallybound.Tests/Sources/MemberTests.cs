using System.Buffers.Binary;
using System.IO.Compression;
using Tallybound.Sources;
using Tallybound.Sources.Members;
using Xunit;
using ZstdSharp;
using ZstdSharp.Unsafe;

namespace Tallybound.Tests.Sources;

/// <summary>Compressed members at their edges: RFC 1952 and RFC 8878.</summary>
public sealed class MemberTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    public void Dispose() => folder.Dispose();

    private (byte[] Content, string? Stopped) ReadInside(byte[] file, MemberLimits? limits = null)
    {
        string path = folder.Write("member", file);
        FoundSource source = Assert.Single(SourceWalk.Find(new SourceRequest([path], [], [], Inside: true), TestContext.Current.CancellationToken).Sources);
        Assert.Equal((SourceKind.Member, null), (source.Kind, source.Bytes));
        using SourceReading reading = SourceOpener.Open(source, limits ?? MemberLimits.Default);
        using var content = new MemoryStream();
        var block = new byte[1 << 20];
        while (reading.Read(block, content.Length, TestContext.Current.CancellationToken) is var read and > 0) content.Write(block, 0, read);
        Assert.Equal(0, reading.Read(block, content.Length, TestContext.Current.CancellationToken));
        return (content.ToArray(), reading.Stopped);
    }

    private static byte[] Text(int length)
    {
        var bytes = new byte[length];
        var random = new Random(11);
        for (int i = 0; i < length; i++) bytes[i] = (byte)('a' + random.Next(6));
        return bytes;
    }

    private static byte[] Gzip(byte[] content)
    {
        using var output = new MemoryStream();
        using (var stream = new GZipStream(output, CompressionLevel.Optimal)) stream.Write(content);
        return output.ToArray();
    }

    private static byte[] Zstandard(byte[] content)
    {
        using var compressor = new Compressor(3);
        compressor.SetParameter(ZSTD_cParameter.ZSTD_c_checksumFlag, 1);
        return compressor.Wrap(content).ToArray();
    }

    private static byte[] Skippable(int length)
    {
        var frame = new byte[8 + length];
        BinaryPrimitives.WriteUInt32LittleEndian(frame, 0x184D2A53);
        BinaryPrimitives.WriteInt32LittleEndian(frame.AsSpan(4), length);
        return frame;
    }

    [Fact]
    public void A_format_is_known_by_its_first_bytes()
    {
        Assert.Equal(MemberKind.Gzip, MemberFormat.Of(Gzip([1])));
        Assert.Equal(MemberKind.Zstandard, MemberFormat.Of(Zstandard([1])));
        Assert.Equal(MemberKind.Zstandard, MemberFormat.Of(Skippable(3)));
        Assert.Null(MemberFormat.Of([]));
        Assert.Null(MemberFormat.Of([0x1F, 0x8B]));
        Assert.Null(MemberFormat.Of("plain text"u8));
    }

    [Fact]
    public void Skippable_frames_hold_nothing_and_those_around_them_are_read_whole()
    {
        byte[] content = Text(90_000);
        (byte[] read, string? stopped) = ReadInside([.. Skippable(5), .. Zstandard(content[..40_000]), .. Skippable(100_000), .. Zstandard(content[40_000..]), .. Skippable(0)]);
        Assert.Null(stopped);
        Assert.Equal(content, read);
    }

    [Fact]
    public void Empty_content_is_content()
    {
        Assert.Equal(([], null), ReadInside(Convert.FromHexString("1F8B0800000000000003" + "0300" + "0000000000000000")));
        Assert.Equal(([], null), ReadInside(Zstandard([])));
    }

    [Fact]
    public void Zeros_behind_the_last_gzip_member_are_padding()
    {
        byte[] content = Text(10_000);
        (byte[] read, string? stopped) = ReadInside([.. Gzip(content), .. new byte[512]]);
        Assert.Equal(content, read);
        Assert.Null(stopped);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void Wherever_a_member_is_cut_it_gives_a_beginning_and_says_so(bool zstandard)
    {
        byte[] content = Text(60_000), file = zstandard ? Zstandard(content) : Gzip(content);
        int cuts = 0;
        for (int length = 4; length < file.Length; length += length < 40 || length > file.Length - 20 ? 1 : 997)
        {
            (byte[] read, string? stopped) = ReadInside(file[..length]);
            Assert.True(content.AsSpan().StartsWith(read));
            Assert.True(stopped?.Contains("damaged or cut short", StringComparison.Ordinal), $"cut at {length} of {file.Length}: {stopped}");
            cuts++;
        }
        Assert.InRange(cuts, 50, 200);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public void A_changed_bit_is_found_and_what_came_before_counts(bool zstandard)
    {
        byte[] content = Text(3_000_000), file = zstandard ? Zstandard(content) : Gzip(content);
        file[file.Length / 2] ^= 0x10;
        (byte[] read, string? stopped) = ReadInside(file);
        Assert.Contains("damaged", stopped!, StringComparison.Ordinal);
        Assert.InRange(read.Length, 1_000_000, 3_000_000);
        Assert.True(content.AsSpan(0, 1_000_000).SequenceEqual(read.AsSpan(0, 1_000_000)));
    }

    /// <summary>A frame by RFC 8878 §3.1.1: window descriptor 0x90 (2^28 bytes), then one raw block of one byte.</summary>
    [Fact]
    public void A_window_beyond_what_is_given_is_refused_in_words() =>
        Assert.Contains("128 MiB", ReadInside(Convert.FromHexString("28B52FFD" + "00" + "90" + "090000" + "61")).Stopped!, StringComparison.Ordinal);

    [Fact]
    public void A_short_file_of_one_value_is_no_bomb()
    {
        Assert.Equal((1 << 20, null), (ReadInside(Zstandard(new byte[1 << 20]), new MemberLimits(2, 1L << 40)) is var (read, stopped) ? (read.Length, stopped) : default));
    }

    [Fact]
    public void The_same_member_is_cut_at_the_same_byte_every_time()
    {
        byte[] file = Gzip(new byte[32 << 20]);
        var limits = new MemberLimits(100, 1L << 40);
        int first = ReadInside(file, limits).Content.Length;
        Assert.Equal(first, ReadInside(file, limits).Content.Length);
        Assert.InRange(first, 1 << 20, 32 << 20);
    }
}
