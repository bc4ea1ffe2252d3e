using System.Buffers;
using System.IO.Pipelines;
using Tallybound.Profiling.Plan;
using Tallybound.Sources;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>Reads one unit and counts it.</summary>
internal sealed class UnitCounter(RunParameters parameters, RunProgress progress)
{
    /// <summary>Bytes handed to one tally after the other while they are in the cache.</summary>
    private const int SliceBytes = 1 << 16;

    /// <summary>Bytes before a unit that contexts and blocks reach back to.</summary>
    private const int BeforeBytes = 16;

    private static readonly MemberLimits NoLimits = MemberLimits.Default;
    private readonly MemberLimits limits = parameters.Inside ? new MemberLimits(parameters.InsideRatio, parameters.InsideBytes) : NoLimits;
    private readonly byte[] smallBuffer = new byte[TallyChoice.SparseAtMostBytes + 1];

    /// <summary>What a unit gave.</summary>
    /// <param name="Bytes">Bytes counted.</param>
    /// <param name="Digests">Digests of its pieces; empty where none are taken.</param>
    /// <param name="Trouble">Why it ended early, in words; null: it did not.</param>
    public readonly record struct Outcome(long Bytes, IReadOnlyList<byte[]> Digests, string? Trouble);

    /// <summary>Counts a unit; what was read before trouble is counted.</summary>
    public Outcome Count(SourceWork source, WorkUnit unit, Func<SourcePart> part, CancellationToken stop)
    {
        SourceReading reading;
        try
        {
            reading = source.Open(limits);
        }
        catch (SourceReadException exception)
        {
            return new Outcome(0, [], exception.Message);
        }
        var counting = new Counting(source, unit, part(), parameters.Digest, progress);
        try
        {
            string? trouble = counting.Begin(reading, unit.Offset, stop)
                ?? (unit.Length <= TallyChoice.SparseAtMostBytes && reading.CanReadAnywhere ? CountSmall(reading, unit, counting, stop) : CountThroughPipe(reading, unit, counting, stop));
            return counting.Finish(trouble);
        }
        finally
        {
            counting.Dispose();
        }
    }

    /// <summary>A small file is read in one call; a pipe would cost more than the reading.</summary>
    private string? CountSmall(SourceReading reading, WorkUnit unit, Counting counting, CancellationToken stop)
    {
        int filled = 0, length = (int)unit.Length!.Value;
        string? trouble = null;
        try
        {
            while (filled < length && reading.Read(smallBuffer.AsSpan(filled, length - filled), unit.Offset + filled, stop) is var read and > 0) filled += read;
        }
        catch (SourceReadException exception)
        {
            trouble = exception.Message;
        }
        catch (OperationCanceledException)
        {
            trouble = RunEnd.Stopped;
        }
        counting.Append(smallBuffer.AsSpan(0, filled));
        return trouble;
    }

    private static string? CountThroughPipe(SourceReading reading, WorkUnit unit, Counting counting, CancellationToken stop)
    {
        var pipe = new Pipe(SourceReader.PipeOptions);
        Task<SourceReadException?> filling = Task.Run(() => SourceReader.FillAsync(reading, unit.Offset, unit.Length, pipe.Writer, stop), CancellationToken.None);
        while (true)
        {
            ValueTask<ReadResult> pending = pipe.Reader.ReadAsync(CancellationToken.None);
            ReadResult result = pending.IsCompletedSuccessfully ? pending.Result : pending.AsTask().GetAwaiter().GetResult();
            foreach (ReadOnlyMemory<byte> block in result.Buffer)
                for (int at = 0; at < block.Length; at += SliceBytes) counting.Append(block.Span.Slice(at, Math.Min(SliceBytes, block.Length - at)));
            pipe.Reader.AdvanceTo(result.Buffer.End);
            if (result.IsCompleted) break;
        }
        pipe.Reader.Complete();
        return filling.GetAwaiter().GetResult()?.Message ?? (stop.IsCancellationRequested ? RunEnd.Stopped : null);
    }

    /// <summary>One unit under way.</summary>
    private sealed class Counting(SourceWork source, WorkUnit unit, SourcePart part, bool digestWanted, RunProgress progress) : IDisposable
    {
        private readonly PieceDigest? digest = digestWanted ? new PieceDigest() : null;
        private long offset = unit.Offset;

        /// <summary>Tells the tallies where the unit stands; the trouble, where the bytes before it cannot be read.</summary>
        public string? Begin(SourceReading reading, long start, CancellationToken stop)
        {
            Span<byte> before = stackalloc byte[BeforeBytes];
            int filled = 0;
            try
            {
                while (start > 0 && filled < BeforeBytes && reading.Read(before[filled..], start - BeforeBytes + filled, stop) is var read and > 0) filled += read;
            }
            catch (SourceReadException exception)
            {
                return exception.Message;
            }
            catch (OperationCanceledException)
            {
                return RunEnd.Stopped;
            }
            if (start > 0 && filled < BeforeBytes) return null;
            foreach (ISymbolTally tally in part.Tallies) tally.Begin(start, before[..filled]);
            return null;
        }

        public void Append(ReadOnlySpan<byte> bytes)
        {
            foreach (ISymbolTally tally in part.Tallies) tally.Append(bytes);
            part.Segments.Append(offset, bytes);
            source.Samples?.Offer(offset, bytes);
            digest?.Append(bytes);
            offset += bytes.Length;
            progress.AddBytes(bytes.Length);
        }

        public Outcome Finish(string? trouble) => new(offset - unit.Offset, digest?.Pieces() ?? [], trouble);

        public void Dispose() => digest?.Dispose();
    }
}
