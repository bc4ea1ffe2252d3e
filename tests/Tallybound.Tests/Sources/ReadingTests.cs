using System.Diagnostics;
using System.IO.Compression;
using System.IO.Pipelines;
using System.Security.Cryptography;
using CsCheck;
using Tallybound.Sources;
using Xunit;
using ZstdSharp;

namespace Tallybound.Tests.Sources;

public sealed class ReadingTests : IDisposable
{
    private readonly string root = Directory.CreateTempSubdirectory("tallybound-").FullName;

    public void Dispose() => Directory.Delete(root, recursive: true);

    private FoundSource Write(string name, byte[] content, bool inside = false)
    {
        string path = Path.Combine(root, name);
        File.WriteAllBytes(path, content);
        return Assert.Single(SourceWalk.Find(new SourceRequest([path], [], [], inside), TestContext.Current.CancellationToken).Sources);
    }

    private static async Task<(byte[] Bytes, Exception? Trouble)> ReadThroughPipe(SourceReading reading, long offset, long? length)
    {
        var pipe = new Pipe(SourceReader.PipeOptions);
        Task<SourceReadException?> filling = Task.Run(() => SourceReader.FillAsync(reading, offset, length, pipe.Writer, CancellationToken.None));
        using var all = new MemoryStream();
        while (true)
        {
            ReadResult result = await pipe.Reader.ReadAsync();
            foreach (ReadOnlyMemory<byte> part in result.Buffer) all.Write(part.Span);
            pipe.Reader.AdvanceTo(result.Buffer.End);
            if (result.IsCompleted) break;
        }
        return (all.ToArray(), await filling);
    }

    private static byte[] Seeded(int length)
    {
        var bytes = new byte[length];
        new Random(5).NextBytes(bytes);
        return bytes;
    }

    [Fact]
    public async Task Stretches_of_a_file_come_through_a_pipe_as_they_stand()
    {
        byte[] content = Seeded(5_000_000);
        using SourceReading reading = SourceOpener.Open(Write("file", content), MemberLimits.Default);
        Assert.Equal(content, (await ReadThroughPipe(reading, 0, null)).Bytes);
        Assert.Equal(content[4096..3_000_000], (await ReadThroughPipe(reading, 4096, 3_000_000 - 4096)).Bytes);
    }

    [Fact]
    public async Task A_pipe_without_a_writer_is_waited_for_and_then_read()
    {
        string path = Path.Combine(root, "pipe");
        using (Process make = Process.Start(new ProcessStartInfo("mkfifo", [path]) { UseShellExecute = false })!) await make.WaitForExitAsync(TestContext.Current.CancellationToken);
        FoundSource source = Assert.Single(SourceWalk.Find(new SourceRequest([path], [], []), TestContext.Current.CancellationToken).Sources);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        Task<(byte[] Bytes, Exception? Trouble)> read = ReadThroughPipe(reading, 0, null);
        await Task.Delay(250, TestContext.Current.CancellationToken);
        await File.WriteAllTextAsync(path, "late", TestContext.Current.CancellationToken);
        Assert.Equal("late"u8.ToArray(), (await read).Bytes);
    }

