using System.Globalization;
using System.Text;
using System.Text.Json;
using Tallybound.Profiling.Run;
using Tallybound.Sources;

namespace Tallybound.Cli.Logging;

/// <summary>One event as one line: for people, or a JSON object for machines.</summary>
internal static class LogLine
{
    private const string TimeFormat = "yyyy-MM-dd'T'HH:mm:ss.fff'Z'";

    /// <summary>Time, level, event, source and words, with what a terminal would obey made visible.</summary>
    public static string Text(RunEvent runEvent, DateTime utc)
    {
        string about = runEvent.Source is null ? "" : runEvent.Source + ": ";
        return DisplayText.Escape($"{Time(utc)} {Level(runEvent.Level)} {runEvent.Name} {about}{runEvent.Text}");
    }

    /// <summary>The object <c>{"time","level","event","source","text"}</c>; <c>source</c> is absent when the event is about the run.</summary>
    public static string Json(RunEvent runEvent, DateTime utc)
    {
        using var buffer = new MemoryStream();
        using (var writer = new Utf8JsonWriter(buffer))
        {
            writer.WriteStartObject();
            writer.WriteString("time", Time(utc));
            writer.WriteString("level", Level(runEvent.Level));
            writer.WriteString("event", runEvent.Name);
            if (runEvent.Source is not null) writer.WriteString("source", runEvent.Source);
            writer.WriteString("text", runEvent.Text);
            writer.WriteEndObject();
        }
        return Encoding.UTF8.GetString(buffer.ToArray());
    }

    private static string Time(DateTime utc) => utc.ToString(TimeFormat, CultureInfo.InvariantCulture);

    private static string Level(RunEventLevel level) => level switch
    {
        RunEventLevel.Information => "information",
        RunEventLevel.Warning => "warning",
        _ => "error",
    };
}
