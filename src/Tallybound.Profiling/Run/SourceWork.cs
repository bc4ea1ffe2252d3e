using Tallybound.Profiling.Plan;
using Tallybound.Sources;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>What one worker counted of a source.</summary>
/// <param name="Tallies">One a view, in the order asked for.</param>
/// <param name="Segments">Order-0 counts along the source.</param>
internal sealed record SourcePart(ISymbolTally[] Tallies, SegmentTally Segments)
{
    /// <summary>Adds what another worker counted.</summary>
    public void Merge(SourcePart other)
    {
        for (int view = 0; view < Tallies.Length; view++) Tallies[view].Merge(other.Tallies[view]);
        Segments.Merge(other.Segments);
    }
}

/// <summary>A source while it is read: its units, and what each worker has of it.</summary>
internal sealed class SourceWork : IDisposable
{
    private readonly Lock gate = new();
    private readonly Dictionary<int, SourcePart> parts = [];
    private readonly IReadOnlyList<byte[]>[] digests;
    private readonly long[] read;
    private SourceReading? reading;
    private string? trouble;
    private int unitsLeft;

    /// <summary>A source that nothing was read of yet.</summary>
    /// <param name="id">Place in the plan.</param>
    /// <param name="entry">What the plan has of it.</param>
    /// <param name="parameters">Parameters of the run.</param>
    public SourceWork(int id, PlanEntry entry, RunParameters parameters)
    {
        (Id, Entry) = (id, entry);
        // A regular file that says it is empty may still have something to give (such are some of the system's own).
        Bytes = entry.Found!.Bytes is 0 ? null : entry.Found.Bytes;
        Units = [.. WorkUnit.Cut(id, Bytes)];
        unitsLeft = Units.Count;
        digests = new IReadOnlyList<byte[]>[Units.Count];
        read = new long[Units.Count];
        long segment = Bytes is { } known ? SegmentSize.For(known, parameters.SegmentBytes) : parameters.SegmentBytes ?? SegmentSize.LeastBytes;
        SegmentBytes = segment;
        Samples = Bytes is null || segment > SegmentSize.LeastBytes ? new SampleStore(new SamplePlan(parameters.Seed), Bytes) : null;
    }

    public int Id { get; }

    public PlanEntry Entry { get; }

    /// <summary>Length by the plan; null: unknown.</summary>
    public long? Bytes { get; }

    /// <summary>The stretches to be read, in order.</summary>
    public IReadOnlyList<WorkUnit> Units { get; }

    /// <summary>Starting size of a segment.</summary>
    public long SegmentBytes { get; }

    /// <summary>Sample windows; null where no block size below a segment is asked for.</summary>
    public SampleStore? Samples { get; }

    /// <summary>The first thing that went wrong, in words; null: nothing did.</summary>
    public string? Trouble => Volatile.Read(ref trouble);

    /// <summary>Opens the source once for all its units.</summary>
    /// <exception cref="SourceReadException">It cannot be opened.</exception>
    public SourceReading Open(MemberLimits limits)
    {
        lock (gate) return reading ??= SourceOpener.Open(Entry.Found!, limits);
    }

    /// <summary>What this worker has of the source; made by <paramref name="make"/> when it comes first.</summary>
    public SourcePart PartOf(int worker, Func<SourcePart> make)
    {
        lock (gate)
        {
            if (parts.TryGetValue(worker, out SourcePart? part)) return part;
        }
        // Made outside the lock: it may wait for a large tally.
        SourcePart made = make();
        lock (gate) parts.Add(worker, made);
        return made;
    }

    /// <summary>Notes what a unit gave; true for the last one, whose worker finishes the source.</summary>
    public bool Complete(WorkUnit unit, long bytes, IReadOnlyList<byte[]> unitDigests, string? unitTrouble)
    {
        lock (gate)
        {
            read[unit.Index] = bytes;
            digests[unit.Index] = unitDigests;
            if (unitTrouble is not null) trouble ??= unitTrouble;
            return --unitsLeft == 0;
        }
    }

    /// <summary>All that was counted, as one part; the others are handed to <paramref name="giveBack"/>.</summary>
    public SourcePart? Merged(int worker, Action<SourcePart> giveBack)
    {
        lock (gate)
        {
            if (parts.Count == 0) return null;
            // The finisher's own part is the sum: it is in this processor's cache, and a sum has no order.
            SourcePart sum = parts.TryGetValue(worker, out SourcePart? own) ? own : parts.Values.First();
            foreach (SourcePart part in parts.Values.Where(part => part != sum))
            {
                sum.Merge(part);
                giveBack(part);
            }
            parts.Clear();
            return sum;
        }
    }

    /// <summary>Bytes read in all; those behind a unit that ended early are not of one piece with those before it, and count too.</summary>
    public long BytesRead => read.Sum();

    /// <summary>Digests of the pieces read, in order.</summary>
    public IReadOnlyList<byte[]> Pieces() => [.. digests.Where(unit => unit is not null).SelectMany(unit => unit)];

    /// <summary>What reading says of itself once it is over.</summary>
    public (string? Stopped, long? CompressedBytes, long? LengthNow) Afterwards()
    {
        lock (gate) return reading is null ? (null, null, null) : (reading.Stopped, reading.CompressedBytes, reading.LengthNow());
    }

    public void Dispose() => reading?.Dispose();
}
