using System.Text;
using Tallybound.Profiling.Run;

namespace Tallybound.Cli.Logging;

/// <summary>Sends each event to <c>run.log</c> and, where it is wanted, to standard error.</summary>
internal sealed class RunLog : IRunLog, IDisposable
{
    private readonly Lock gate = new();
    private readonly StreamWriter file;
    private readonly bool json;
    private readonly Action<RunEventLevel, string> show;
    private IOException? failure;

    /// <summary>Opens the log.</summary>
    /// <param name="path">The log file, which must not exist.</param>
    /// <param name="json">Lines are JSON objects.</param>
    /// <param name="show">Takes each line for standard error.</param>
    /// <exception cref="IOException">The file cannot be made.</exception>
    public RunLog(string path, bool json, Action<RunEventLevel, string> show)
    {
        file = new StreamWriter(new FileStream(path, FileMode.CreateNew, FileAccess.Write, FileShare.Read), new UTF8Encoding(encoderShouldEmitUTF8Identifier: false)) { NewLine = "\n" };
        this.json = json;
        this.show = show;
    }

    /// <inheritdoc/>
    public void Write(RunEvent runEvent)
    {
        DateTime now = DateTime.UtcNow;
        string line = json ? LogLine.Json(runEvent, now) : LogLine.Text(runEvent, now);
        lock (gate)
        {
            try
            {
                file.WriteLine(line);
                file.Flush();
            }
            catch (IOException e)
            {
                // Told when the log is closed: the run's threads are not the place to stop at.
                failure ??= e;
            }
        }
        show(runEvent.Level, line);
    }

    /// <summary>Closes the file.</summary>
    /// <exception cref="IOException">A line could not be kept.</exception>
    public void Close()
    {
        Dispose();
        if (failure is not null) throw new IOException(failure.Message, failure);
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        try
        {
            file.Dispose();
        }
        catch (IOException e)
        {
            failure ??= e;
        }
    }
}
