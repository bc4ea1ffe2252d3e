using System.Text.Json;
using System.Text.Json.Nodes;

namespace Tallybound.Cli.Tests;

/// <summary>The <c>profile.json</c> of a run folder.</summary>
internal sealed class RunRecordFile(JsonObject root)
{
    /// <summary>Reads the record of a run folder.</summary>
    public static RunRecordFile In(string folder) => new(JsonNode.Parse(File.ReadAllText(Path.Combine(folder, "profile.json")))!.AsObject());

    /// <summary>The whole document.</summary>
    public JsonObject Root => root;

    /// <summary>Whether every source had its turn.</summary>
    public bool Complete => (bool)root["run"]!["complete"]!;

    /// <summary>The corpus roll-up.</summary>
    public JsonNode Corpus => root["corpus"]!;

    /// <summary>The sources.</summary>
    public JsonArray Sources => root["sources"]!.AsArray();

    /// <summary>The names of the sources.</summary>
    public string[] Names => [.. Sources.Select(source => (string)source!["name"]!)];

    /// <summary>The one source of a name.</summary>
    public JsonNode Source(string name) => Sources.Single(source => (string)source!["name"]! == name)!;

    /// <summary>The document without what stands for time and machine.</summary>
    public string OutsideProvenance()
    {
        JsonObject copy = root.DeepClone().AsObject();
        Assert.True(copy.Remove("tool"));
        Assert.True(copy.Remove("run"));
        return copy.ToJsonString(new JsonSerializerOptions { WriteIndented = true });
    }
}
