using System.IO.Pipelines;

namespace Tallybound.Sources;

/// <summary>Fills a pipe with a stretch of a source, reading ahead of whoever empties it.</summary>
public static class SourceReader
{
    /// <summary>Bytes of one read.</summary>
    public const int BlockBytes = 1 << 20;

    private const int BlocksAhead = 4;

    /// <summary>How a pipe for reading is made: blocks of 1 MiB, four of them ahead.</summary>
    public static PipeOptions PipeOptions { get; } = new(
        pauseWriterThreshold: BlocksAhead * (long)BlockBytes, resumeWriterThreshold: (BlocksAhead - 1) * (long)BlockBytes, minimumSegmentSize: BlockBytes, useSynchronizationContext: false);

    /// <summary>Reads a stretch into a pipe and completes its writer, with the exception where reading failed: what was read before stands in the pipe.</summary>
    /// <param name="source">The opened source.</param>
    /// <param name="offset">First byte.</param>
    /// <param name="length">Bytes; null: to the end.</param>
    /// <param name="writer">Takes the bytes.</param>
    /// <param name="stop">Ends reading; the writer is then completed without an exception.</param>
    public static async Task FillAsync(SourceReading source, long offset, long? length, PipeWriter writer, CancellationToken stop)
    {
        long left = length ?? long.MaxValue;
        Exception? trouble = null;
        try
        {
            while (left > 0)
            {
                Memory<byte> block = writer.GetMemory(BlockBytes);
                int read = source.Read(block.Span[..(int)Math.Min(block.Length, left)], offset, stop);
                if (read == 0) break;
                writer.Advance(read);
                offset += read;
                left -= read;
                FlushResult flushed = await writer.FlushAsync(CancellationToken.None).ConfigureAwait(false);
                if (flushed.IsCompleted) break;
            }
        }
        catch (OperationCanceledException)
        {
            // Whoever stopped the run knows; the bytes so far are whole.
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            trouble = exception;
        }
        await writer.CompleteAsync(trouble).ConfigureAwait(false);
    }
}
