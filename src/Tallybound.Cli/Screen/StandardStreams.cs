using System.Text;

namespace Tallybound.Cli.Screen;

/// <summary>Standard output and standard error, as UTF-8 whatever the locale says.</summary>
/// <remarks>A reader that has gone away is no error: what it did not want is dropped here, and the exit code stays that of the work.</remarks>
internal static class StandardStreams
{
    private static readonly Lock Gate = new();
    private static Stream? output;
    private static Stream? error;

    /// <summary>Writes results.</summary>
    public static void WriteOutput(string text)
    {
        if (OperatingSystem.IsWindows() && output is null && !Console.IsOutputRedirected) Console.OutputEncoding = Encoding.UTF8;
        Write(ref output, text, Console.OpenStandardOutput);
    }

    /// <summary>Writes one line of the log, or the one line that says what is wrong.</summary>
    public static void WriteErrorLine(string line) => Write(ref error, line + "\n", Console.OpenStandardError);

    private static void Write(ref Stream? stream, string text, Func<Stream> open)
    {
        lock (Gate)
        {
            try
            {
                stream ??= open();
                stream.Write(Encoding.UTF8.GetBytes(text));
                stream.Flush();
            }
            catch (Exception e) when (e is IOException or UnauthorizedAccessException)
            {
                // The pipe is closed, or there never was one: nobody reads on.
            }
        }
    }
}
