using System.Diagnostics;

namespace Tallybound.Benchmarks.Runs;

/// <summary>Publishes the program as users get it, so that start-up is that of precompiled code.</summary>
internal static class Publication
{
    /// <summary>Path of the published program.</summary>
    public static string Publish(string root)
    {
        string output = Path.Combine(root, ".artifacts", "benchmark-program");
        var start = new ProcessStartInfo("dotnet") { UseShellExecute = false, RedirectStandardOutput = true };
        foreach (string argument in (string[])["publish", Path.Combine(root, "src", "Tallybound.Cli"), "-c", "Release", "-r", "linux-x64", "--self-contained", "false", "-o", output, "-v", "quiet"])
            start.ArgumentList.Add(argument);
        using Process process = Process.Start(start)!;
        string log = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        if (process.ExitCode != 0) throw new InvalidOperationException("The program could not be published:\n" + log);
        return Path.Combine(output, "tallybound");
    }
}
