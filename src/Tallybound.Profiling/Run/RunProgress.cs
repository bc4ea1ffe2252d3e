namespace Tallybound.Profiling.Run;

/// <summary>Counters of a run under way, written by its threads and read by whoever shows them.</summary>
public sealed class RunProgress
{
    private long bytesRead;
    private long sourcesDone;
    private string currentSource = "";

    /// <summary>Bytes of the plan with a known size.</summary>
    public long BytesPlanned { get; internal set; }

    /// <summary>Sources of the plan to be read.</summary>
    public long SourcesPlanned { get; internal set; }

    /// <summary>True when a source of unknown length is in the plan, so that no time left can be told.</summary>
    public bool HasStream { get; internal set; }

    /// <summary>Bytes counted so far.</summary>
    public long BytesRead => Volatile.Read(ref bytesRead);

    /// <summary>Sources finished, failed ones included.</summary>
    public long SourcesDone => Volatile.Read(ref sourcesDone);

    /// <summary>The source that was begun last.</summary>
    public string CurrentSource => Volatile.Read(ref currentSource);

    internal void AddBytes(long bytes) => Interlocked.Add(ref bytesRead, bytes);

    internal void AddSource() => Interlocked.Increment(ref sourcesDone);

    internal void Begin(string source) => Volatile.Write(ref currentSource, source);
}
