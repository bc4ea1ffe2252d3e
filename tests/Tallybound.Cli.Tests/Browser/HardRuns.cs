using System.IO.Compression;

[assembly: AssemblyFixture(typeof(Tallybound.Cli.Tests.Browser.HardRuns))]

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Runs whose pages are hard to write, each profiled once by the built program, when a test first asks for it.</summary>
public sealed class HardRuns : IDisposable
{
    /// <summary>Sources of the run that holds many.</summary>
    internal const int Many = 10_000;

    private static readonly Dictionary<string, Func<FreshFolder, ReportRun>> Makers = new(StringComparer.Ordinal)
    {
        ["the demo corpus"] = Demo,
        ["hostile names"] = HostileNames,
        ["ten thousand sources"] = TenThousand,
        ["one source"] = folder => Profiled(folder, 0, folder.Write("door.log", TestData.Log(2000, seed: 1))),
        ["nothing but failures"] = Failures,
        ["an empty folder"] = folder => Profiled(folder, 0, Directory.CreateDirectory(folder.At("depot")).FullName),
        ["an empty file"] = folder => Profiled(folder, 0, folder.Write("empty.log", [])),
        ["a stream"] = Stream,
    };

    private readonly Dictionary<string, ReportRun> made = new(StringComparer.Ordinal);
    private readonly List<FreshFolder> folders = [];

    /// <summary>The names of all runs.</summary>
    internal static TheoryData<string> Names => [.. Makers.Keys];

    /// <summary>The run of a name.</summary>
    internal ReportRun Of(string name)
    {
        if (made.TryGetValue(name, out ReportRun? run)) return run;
        var folder = new FreshFolder();
        folders.Add(folder);
        return made[name] = Makers[name](folder);
    }

    public void Dispose()
    {
        foreach (ReportRun run in made.Values) run.Dispose();
        foreach (FreshFolder folder in folders) folder.Dispose();
    }

    private static ReportRun Demo(FreshFolder folder)
    {
        string corpus = Path.Combine(BuiltProgram.RepositoryRoot, "corpora-demo");
        foreach (string file in Directory.EnumerateFiles(corpus, "*", SearchOption.AllDirectories))
            folder.Write(Path.Combine("corpora-demo", Path.GetRelativePath(corpus, file)), File.ReadAllBytes(file));
        return Profiled(folder, 0, "corpora-demo");
    }

    private static ReportRun HostileNames(FreshFolder folder)
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux, where a file may have almost any name");
        int seed = 0;
        foreach (string name in Browser.HostileNames.Utf8) folder.Write(Path.Combine("depot", name), TestData.Log(30 + seed, seed: seed++));
        Outcome bytes = BuiltProgram.Shell(folder, $"for name in {Browser.HostileNames.ShellBytes}; do printf 'unit 1 door open\\n' > depot/\"$name\"; done");
        Assert.Equal(0, bytes.ExitCode);
        ReportRun run = Profiled(folder, 0, "depot");
        // .NET cannot say the names that are not UTF-8, so that the folder would stay behind.
        Assert.Equal(0, BuiltProgram.Shell(folder, "rm -r depot").ExitCode);
        return run;
    }

    private static ReportRun TenThousand(FreshFolder folder)
    {
        var random = new Random(1);
        byte[] text = TestData.Log(2000, seed: 1);
        for (int i = 0; i < Many; i++)
        {
            int length = i % 10 == 0 ? random.Next(41, 2049) : random.Next(3, 41);
            folder.Write($"depot/{i / 500:00}/unit-{i:00000}.log", text.AsSpan(random.Next(text.Length - length), length).ToArray());
        }
        return Profiled(folder, 0, "depot");
    }

    private static ReportRun Failures(FreshFolder folder)
    {
        for (int i = 0; i < 5; i++)
        {
            using var packed = new MemoryStream();
            using (var gzip = new GZipStream(packed, CompressionLevel.Optimal)) gzip.Write(TestData.Log(500, seed: i));
            byte[] bytes = packed.ToArray();
            // The header stays; the first block becomes one of a type that does not exist.
            bytes.AsSpan(10).Fill(0xFF);
            folder.Write($"depot/door-{i}.log.gz", bytes);
        }
        return Profiled(folder, 1, "depot", "--inside");
    }

    private static ReportRun Stream(FreshFolder folder)
    {
        Assert.Equal(0, BuiltProgram.Run(folder, ["profile", "-", "--out", "run"], TestData.Log(5000, seed: 2)).ExitCode);
        return new ReportRun(folder.At("run"));
    }

    private static ReportRun Profiled(FreshFolder folder, int exitCode, params string[] arguments)
    {
        Outcome outcome = BuiltProgram.Run(folder, ["profile", .. arguments, "--out", "run", "--quiet"], input: null);
        Assert.True(exitCode == outcome.ExitCode, $"Exit code {outcome.ExitCode}: {outcome.Error}");
        return new ReportRun(folder.At("run"));
    }
}
