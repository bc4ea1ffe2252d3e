namespace Tallybound.Profiling.Run;

/// <summary>Words for the ways a source or a run ends early.</summary>
internal static class RunEnd
{
    /// <summary>The user stopped the run while this source was read.</summary>
    public const string Stopped = "the run was stopped while it was read";

    /// <summary>The user stopped the run before this source had its turn.</summary>
    public const string NotReached = "not reached before the run was stopped";

    /// <summary>Why the run as a whole ended early.</summary>
    public const string ByUser = "stopped by the user";
}
