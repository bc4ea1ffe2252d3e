namespace Tallybound.Benchmarks.Runs;

/// <summary>The rows of the table of whole runs, each with the ratio it is to reach.</summary>
internal static class Comparisons
{
    public static IEnumerable<Comparison> All(string root, string program, string work, BenchmarkInputs inputs, int repetitions)
    {
        string script = Path.Combine(root, "tests", "Tallybound.Benchmarks", "Reference", "profile.py");
        var ours = new ProgramRun(program, work);
        foreach ((string name, string path, double reach) in new[] { ("text", inputs.Text(), 20.0), ("executables", inputs.Executables(), 10.0), ("random", inputs.Random(), 5.0) })
        {
            yield return new Comparison($"default profile, {name}, 1 thread", "numpy script", repetitions, () => ours.Seconds(path, "--threads", "1"),
                () => Child.Seconds("/usr/bin/python3", script, path), "s", (our, their) => their!.Value / our, $"≥ {reach:0}", ratio => ratio >= reach);
        }
        foreach ((string name, string path) in new[] { ("text", inputs.Text()), ("executables", inputs.Executables()), ("random", inputs.Random()) })
        {
            yield return new Comparison($"default profile, one file of {name}, 2 threads", "1 thread", repetitions, () => ours.Seconds(path, "--threads", "2"),
                () => ours.Seconds(path, "--threads", "1"), "s", (our, their) => their!.Value / our, "≥ 1.8", ratio => ratio >= 1.8);
        }
        string one = inputs.Random(1L << 30, "random-1"), four = inputs.Random(4L << 30, "random-4");
        yield return new Comparison("4 GiB of random bytes, 1 thread", "1 GiB", 1, () => ours.Seconds(four, "--threads", "1"), () => ours.Seconds(one, "--threads", "1"),
            "s", (our, their) => our / their!.Value, "≤ 4.2", ratio => ratio <= 4.2);
        yield return new Comparison("peak memory, 4 GiB, 1 thread", "limit", 1, () => ours.PeakMebibytes(four, "--threads", "1"), null, "MiB", (our, _) => our, "≤ 600", ratio => ratio <= 600);
        yield return new Comparison("peak memory, 4 GiB, 2 threads", "limit", 1, () => ours.PeakMebibytes(four, "--threads", "2"), null, "MiB", (our, _) => our, "≤ 900", ratio => ratio <= 900);
        string small = inputs.SmallFiles(100_000, 2048);
        yield return new Comparison("100,000 files of 2 KiB, 2 threads", "cat of them", repetitions, () => ours.Seconds(small, "--threads", "2"),
            () => Child.Seconds("/bin/sh", "-c", $"find '{small}' -type f -print0 | xargs -0 cat > /dev/null"), "s", (our, their) => our / their!.Value, "≤ 20", ratio => ratio <= 20);
        string tiny = Path.Combine(work, "one-byte");
        File.WriteAllBytes(tiny, [65]);
        yield return new Comparison("start-up: a file of one byte, report written", "limit", Math.Max(5, repetitions), () => ours.Seconds(tiny), null, "s", (our, _) => our, "≤ 0.5", ratio => ratio <= 0.5);
    }
}

/// <summary>Runs the program into a fresh folder each time and removes it.</summary>
internal sealed class ProgramRun(string program, string work)
{
    private int number;

    public double Seconds(string input, params string[] options) => Into(output => Child.Seconds(program, ["profile", input, "--out", output, "--quiet", .. options]));

    public double PeakMebibytes(string input, params string[] options) => Into(output => Child.PeakMebibytes(program, ["profile", input, "--out", output, "--quiet", .. options]));

    private double Into(Func<string, double> run)
    {
        string output = Path.Combine(work, $"run-{number++}");
        double value = run(output);
        Directory.Delete(output, recursive: true);
        return value;
    }
}
