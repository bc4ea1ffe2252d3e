using System.Diagnostics;

namespace Tallybound.Tests.Repository;

/// <summary>The checkout that these tests were built from.</summary>
internal static class Checkout
{
    public static string Root { get; } = Find();

    public static string PathOf(params string[] parts) => Path.Combine([Root, .. parts]);

    /// <summary>Files of the project: what version control has, or would take.</summary>
    public static IReadOnlyList<string> Files()
    {
        var start = new ProcessStartInfo("git", ["-C", Root, "ls-files", "-z", "--cached", "--others", "--exclude-standard"]) { UseShellExecute = false, RedirectStandardOutput = true };
        using Process process = Process.Start(start)!;
        string output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        return [.. output.Split('\0', StringSplitOptions.RemoveEmptyEntries).Where(file => File.Exists(PathOf(file)))];
    }

    private static string Find()
    {
        string? folder = AppContext.BaseDirectory;
        while (folder is not null && !File.Exists(Path.Combine(folder, "Profiler.sln"))) folder = Path.GetDirectoryName(folder);
        return folder ?? throw new InvalidOperationException("These tests run inside a checkout.");
    }
}
