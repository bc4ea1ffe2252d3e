using Tallybound.Profiling.Run;

namespace Tallybound.Cli.Screen;

/// <summary>What standard error shows of a run: progress on a terminal, else the log's lines; with <c>--quiet</c> errors alone.</summary>
/// <param name="quiet">Errors alone.</param>
/// <param name="jsonLog">Log lines are for machines, so that no progress may stand among them.</param>
internal sealed class ErrorScreen(bool quiet, bool jsonLog) : IDisposable
{
    private ProgressDisplay? display;

    /// <summary>Begins to show a run under way, where there is someone to see it.</summary>
    public void Begin(RunProgress progress)
    {
        if (!quiet && !jsonLog && !Console.IsErrorRedirected) Volatile.Write(ref display, new ProgressDisplay(progress));
    }

    /// <summary>Shows a line of the log if it is wanted. Beside a progress display, what goes well needs no line.</summary>
    public void Show(RunEventLevel level, string line)
    {
        ProgressDisplay? shown = Volatile.Read(ref display);
        RunEventLevel least = quiet ? RunEventLevel.Error : shown is null ? RunEventLevel.Information : RunEventLevel.Warning;
        if (level < least) return;
        if (shown is null) StandardStreams.WriteErrorLine(line);
        else shown.WriteLine(line);
    }

    /// <summary>Leaves the terminal as it was when the process is about to end at once.</summary>
    public void Abandon() => Volatile.Read(ref display)?.GiveCursorBack();

    /// <summary>Clears the display.</summary>
    public void Dispose() => Interlocked.Exchange(ref display, null)?.Dispose();
}
