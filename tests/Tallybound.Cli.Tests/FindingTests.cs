using System.Text.Json.Nodes;
using Xunit;

namespace Tallybound.Cli.Tests;

/// <summary>Findings as a run writes them.</summary>
public sealed class FindingTests
{
    private static string[] Ids(JsonNode? findings) => [.. findings!.AsArray().Select(finding => (string)finding!["id"]!)];

    [Fact]
    public void The_findings_of_a_single_source_are_those_of_the_run_with_its_name()
    {
        using var folder = new FreshFolder();
        folder.Write("doors.log", TestData.Log(6000, seed: 1));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "doors.log").ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "doors.log"));
        JsonArray expected = record.Source("doors.log")["findings"]!.DeepClone().AsArray();
        Assert.NotEmpty(expected);
        foreach (JsonNode? finding in expected)
        {
            finding!["sources"] = 1;
            finding["heaviestSource"] = "doors.log";
        }
        Assert.True(JsonNode.DeepEquals(expected, record.Root["findings"]));
    }

    [Fact]
    public void Of_several_sources_the_run_adds_up_what_each_puts_at_stake()
    {
        using var folder = new FreshFolder();
        folder.Write("fleet/a.log", TestData.Log(6000, seed: 1));
        folder.Write("fleet/b.log", TestData.Log(3000, seed: 2));
        folder.Write("fleet/b-again.log", TestData.Log(3000, seed: 2));
        folder.Write("fleet/keys.bin", TestData.Even(100_000, seed: 3));
        folder.Write("fleet/empty", []);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "fleet").ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "fleet"));
        Assert.Contains("store-it", Ids(record.Source("keys.bin")["findings"]));
        Assert.Null(record.Source("empty")["findings"]);
        JsonNode[] ofSources = [.. record.Sources.SelectMany(source => source!["findings"]?.AsArray() ?? []).OfType<JsonNode>()];
        int added = 0;
        foreach (JsonNode? finding in record.Root["findings"]!.AsArray())
        {
            string id = (string)finding!["id"]!;
            if (id is "code-per-source" or "duplicates") continue;
            JsonNode[] same = [.. ofSources.Where(each => (string)each["id"]! == id)];
            Assert.Equal(same.Length, (int)finding["sources"]!);
            Assert.Equal(same.Sum(each => (long)each["bytesAtStake"]!), (long)finding["bytesAtStake"]!);
            added += same.Length;
        }
        Assert.Equal(ofSources.Length, added);
        JsonNode duplicates = Assert.Single(record.Root["findings"]!.AsArray(), finding => (string)finding!["id"]! == "duplicates")!;
        Assert.Equal((long)record.Source("b.log")["bytes"]!, (long)duplicates["bytesAtStake"]!);
    }
}
