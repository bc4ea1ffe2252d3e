using System.IO.Pipelines;
using System.Security.Cryptography;
using Tallybound.Sources;
using Tallybound.Sources.Native;
using Xunit;

namespace Tallybound.Tests.Sources;

/// <summary>Files that change while they are read, sources that fail, and what a pipe is left with.</summary>
public sealed class ReadingEdgeTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    public void Dispose() => folder.Dispose();

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    private static FoundSource Find(string path) => Assert.Single(SourceWalk.Find(new SourceRequest([path], [], []), Stop).Sources);

    [Fact]
    public void A_file_that_shrank_ends_where_it_ends_now()
    {
        string path = folder.Write("file", new byte[10_000]);
        using SourceReading reading = SourceOpener.Open(Find(path), MemberLimits.Default);
        using (var file = new FileStream(path, FileMode.Open)) file.SetLength(4_000);
        var buffer = new byte[10_000];
        Assert.Equal(4_000, reading.Read(buffer, 0, Stop));
        Assert.Equal(0, reading.Read(buffer, 4_000, Stop));
        Assert.Equal((10_000, 4_000), (reading.Length, reading.LengthNow()));
    }

    [Fact]
    public async Task A_file_that_grew_is_read_to_where_it_was_asked_and_tells_its_length_now()
    {
        string path = folder.Write("file", new byte[1_000]);
        using SourceReading reading = SourceOpener.Open(Find(path), MemberLimits.Default);
        await File.AppendAllTextAsync(path, "more", Stop);
        var pipe = new Pipe(SourceReader.PipeOptions);
        await SourceReader.FillAsync(reading, 0, reading.Length, pipe.Writer, Stop);
        ReadResult result = await pipe.Reader.ReadAsync(Stop);
        Assert.Equal((1_000, true), (result.Buffer.Length, result.IsCompleted));
        Assert.Equal(1_004, reading.LengthNow());
    }

    [Fact]
    public void A_file_of_the_kernel_that_says_it_is_empty_gives_what_it_has()
    {
        FoundSource source = Find("/proc/self/status");
        Assert.Equal(0, source.Bytes);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        Assert.InRange(reading.Read(new byte[4096], 0, Stop), 100, 4096);
    }

    /// <summary>No page lies at address 0 of a process, and the kernel answers such a read with EIO (proc_pid_mem).</summary>
    [Fact]
    public void An_input_error_is_told_in_words()
    {
        using SourceReading reading = SourceOpener.Open(Find("/proc/self/mem"), MemberLimits.Default);
        Assert.Equal("the device reported a read error", Assert.Throws<SourceReadException>(() => reading.Read(new byte[10], 0, Stop)).Message);
    }

    [Fact]
    public void Several_threads_read_one_file_at_different_places()
    {
        var content = new byte[1 << 20];
        new Random(3).NextBytes(content);
        using SourceReading reading = SourceOpener.Open(Find(folder.Write("file", content)), MemberLimits.Default);
        int blocks = 0;
        Parallel.For(0, 256, block =>
        {
            var buffer = new byte[4096];
            Assert.Equal(4096, reading.Read(buffer, block * 4096L, Stop));
            Assert.True(content.AsSpan(block * 4096, 4096).SequenceEqual(buffer));
            Interlocked.Increment(ref blocks);
        });
        Assert.Equal(256, blocks);
    }

    [Fact]
    public void Closing_twice_closes_no_other_file()
    {
        FoundSource source = Find(folder.Write("file", [1]));
        SourceReading first = SourceOpener.Open(source, MemberLimits.Default);
        first.Dispose();
        using SourceReading second = SourceOpener.Open(source, MemberLimits.Default);
        first.Dispose();
        Assert.Equal(1, second.Read(new byte[10], 0, Stop));
        Assert.Contains("closed", Assert.Throws<SourceReadException>(() => first.Read(new byte[10], 0, Stop)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public async Task What_was_read_before_an_error_is_in_the_pipe_and_the_error_is_handed_over()
    {
        var pipe = new Pipe(SourceReader.PipeOptions);
        using var failing = new FailingReading(100_000);
        SourceReadException? trouble = await SourceReader.FillAsync(failing, 0, null, pipe.Writer, Stop);
        ReadResult result = await pipe.Reader.ReadAsync(Stop);
        Assert.Equal((100_000L, true), (result.Buffer.Length, result.IsCompleted));
        Assert.Equal("the device reported a read error", trouble?.Message);
    }

    [Fact]
    public async Task Bytes_that_trickle_in_share_blocks()
    {
        using var pool = new CountingPool();
        var pipe = new Pipe(new PipeOptions(pool, pauseWriterThreshold: 64 << 20, resumeWriterThreshold: 32 << 20, minimumSegmentSize: SourceReader.BlockBytes, useSynchronizationContext: false));
        using var trickle = new FailingReading(4 << 20) { Step = 4096 };
        await SourceReader.FillAsync(trickle, 0, null, pipe.Writer, Stop);
        Assert.InRange(pool.Rented, 4, 6);
        await pipe.Reader.CompleteAsync();
    }

    /// <summary>The words of errors that no test can bring about; numbers as in errno(3) of Linux.</summary>
    [Theory]
    [InlineData(2, "vanished")]
    [InlineData(5, "read error")]
    [InlineData(9, "closed")]
    [InlineData(13, "permission denied")]
    [InlineData(21, "folder")]
    [InlineData(24, "too many files")]
    [InlineData(36, "too long")]
    [InlineData(40, "links")]
    [InlineData(116, "network")]
    [InlineData(95, "error 95 (")]
    public void Errors_are_told_in_words(int error, string words) => Assert.Contains(words, ErrorWords.Of(error), StringComparison.Ordinal);

    [Fact]
    public void A_piece_of_no_bytes_changes_no_digest()
    {
        byte[] one = SHA256.HashData([1]), two = SHA256.HashData([2]), nothing = SHA256.HashData([]);
        Assert.Equal(PieceDigest.Combine([one]), PieceDigest.Combine([one, nothing]));
        Assert.Equal(PieceDigest.Combine([one, two]), PieceDigest.Combine([nothing, one, nothing, two]));
        Assert.Equal((Convert.ToHexStringLower(nothing), false), PieceDigest.Combine([nothing, nothing]));
        Assert.Equal((Convert.ToHexStringLower(SHA256.HashData([.. one, .. two])), true), PieceDigest.Combine([one, two]));
    }

    [Fact]
    public void Reading_a_digest_does_not_end_it()
    {
        using var digest = new PieceDigest();
        Assert.Equal(SHA256.HashData([]), Assert.Single(digest.Pieces()));
        digest.Append([1, 2]);
        Assert.Equal(SHA256.HashData([1, 2]), Assert.Single(digest.Pieces()));
        digest.Append([3]);
        Assert.Equal(SHA256.HashData([1, 2, 3]), Assert.Single(digest.Pieces()));
    }

    /// <summary>Gives so many bytes in steps, then fails as a bad disk does.</summary>
    private sealed class FailingReading(long good) : SourceReading
    {
        public int Step { get; init; } = int.MaxValue;

        public override long? Length => null;

        public override bool CanReadAnywhere => false;

        public override int Read(Span<byte> buffer, long offset, CancellationToken stop)
        {
            if (offset >= good) throw new SourceReadException(ErrorWords.Of(5));
            return (int)Math.Min(Math.Min(buffer.Length, Step), good - offset);
        }

        protected override void Dispose(bool disposing)
        {
        }
    }

    private sealed class CountingPool : System.Buffers.MemoryPool<byte>
    {
        public int Rented { get; private set; }

        public override int MaxBufferSize => int.MaxValue;

        public override System.Buffers.IMemoryOwner<byte> Rent(int minBufferSize = -1)
        {
            Rented++;
            return Shared.Rent(minBufferSize);
        }

        protected override void Dispose(bool disposing)
        {
        }
    }
}
