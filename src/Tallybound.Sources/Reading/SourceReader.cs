using System.IO.Pipelines;

namespace Tallybound.Sources;

/// <summary>Fills a pipe with a stretch of a source, reading ahead of whoever empties it.</summary>
public static class SourceReader
{
    /// <summary>Bytes of one read.</summary>
    public const int BlockBytes = 1 << 20;

    private const int BlocksAhead = 4;
    private const int LeastRoomBytes = 1 << 16;

    /// <summary>How a pipe for reading is made: blocks of 1 MiB, four of them ahead.</summary>
    public static PipeOptions PipeOptions { get; } = new(
        pauseWriterThreshold: BlocksAhead * (long)BlockBytes, resumeWriterThreshold: (BlocksAhead - 1) * (long)BlockBytes, minimumSegmentSize: BlockBytes, useSynchronizationContext: false);

    /// <summary>Reads a stretch into a pipe and completes its writer; what was read before an error stands in the pipe.</summary>
    /// <remarks>The writer is never completed with the error: a pipe's reader would throw it at once and lose the bytes that wait in front of it.</remarks>
    /// <param name="source">The opened source.</param>
    /// <param name="offset">First byte.</param>
    /// <param name="length">Bytes; null: to the end.</param>
    /// <param name="writer">Takes the bytes.</param>
    /// <param name="stop">Ends reading; the stretch then ends where it is.</param>
    /// <returns>Why reading failed; null where it did not.</returns>
    public static async Task<SourceReadException?> FillAsync(SourceReading source, long offset, long? length, PipeWriter writer, CancellationToken stop)
    {
        long left = length ?? long.MaxValue;
        SourceReadException? trouble = null;
        try
        {
            while (left > 0)
            {
                // A pipe gives a few KiB at a time: what is left of a block is filled before another is taken.
                Memory<byte> block = writer.GetMemory(LeastRoomBytes);
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
            trouble = exception as SourceReadException ?? new SourceReadException(Native.ErrorWords.Of(exception), exception);
        }
        await writer.CompleteAsync().ConfigureAwait(false);
        return trouble;
    }
}
