using System.Diagnostics;
using System.Globalization;
using Tallybound.Profiling.Run;
using Tallybound.Profiling.Wording;
using Tallybound.Sources;

namespace Tallybound.Cli.Screen;

/// <summary>Bytes, files, rate and time left of a run under way.</summary>
internal sealed class ProgressFigures(RunProgress progress)
{
    /// <summary>Share of the old rate that a new sample keeps, so that the figure can be read.</summary>
    private const double Inertia = 0.8;

    private long lastBytes = progress.BytesRead;
    private long lastTime = Stopwatch.GetTimestamp();
    private double bytesPerSecond;

    /// <summary>Share of the planned bytes that is read, 0 to 1; 0 where nothing is planned.</summary>
    public double Share => progress.BytesPlanned == 0 ? 0 : Math.Min(1, (double)progress.BytesRead / progress.BytesPlanned);

    /// <summary>Takes the rate since the last call.</summary>
    public void Sample()
    {
        long now = Stopwatch.GetTimestamp();
        long bytes = progress.BytesRead;
        double seconds = Stopwatch.GetElapsedTime(lastTime, now).TotalSeconds;
        if (seconds <= 0) return;
        double rate = (bytes - lastBytes) / seconds;
        bytesPerSecond = bytesPerSecond == 0 ? rate : Inertia * bytesPerSecond + (1 - Inertia) * rate;
        (lastBytes, lastTime) = (bytes, now);
    }

    /// <summary>The line: bytes, files, rate, time left where it can be told, and the source at hand with its name made harmless.</summary>
    /// <param name="columns">Columns there are; what does not fit is left out at the end.</param>
    public string Line(int columns)
    {
        string read = progress.HasStream || progress.BytesPlanned == 0
            ? SizeText.Bytes(progress.BytesRead)
            : $"{SizeText.Bytes(progress.BytesRead)} of {SizeText.Bytes(progress.BytesPlanned)}";
        string left = !progress.HasStream && bytesPerSecond > 0 ? $"  {Duration((progress.BytesPlanned - progress.BytesRead) / bytesPerSecond)} left" : "";
        string line = $"{read}  {SizeText.Count(progress.SourcesDone)}/{SizeText.Count(progress.SourcesPlanned)} files  {SizeText.Bytes((long)bytesPerSecond)}/s{left}  {DisplayText.Escape(progress.CurrentSource)}";
        return line.Length <= columns ? line : line[..(columns - 1)] + "…";
    }

    private static string Duration(double seconds)
    {
        long whole = (long)Math.Ceiling(Math.Clamp(seconds, 0, 86400 * 999.0));
        return whole < 60 ? $"{whole} s"
            : whole < 3600 ? string.Create(CultureInfo.InvariantCulture, $"{whole / 60}:{whole % 60:00} min")
            : string.Create(CultureInfo.InvariantCulture, $"{whole / 3600}:{whole / 60 % 60:00} h");
    }
}
