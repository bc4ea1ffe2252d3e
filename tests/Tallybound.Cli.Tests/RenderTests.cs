using System.Text.Json.Nodes;

namespace Tallybound.Cli.Tests;

public sealed class RenderTests : IDisposable
{
    /// <summary>What a run keeps for itself, or writes from what only it knows.</summary>
    private static readonly string[] NotDrawn = ["ledger.sqlite", "run.log", "profile.json", "profile.schema.json", "sources.csv"];

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    private void Profile(string name = "run", int sources = 14)
    {
        for (int i = 0; i < sources; i++) folder.Write($"depot/größe {i:00} <b>", TestData.Skewed((i + 1) * 911, seed: i));
        folder.Write("depot/empty", []);
        File.CreateSymbolicLink(folder.At("depot", "link"), "empty");
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "depot", "--out", name).ExitCode);
    }

    private Dictionary<string, byte[]> Files(string run) => Directory.EnumerateFiles(folder.At(run), "*", SearchOption.AllDirectories)
        .ToDictionary(file => Path.GetRelativePath(folder.At(run), file), File.ReadAllBytes, StringComparer.Ordinal);

    private static void AssertSame(Dictionary<string, byte[]> expected, Dictionary<string, byte[]> found)
    {
        Assert.Equal(expected.Keys.Order(StringComparer.Ordinal), found.Keys.Order(StringComparer.Ordinal));
        foreach ((string name, byte[] bytes) in expected) Assert.True(bytes.AsSpan().SequenceEqual(found[name]), $"{name} differs.");
    }

    [Fact]
    public void A_report_drawn_again_is_the_same_byte_for_byte()
    {
        Profile();
        Dictionary<string, byte[]> before = Files("run");
        foreach (string file in before.Keys.Except(NotDrawn)) File.Delete(folder.At("run", file));
        Outcome outcome = BuiltProgram.Run(folder, "render", "run");
        Assert.Equal((0, "", "Report: run/index.html\n"), (outcome.ExitCode, outcome.Error, outcome.Output));
        AssertSame(before, Files("run"));
        Assert.Contains("index.html", before.Keys);
    }

    [Fact]
    public void The_record_alone_is_enough_and_may_be_named_itself()
    {
        Profile();
        Dictionary<string, byte[]> whole = Files("run");
        foreach (string run in (string[])["alone", "other.partial"])
        {
            folder.Write($"{run}/profile.json", whole["profile.json"]);
            Outcome outcome = BuiltProgram.Run(folder, "render", run == "alone" ? "alone/profile.json" : "other.partial/");
            Assert.Equal((0, $"Report: {run}/index.html\n"), (outcome.ExitCode, outcome.Output));
            AssertSame(whole.Where(file => !NotDrawn.Contains(file.Key) || file.Key == "profile.json").ToDictionary(), Files(run));
        }
    }

    [Fact]
    public void Every_picture_is_drawn_where_all_are_asked_for_and_a_quiet_drawing_says_nothing()
    {
        Profile();
        Dictionary<string, byte[]> usual = Files("run");
        Outcome outcome = BuiltProgram.Run(folder, "render", "run", "--pictures", "all", "--quiet");
        Assert.Equal((0, "", ""), (outcome.ExitCode, outcome.Output, outcome.Error));
        Dictionary<string, byte[]> all = Files("run");
        Assert.Empty(usual.Keys.Except(all.Keys));
        // Fourteen sources have a page, ten of them pictures beside it as a rule.
        string[] more = [.. all.Keys.Except(usual.Keys)];
        Assert.NotEmpty(more);
        Assert.All(more, file => Assert.Matches("^charts/00(11|12|13|14)-.*[.]png$", file));
    }

    [Fact]
    public void Nothing_but_a_failure_and_nothing_at_all_are_drawn_too()
    {
        Directory.CreateDirectory(folder.At("nothing"));
        Directory.CreateDirectory(folder.At("links"));
        File.CreateSymbolicLink(folder.At("links", "nowhere"), "none");
        foreach (string input in (string[])["nothing", "links"])
        {
            BuiltProgram.Run(folder, "profile", input, "--out", $"{input}-run");
            Dictionary<string, byte[]> before = Files($"{input}-run");
            Assert.Equal(0, BuiltProgram.Run(folder, "render", $"{input}-run").ExitCode);
            AssertSame(before, Files($"{input}-run"));
        }
    }

    [Fact]
    public void A_record_that_is_damaged_or_of_another_schema_is_refused_in_one_line_and_the_report_stays()
    {
        Profile(sources: 2);
        string record = folder.At("run", "profile.json");
        string text = File.ReadAllText(record);
        (string Text, string Says)[] cases =
        [
            (text[..(text.Length / 2)], "run/profile.json is cut off in source"),
            (text.Replace("tallybound/profile/1", "tallybound/profile/9", StringComparison.Ordinal), "is of schema 'tallybound/profile/9', and this program reads tallybound/profile/1"),
            (text.Replace("\"corpus\":", "\"corpse\":", StringComparison.Ordinal), "holds no corpus"),
            (text.Replace("\"symbols\":", "\"symbols\":x", StringComparison.Ordinal), "is not JSON"),
            ("", "is cut off in the document: it ends near byte 0"),
            ("[]", "is no profile.json"),
        ];
        Dictionary<string, byte[]> before = Files("run");
        foreach ((string changed, string says) in cases)
        {
            File.WriteAllText(record, changed);
            Outcome outcome = BuiltProgram.Run(folder, "render", "run");
            Assert.Equal((2, ""), (outcome.ExitCode, outcome.Output));
            Assert.Contains(says, Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
            Assert.Equal(before["index.html"], File.ReadAllBytes(folder.At("run", "index.html")));
        }
        Assert.Equal(6, cases.Length);
    }

    [Fact]
    public void A_folder_without_a_record_is_refused_by_what_to_type_instead()
    {
        folder.Write("plain/x.txt", "door"u8.ToArray());
        Directory.CreateDirectory(folder.At("depot.partial"));
        string[] before = folder.Everything();
        (string Run, string Says)[] cases = [("plain", "there is no profile.json in it"), ("plain/x.txt", "by the profile.json in it"), ("depot/", "did you mean depot.partial?"), ("none", "there is no such run folder")];
        foreach ((string run, string says) in cases)
        {
            Outcome outcome = BuiltProgram.Run(folder, "render", run);
            Assert.Equal((2, ""), (outcome.ExitCode, outcome.Output));
            Assert.Contains(says, Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
        }
        Assert.Equal(before, folder.Everything());
        Assert.Equal(4, cases.Length);
    }

    [Fact]
    public void A_report_that_cannot_be_written_ends_with_3_and_says_what_to_do()
    {
        Profile(sources: 1);
        // A folder where the page is to be moved to: nobody can write there, root included.
        File.Delete(folder.At("run", "index.html"));
        folder.Write("run/index.html/in-the-way", []);
        Outcome outcome = BuiltProgram.Run(folder, "render", "run");
        Assert.Equal((3, ""), (outcome.ExitCode, outcome.Output));
        string line = Assert.Single(outcome.ErrorLines);
        Assert.Contains("the report could not be kept", line, StringComparison.Ordinal);
        Assert.Contains("type the command again", line, StringComparison.Ordinal);
    }

    [Fact]
    public void A_run_of_an_older_version_keeps_its_name_on_the_page()
    {
        Profile(sources: 1);
        string record = folder.At("run", "profile.json");
        JsonObject root = JsonNode.Parse(File.ReadAllText(record))!.AsObject();
        root["tool"]!["version"] = "0.0.7";
        File.WriteAllText(record, root.ToJsonString());
        Assert.Equal(0, BuiltProgram.Run(folder, "render", "run").ExitCode);
        Assert.Contains("tallybound 0.0.7", File.ReadAllText(folder.At("run", "index.html")), StringComparison.Ordinal);
    }
}
