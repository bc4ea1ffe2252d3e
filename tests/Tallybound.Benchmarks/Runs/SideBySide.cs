using System.Globalization;
using System.Runtime.InteropServices;
using System.Text;
using Tallybound.Benchmarks.Kernels;

namespace Tallybound.Benchmarks.Runs;

/// <summary>Runs every comparison of whole processes, one after the other in one sitting, and writes what came out to <c>Results/&lt;cpu&gt;/</c>. Options: --kernels, --whole (both without either), --mib N, --repeat N.</summary>
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
            var inputs = new BenchmarkInputs(work, (long)megabytes << 20);
            bool kernels = Array.IndexOf(arguments, "--kernels") >= 0, whole = Array.IndexOf(arguments, "--whole") >= 0;
            string options = string.Create(CultureInfo.InvariantCulture, $"--mib {megabytes} --repeat {repetitions}");
            if (kernels || !whole)
            {
                using var native = new NativeCounting(Path.Combine(root, "tests", "Tallybound.Benchmarks", "Native", "counting.c"), work);
                await MeasureAsync(root, "Kernels", "kernels.md", "--kernels " + options, new KernelComparisons(native, inputs, repetitions).All()).ConfigureAwait(false);
            }
            if (whole || !kernels)
                await MeasureAsync(root, "Whole runs", "whole-runs.md", "--whole " + options, Comparisons.All(root, Publication.Publish(root), work, inputs, repetitions)).ConfigureAwait(false);
            return 0;
        }
        finally
        {
            Directory.Delete(work, recursive: true);
        }
    }

    private static async Task MeasureAsync(string root, string title, string file, string options, IEnumerable<Comparison> comparisons)
    {
        var rows = new List<ResultRow>();
        double load = Machine.Load();
        foreach (Comparison comparison in comparisons)
        {
            ResultRow row = comparison.Run();
            rows.Add(row);
            await Console.Out.WriteLineAsync(row.ToMarkdown()).ConfigureAwait(false);
        }
        string results = Path.Combine(root, "tests", "Tallybound.Benchmarks", "Results", Machine.FolderName());
        Directory.CreateDirectory(results);
        await File.WriteAllTextAsync(Path.Combine(results, file), Document(title, options, load, rows)).ConfigureAwait(false);
    }

    private static string Document(string title, string options, double load, List<ResultRow> rows)
    {
        var text = new StringBuilder();
        text.AppendLine(CultureInfo.InvariantCulture, $"# {title}").AppendLine();
        text.AppendLine(CultureInfo.InvariantCulture, $"Made by `dotnet run --project tests/Tallybound.Benchmarks -c Release -- {options}`.");
        text.AppendLine(CultureInfo.InvariantCulture, $"Machine: {Machine.Processor()}, {Environment.ProcessorCount} processors, load {load:0.0} at the start; {RuntimeInformation.FrameworkDescription}; {Machine.GccVersion()}; {Machine.NumpyVersion()}; commit {Machine.Commit()}.");
        text.AppendLine("Figures are medians; the two sides of a row alternate. Ratios carry over to other machines, figures do not.").AppendLine();
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
