using System.Diagnostics;

namespace Tallybound.Benchmarks.Runs;

/// <summary>What a table of results says of the machine.</summary>
internal static class Machine
{
    public static string Processor() =>
        File.Exists("/proc/cpuinfo") && File.ReadLines("/proc/cpuinfo").FirstOrDefault(line => line.StartsWith("model name", StringComparison.Ordinal)) is { } line
            ? line[(line.IndexOf(':', StringComparison.Ordinal) + 1)..].Trim()
            : "unknown processor";

    /// <summary>The processor's name as a folder name.</summary>
    public static string FolderName() => string.Join('-', Processor().ToLowerInvariant().Split([' ', '(', ')', '@', '/'], StringSplitOptions.RemoveEmptyEntries));

    public static string GccVersion() => FirstLine("gcc", "--version");

    public static string NumpyVersion() => "numpy " + FirstLine("/usr/bin/python3", "-c", "import numpy; print(numpy.__version__)");

    /// <summary>Processes that wanted a processor in the last minute.</summary>
    public static double Load() => File.Exists("/proc/loadavg") ? double.Parse(File.ReadAllText("/proc/loadavg").Split(' ')[0], System.Globalization.CultureInfo.InvariantCulture) : 0;

    public static string Commit() => FirstLine("git", "rev-parse", "--short", "HEAD");

    private static string FirstLine(string program, params string[] arguments)
    {
        try
        {
            var start = new ProcessStartInfo(program) { UseShellExecute = false, RedirectStandardOutput = true };
            foreach (string argument in arguments) start.ArgumentList.Add(argument);
            using Process process = Process.Start(start)!;
            string output = process.StandardOutput.ReadToEnd();
            process.WaitForExit();
            return output.Split('\n')[0].Trim();
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return $"no {program}";
        }
    }
}
