using System.Diagnostics;
using Xunit;

namespace Tallybound.Tests;

/// <summary>
/// What some tests need from the machine beside the SDK. Missing, it skips the test on a developer's machine and fails it
/// where <c>CI=true</c>, so that a check is never lost in silence.
/// </summary>
internal static class Prerequisites
{
    /// <summary>True where a missing prerequisite must fail.</summary>
    public static bool Strict => string.Equals(Environment.GetEnvironmentVariable("CI"), "true", StringComparison.OrdinalIgnoreCase);

    /// <summary>Skips or fails unless <paramref name="present"/>; the text says what to install.</summary>
    public static void Require(bool present, string howToGetIt)
    {
        if (present) return;
        if (Strict) Assert.Fail("Missing prerequisite: " + howToGetIt);
        Assert.Skip("Missing prerequisite: " + howToGetIt);
    }

    /// <summary>A file that a Debian package brings.</summary>
    public static string RequireFile(string path, string package)
    {
        Require(File.Exists(path), $"{path} (Debian package {package})");
        return path;
    }

    /// <summary>The machine's own Python with numpy (Debian's python3-numpy), whatever else stands on PATH.</summary>
    public static string RequirePythonWithNumpy()
    {
        const string python = "/usr/bin/python3";
        Require(File.Exists(python) && Runs(python, "-c", "import numpy"), "Debian package python3-numpy");
        return python;
    }

    /// <summary>A C compiler (Debian package gcc).</summary>
    public static string RequireGcc()
    {
        Require(File.Exists("/usr/bin/gcc"), "Debian package gcc");
        return "/usr/bin/gcc";
    }

    private static bool Runs(string program, params string[] arguments)
    {
        try
        {
            var start = new ProcessStartInfo(program) { UseShellExecute = false, RedirectStandardError = true, RedirectStandardOutput = true };
            foreach (string argument in arguments) start.ArgumentList.Add(argument);
            using Process process = Process.Start(start)!;
            process.StandardOutput.ReadToEnd();
            process.StandardError.ReadToEnd();
            process.WaitForExit();
            return process.ExitCode == 0;
        }
        catch (System.ComponentModel.Win32Exception)
        {
            return false;
        }
    }
}
