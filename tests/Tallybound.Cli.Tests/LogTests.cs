using System.Text.Json;

namespace Tallybound.Cli.Tests;

public sealed class LogTests
{
    [Fact]
    public void Json_lines_are_objects_and_stand_in_the_log_file_alike()
    {
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(100, seed: 1));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot", "--log-format", "json");
        Assert.Equal(0, outcome.ExitCode);
        string[] lines = outcome.ErrorLines;
        foreach (string line in lines)
        {
            using JsonDocument document = JsonDocument.Parse(line);
            JsonElement root = document.RootElement;
            Assert.Equal(JsonValueKind.Object, root.ValueKind);
            Assert.Contains(root.GetProperty("level").GetString(), (string[])["information", "warning", "error"]);
            Assert.NotEmpty(root.GetProperty("event").GetString()!);
            Assert.NotEmpty(root.GetProperty("text").GetString()!);
            Assert.Matches(@"^\d{4}-\d\d-\d\dT\d\d:\d\d:\d\d\.\d{3}Z$", root.GetProperty("time").GetString()!);
        }
        Assert.InRange(lines.Length, 2, 20);
        Assert.Equal(lines, File.ReadAllLines(folder.At("reports", "depot", "run.log")));
    }

    [Fact]
    public void Text_lines_stand_in_the_log_file_alike()
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(100, seed: 1));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "a.log");
        Assert.Contains("run-started", outcome.ErrorLines[0], StringComparison.Ordinal);
        Assert.Contains("run-finished", outcome.ErrorLines[^1], StringComparison.Ordinal);
        Assert.Equal(outcome.ErrorLines, File.ReadAllLines(folder.At("reports", "a.log", "run.log")));
    }

    [Fact]
    public void Quiet_keeps_standard_error_silent_and_the_results_and_the_log_file_as_they_are()
    {
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(100, seed: 1));
        Outcome quiet = BuiltProgram.Run(folder, "profile", "a.log", "--out", "quiet", "--quiet");
        Outcome plain = BuiltProgram.Run(folder, "profile", "a.log", "--out", "plain");
        Assert.Empty(quiet.Error);
        Assert.Equal(plain.Output.Replace("plain", "quiet", StringComparison.Ordinal), quiet.Output);
        Assert.Equal(plain.ErrorLines.Length, File.ReadAllLines(folder.At("quiet", "run.log")).Length);
        Outcome wrong = BuiltProgram.Run(folder, "profile", "not-there", "--quiet");
        Assert.Single(wrong.ErrorLines);
    }
}
