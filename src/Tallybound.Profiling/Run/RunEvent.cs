namespace Tallybound.Profiling.Run;

/// <summary>One thing that happened in a run, for a log.</summary>
/// <param name="Level">How much it matters.</param>
/// <param name="Name">A fixed word for machines, such as <c>source-failed</c>.</param>
/// <param name="Text">The event in words, escaped for a terminal by whoever prints it.</param>
/// <param name="Source">The source it is about; null when it is about the run.</param>
public sealed record RunEvent(RunEventLevel Level, string Name, string Text, string? Source = null);

/// <summary>How much an event matters.</summary>
public enum RunEventLevel
{
    /// <summary>What was done.</summary>
    Information,

    /// <summary>A source that could not be read whole.</summary>
    Warning,

    /// <summary>The run itself cannot go on.</summary>
    Error,
}

/// <summary>Where a run's events go. Called from any of its threads, one at a time.</summary>
public interface IRunLog
{
    /// <summary>Takes one event; must not throw.</summary>
    void Write(RunEvent runEvent);
}
