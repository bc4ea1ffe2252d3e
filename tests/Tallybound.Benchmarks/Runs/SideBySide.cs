using System.Globalization;
using System.Runtime.InteropServices;
using System.Text;

namespace Tallybound.Benchmarks.Runs;

/// <summary>Runs every comparison of whole processes, one after the other in one sitting, and writes what came out to <c>Results/&lt;cpu&gt;/</c>.</summary>
/// <remarks>The two sides of a row alternate, so that a machine that slows down slows both. Rows that miss their ratio stay in the table.</remarks>
internal static class SideBySide
{
    public static async Task<int> RunAsync(string[] arguments)
    {
        int megabytes = Option(arguments, "--mib", 256);
        int repetitions = Option(arguments, "--repeat", 3);
        string root = RepositoryRoot();
        string work = Directory.CreateTempSubdirectory("tallybound-bench-").FullName;
        try
        {
            string program = Publication.Publish(root);
            var inputs = new BenchmarkInputs(work, (long)megabytes << 20);
            var rows = new List<ResultRow>();
            await Console.Out.WriteLineAsync($"inputs of {megabytes} MiB, {repetitions} repetitions a side, program published to {Path.GetFileName(program)}").ConfigureAwait(false);
            foreach (Comparison comparison in Comparisons.All(root, program, work, inputs, repetitions))
            {
                ResultRow row = comparison.Run();
                rows.Add(row);
                await Console.Out.WriteLineAsync(row.ToMarkdown()).ConfigureAwait(false);
            }
            string results = Path.Combine(root, "tests", "Tallybound.Benchmarks", "Results", Machine.FolderName());
            Directory.CreateDirectory(results);
            await File.WriteAllTextAsync(Path.Combine(results, "whole-runs.md"), Document(megabytes, repetitions, rows)).ConfigureAwait(false);
            return 0;
        }
        finally
        {
            Directory.Delete(work, recursive: true);
        }
    }

    private static string Document(int megabytes, int repetitions, List<ResultRow> rows)
    {
        var text = new StringBuilder();
        text.AppendLine("# Whole runs").AppendLine();
        text.AppendLine(CultureInfo.InvariantCulture, $"Made by `dotnet run --project tests/Tallybound.Benchmarks -c Release -- --mib {megabytes} --repeat {repetitions}`.");
        text.AppendLine(CultureInfo.InvariantCulture, $"Machine: {Machine.Processor()}, {Environment.ProcessorCount} processors; {RuntimeInformation.FrameworkDescription}; {Machine.GccVersion()}; {Machine.NumpyVersion()}; commit {Machine.Commit()}.");
        text.AppendLine("Seconds are medians of wall time; the two sides of a row alternate. Ratios carry over to other machines, seconds do not.").AppendLine();
        text.AppendLine(ResultRow.Header);
        foreach (ResultRow row in rows) text.AppendLine(row.ToMarkdown());
        return text.ToString();
    }

    private static int Option(string[] arguments, string name, int otherwise)
    {
        int at = Array.IndexOf(arguments, name);
        return at >= 0 && at + 1 < arguments.Length ? int.Parse(arguments[at + 1], CultureInfo.InvariantCulture) : otherwise;
    }

    private static string RepositoryRoot()
    {
        string? folder = AppContext.BaseDirectory;
        while (folder is not null && !File.Exists(Path.Combine(folder, "Profiler.sln"))) folder = Path.GetDirectoryName(folder);
        return folder ?? throw new InvalidOperationException("Run the benchmarks from inside a checkout: no Profiler.sln above the program.");
    }
}