    [Fact]
    public void A_wait_for_bytes_can_be_ended()
    {
        string path = Path.Combine(root, "pipe");
        using (Process make = Process.Start(new ProcessStartInfo("mkfifo", [path]) { UseShellExecute = false })!) make.WaitForExit();
        FoundSource source = Assert.Single(SourceWalk.Find(new SourceRequest([path], [], []), TestContext.Current.CancellationToken).Sources);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        using var stop = new CancellationTokenSource(TimeSpan.FromMilliseconds(300));
        Assert.Throws<OperationCanceledException>(() => reading.Read(new byte[10], 0, stop.Token));
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task Members_are_read_as_what_they_hold_all_of_their_frames(bool zstandard)
    {
        byte[] content = Seeded(300_000);
        byte[] file = [.. Compress(content[..100_000], zstandard), .. Compress(content[100_000..], zstandard)];
        FoundSource source = Write("member", file, inside: true);
        Assert.Equal(SourceKind.Member, source.Kind);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        Assert.Equal(content, (await ReadThroughPipe(reading, 0, null)).Bytes);
        Assert.Null(reading.Stopped);
        Assert.Equal(file.Length, reading.CompressedBytes);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task A_bomb_is_stopped_by_the_ratio(bool zstandard)
    {
        using SourceReading reading = SourceOpener.Open(Write("bomb", Compress(new byte[64 << 20], zstandard), inside: true), new MemberLimits(50, 1L << 40));
        (byte[] bytes, _) = await ReadThroughPipe(reading, 0, null);
        Assert.InRange(bytes.Length, 1, 16 << 20);
        Assert.Contains("--inside-ratio", reading.Stopped!, StringComparison.Ordinal);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task A_member_is_stopped_at_the_size_limit_and_only_beyond_it(bool zstandard)
    {
        byte[] content = Seeded(200_000);
        FoundSource source = Write("large", Compress(content, zstandard), inside: true);
        using (SourceReading reading = SourceOpener.Open(source, new MemberLimits(1000, 150_000)))
        {
            Assert.Equal(content[..150_000], (await ReadThroughPipe(reading, 0, null)).Bytes);
            Assert.Contains("--inside-size", reading.Stopped!, StringComparison.Ordinal);
        }
        using SourceReading whole = SourceOpener.Open(source, new MemberLimits(1000, 200_000));
        Assert.Equal(content, (await ReadThroughPipe(whole, 0, null)).Bytes);
        Assert.Null(whole.Stopped);
    }

    [Theory]
    [InlineData(false)]
    [InlineData(true)]
    public async Task A_member_cut_short_gives_what_came_and_says_so(bool zstandard)
    {
        byte[] content = Seeded(400_000);
        byte[] file = Compress(content, zstandard);
        using SourceReading reading = SourceOpener.Open(Write("cut", file[..(file.Length / 2)], inside: true), MemberLimits.Default);
        (byte[] bytes, _) = await ReadThroughPipe(reading, 0, null);
        Assert.True(content.AsSpan().StartsWith(bytes));
        Assert.NotEmpty(bytes);
        Assert.Contains("damaged", reading.Stopped!, StringComparison.Ordinal);
    }

    [Fact]
    public void A_folder_that_took_a_files_place_is_an_error_in_words()
    {
        FoundSource source = Write("file", [1]);
        File.Delete(Path.Combine(root, "file"));
        Assert.Contains("vanished", Assert.Throws<SourceReadException>(() => SourceOpener.Open(source, MemberLimits.Default)).Message, StringComparison.Ordinal);
        Directory.CreateDirectory(Path.Combine(root, "file"));
        Assert.Contains("no regular file", Assert.Throws<SourceReadException>(() => SourceOpener.Open(source, MemberLimits.Default)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_digest_is_that_of_the_bytes_however_they_were_cut()
    {
        int cases = 0;
        Gen.Select(Gen.Byte.Array[0, 2000], Gen.Int[0, 2000]).Sample(
            (bytes, at) =>
            {
                Interlocked.Increment(ref cases);
                using var digest = new PieceDigest();
                digest.Append(bytes.AsSpan(0, Math.Min(at, bytes.Length)));
                digest.Append(bytes.AsSpan(Math.Min(at, bytes.Length)));
                return PieceDigest.Combine(digest.Pieces()) == (Convert.ToHexStringLower(SHA256.HashData(bytes)), false);
            }, iter: 200);
        Assert.Equal(200, cases);
    }

    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    public void A_source_above_one_piece_has_the_digest_of_its_pieces_digests(int above)
    {
        byte[] bytes = Seeded((int)PieceDigest.PieceBytes + above);
        using var digest = new PieceDigest();
        digest.Append(bytes.AsSpan(0, 1000));
        digest.Append(bytes.AsSpan(1000));
        string expected = above == 0
            ? Convert.ToHexStringLower(SHA256.HashData(bytes))
            : Convert.ToHexStringLower(SHA256.HashData([.. SHA256.HashData(bytes.AsSpan(0, (int)PieceDigest.PieceBytes)), .. SHA256.HashData(bytes.AsSpan((int)PieceDigest.PieceBytes))]));
        Assert.Equal((expected, above > 0), PieceDigest.Combine(digest.Pieces()));
    }

    private static byte[] Compress(byte[] content, bool zstandard)
    {
        using var output = new MemoryStream();
        using (Stream stream = zstandard ? new CompressionStream(output, 1) : new GZipStream(output, CompressionLevel.Fastest)) stream.Write(content);
        return output.ToArray();
    }
}
