using System.Text.Json;
using System.Text.Json.Nodes;
using Json.Schema;

namespace Tallybound.Cli.Tests;

public sealed class RunFolderTests
{
    private static readonly string[] WholeFolder =
        ["index.html", "ledger.sqlite", "profile.json", "profile.schema.json", "run.log", "sources.csv"];

    [Fact]
    public void A_run_leaves_the_files_of_the_contract_and_says_where()
    {
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(500, seed: 1));
        folder.Write("depot/b/skewed.bin", TestData.Skewed(70_000, seed: 2));
        folder.Write("depot/empty", []);
        folder.Write("depot/one", [7]);
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot");
        Assert.Equal(0, outcome.ExitCode);
        string run = folder.At("reports", "depot");
        Assert.Equal(WholeFolder, FilesOf(run).Where(name => !Directory.Exists(Path.Combine(run, name))));
        Assert.Equal(["0001-b-skewed-bin.html", "0002-a-log.html", "0003-one.html", "0004-empty.html"], FilesOf(Path.Combine(run, "sources")));
        string[] charts = FilesOf(Path.Combine(run, "charts"));
        Assert.Contains("corpus-sizes.png", charts);
        Assert.Contains("0001-b-skewed-bin-rates.png", charts);
        Assert.Contains("Report: reports/depot/index.html", outcome.Output, StringComparison.Ordinal);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "depot"));
        Assert.True(record.Complete);
        Assert.Equal(["a.log", "b/skewed.bin", "empty", "one"], record.Names);
        Assert.Equal("tallybound/profile/1", (string)record.Root["schema"]!);
    }

    [Fact]
    public void The_summary_fits_a_screen_and_names_both_sizes()
    {
        using var folder = new FreshFolder();
        for (int i = 0; i < 40; i++) folder.Write($"depot/a-folder-with-a-name-of-some-length/another-one-with-an-even-longer-name/unit-{i:000}.log", TestData.Log(200 + i, seed: i));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot", "--length-limit", "9,10,11,12,13,14,15", "--block-length", "3");
        Assert.Equal(0, outcome.ExitCode);
        Assert.InRange(outcome.OutputLines.Length, 12, 24);
        Assert.All(outcome.OutputLines, line => Assert.InRange(line.Length, 0, 80));
        var verdict = RunRecordFile.In(folder.At("reports", "depot")).Corpus["verdict"]!;
        string words = string.Join(' ', outcome.Output.Split((char[])[' ', '\n'], StringSplitOptions.RemoveEmptyEntries));
        Assert.Contains((string)verdict["sentence"]!, words, StringComparison.Ordinal);
        Assert.Contains(((long)verdict["codedBytes"]!).ToString("N0", System.Globalization.CultureInfo.InvariantCulture), words, StringComparison.Ordinal);
        Assert.Contains(((long)verdict["rawBytes"]!).ToString("N0", System.Globalization.CultureInfo.InvariantCulture), words, StringComparison.Ordinal);
    }

    [Fact]
    public void A_second_run_of_the_same_name_is_numbered()
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(20, seed: 1));
        for (int run = 1; run <= 3; run++) Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.log").ExitCode);
        Assert.Equal(["a.log", "a.log-2", "a.log-3"], NamesIn(folder.At("reports")));
        Directory.Move(folder.At("reports", "a.log-2"), folder.At("reports", "a.log-2.partial"));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.log").ExitCode);
        Assert.Equal(["a.log", "a.log-2.partial", "a.log-3", "a.log-4"], NamesIn(folder.At("reports")));
    }

    [Theory]
    [InlineData("taken")]
    [InlineData("taken.partial")]
    public void A_named_folder_that_is_taken_is_a_mistake_of_the_command_line(string present)
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(20, seed: 1));
        Directory.CreateDirectory(folder.At(present));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "a.log", "--out", "taken");
        Assert.Equal(2, outcome.ExitCode);
        string line = Assert.Single(outcome.ErrorLines);
        Assert.Contains($"{present} exists already; name another folder", line, StringComparison.Ordinal);
        Assert.Equal(["a.log", present], folder.Everything());
    }

    [Fact]
    public void A_folder_that_cannot_be_made_is_answered_by_3_and_one_line()
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(20, seed: 1));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "a.log", "--out", "a.log/below-a-file");
        Assert.Equal(3, outcome.ExitCode);
        Assert.Contains("name another folder with --out", Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
        Assert.Equal(["a.log"], folder.Everything());
    }

    [Fact]
    public void The_record_satisfies_the_schema_beside_it()
    {
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(3000, seed: 1));
        folder.Write("depot/even.bin", TestData.Even(200_000, seed: 2));
        folder.Write("depot/skewed.bin", TestData.Skewed(150_001, seed: 3));
        folder.Write("depot/constant.bin", new byte[20_000]);
        folder.Write("depot/empty", []);
        folder.Write("depot/one", [7]);
        folder.Write("depot/two", [7, 8]);
        string[][] commands =
        [
            ["profile", "depot"],
            ["profile", "depot", "--view", "bytes,nibbles,bits,words-le,words-be", "--radix", "3,4,16", "--length-limit", "4,8,20"],
            ["profile", "depot", "--order", "0", "--block-length", "1", "--no-digest", "--segment", "4KiB"],
            ["profile", "-"],
        ];
        for (int run = 0; run < commands.Length; run++)
        {
            string name = $"run-{run}";
            Outcome outcome = BuiltProgram.Run(folder, [.. commands[run], "--out", name], TestData.Skewed(9000, seed: 4));
            Assert.Equal(0, outcome.ExitCode);
            AssertSatisfiesSchema(folder.At(name));
        }
        Assert.Equal(4, commands.Length);
    }

    [Fact]
    public void A_record_that_says_a_wrong_thing_does_not_satisfy_the_schema()
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(100, seed: 1));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.log").ExitCode);
        JsonSchema schema = SchemaOf(folder.At("reports", "a.log"));
        (string Path, Action<JsonObject> Break)[] breaks =
        [
            ("schema", root => root["schema"] = "something else"),
            ("corpus", root => root.Remove("corpus")),
            ("bytes", root => root["corpus"]!["bytes"] = "many"),
            ("status", root => root["sources"]![0]!["status"] = "done"),
            ("code", root => root["sources"]![0]!["views"]![0]!["codes"]![0]!["code"] = "telepathy"),
            ("entropy", root => root["sources"]![0]!["views"]![0]!["orders"]![0]!["entropyBitsPerSymbol"] = null),
        ];
        foreach ((string path, Action<JsonObject> breakIt) in breaks)
        {
            JsonObject root = RunRecordFile.In(folder.At("reports", "a.log")).Root;
            breakIt(root);
            Assert.False(schema.Evaluate(Element(root)).IsValid, $"A record with a broken {path} passed.");
        }
        Assert.Equal(6, breaks.Length);
    }

    private static void AssertSatisfiesSchema(string folder)
    {
        EvaluationResults results = SchemaOf(folder).Evaluate(Element(RunRecordFile.In(folder).Root), new EvaluationOptions { OutputFormat = OutputFormat.List });
        IEnumerable<string> errors = (results.Details ?? []).Where(detail => detail.Errors is not null)
            .Select(detail => $"{detail.InstanceLocation}: {string.Join("; ", detail.Errors!.Values)}");
        Assert.True(results.IsValid, string.Join('\n', errors.Take(20)));
    }

    private static JsonSchema SchemaOf(string folder) =>
        JsonSchema.FromText(File.ReadAllText(Path.Combine(folder, "profile.schema.json")), new BuildOptions { SchemaRegistry = new SchemaRegistry() });

    private static JsonElement Element(JsonNode node) => JsonSerializer.SerializeToElement(node);

    private static string[] FilesOf(string folder) => [.. Directory.EnumerateFileSystemEntries(folder).Select(Path.GetFileName).Order(StringComparer.Ordinal)!];

    private static string[] NamesIn(string folder) => [.. Directory.EnumerateDirectories(folder).Select(Path.GetFileName).Order(StringComparer.Ordinal)!];
}
