using System.Text;
using Tallybound.Cli.Tests.Browser;

namespace Tallybound.Cli.Tests;

/// <summary>The committed sample report is what the program makes of the demo corpus today, provenance apart.</summary>
public sealed class SampleReportTests(HardRuns runs) : IDisposable
{
    private const string HowToMend = "make the sample anew with the command that DEVELOPERS.md gives";

    private static readonly string Sample = Path.Combine(BuiltProgram.RepositoryRoot, "reports", "sample");

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    [Fact]
    public void The_sample_s_record_is_that_of_the_demo_corpus()
    {
        string now = WithRunOf(Document(runs.Of("the demo corpus").Folder), Document(Sample));
        Assert.True(now == Document(Sample), $"the record of the demo corpus is another one; {HowToMend}");
    }

    [Fact]
    public void The_sample_s_pages_and_pictures_are_drawn_from_its_record()
    {
        folder.Write("sample/profile.json", File.ReadAllBytes(Path.Combine(Sample, "profile.json")));
        Assert.Equal(0, BuiltProgram.Run(folder, "render", "sample").ExitCode);
        string[] drawn = [.. Names(folder.At("sample")).Where(name => name != "profile.json")];
        string[] kept = [.. Names(Sample).Where(name => name is not ("profile.json" or "profile.schema.json" or "sources.csv" or "ledger.sqlite" or "run.log"))];
        Assert.Equal(kept, drawn);
        Assert.True(drawn.Length > 90);
        foreach (string name in drawn)
            Assert.True(File.ReadAllBytes(Path.Combine(Sample, name)).AsSpan().SequenceEqual(File.ReadAllBytes(Path.Combine(folder.At("sample"), name))), $"{name} is drawn differently now; {HowToMend}");
    }

    [Fact]
    public void The_sample_s_list_of_sources_and_schema_are_today_s()
    {
        string run = runs.Of("the demo corpus").Folder;
        foreach (string name in (string[])["sources.csv", "profile.schema.json"])
            Assert.True(File.ReadAllBytes(Path.Combine(Sample, name)).AsSpan().SequenceEqual(File.ReadAllBytes(Path.Combine(run, name))), $"{name} is another one; {HowToMend}");
    }

    private static string Document(string run) => File.ReadAllText(Path.Combine(run, "profile.json"), Encoding.UTF8);

    /// <summary>A document with the provenance of another.</summary>
    private static string WithRunOf(string document, string other) => document.Replace(RunOf(document), RunOf(other), StringComparison.Ordinal);

    private static string RunOf(string document)
    {
        int from = document.IndexOf("\"run\":", StringComparison.Ordinal), to = document.IndexOf("\"corpus\":", StringComparison.Ordinal);
        Assert.InRange(from, 1, to);
        return document[from..to];
    }

    private static IEnumerable<string> Names(string root) => Directory.EnumerateFiles(root, "*", SearchOption.AllDirectories).Select(path => Path.GetRelativePath(root, path)).Order(StringComparer.Ordinal);
}
