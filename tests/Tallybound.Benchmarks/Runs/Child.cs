using System.Diagnostics;
using System.Globalization;

namespace Tallybound.Benchmarks.Runs;

/// <summary>A child process that is timed as a whole.</summary>
internal static class Child
{
    /// <summary>Wall seconds of a command; its output is read and dropped.</summary>
    /// <exception cref="InvalidOperationException">It ended with a code other than 0 or 1 (1: some source failed).</exception>
    public static double Seconds(string program, params string[] arguments) => Run(program, arguments).Seconds;

    /// <summary>Peak resident set in MiB as the kernel counts it, read while the process lives.</summary>
    public static double PeakMebibytes(string program, params string[] arguments) => Run(program, arguments).PeakMebibytes;

    private static (double Seconds, double PeakMebibytes) Run(string program, string[] arguments)
    {
        var start = new ProcessStartInfo(program) { UseShellExecute = false, RedirectStandardOutput = true, RedirectStandardError = true };
        foreach (string argument in arguments) start.ArgumentList.Add(argument);
        long began = Stopwatch.GetTimestamp();
        using Process process = Process.Start(start)!;
        process.OutputDataReceived += (_, _) => { };
        process.BeginOutputReadLine();
        Task<string> errors = process.StandardError.ReadToEndAsync();
        double peak = 0;
        while (!process.WaitForExit(20)) peak = Math.Max(peak, HighWaterMark(process.Id));
        double seconds = Stopwatch.GetElapsedTime(began).TotalSeconds;
        process.WaitForExit();
        if (process.ExitCode is not (0 or 1))
            throw new InvalidOperationException($"{program} {string.Join(' ', arguments)} ended with {process.ExitCode.ToString(CultureInfo.InvariantCulture)}: {errors.Result}");
        return (seconds, peak);
    }

    private static double HighWaterMark(int id)
    {
        try
        {
            foreach (string line in File.ReadLines($"/proc/{id.ToString(CultureInfo.InvariantCulture)}/status"))
                if (line.StartsWith("VmHWM:", StringComparison.Ordinal)) return long.Parse(line.AsSpan(6).Trim().TrimEnd("kB").Trim(), CultureInfo.InvariantCulture) / 1024.0;
        }
        catch (IOException)
        {
            // The process ended between two looks.
        }
        return 0;
    }
}
