using System.Security.Cryptography;
using System.Text.Json.Nodes;
using Tallybound.Tests;

namespace Tallybound.Cli.Tests.Referee;

/// <summary>Holds the program against figures of open data that independent code computed (tests/vectors/open-data/figures.json).</summary>
public sealed class OpenDataTests
{
    private static readonly string Folder = Path.Combine(BuiltProgram.RepositoryRoot, "tests", "vectors", "open-data");
    private static readonly JsonObject Figures = JsonNode.Parse(File.ReadAllText(Path.Combine(Folder, "figures.json")))!["files"]!.AsObject();

    public static TheoryData<string> Files() => [.. Figures.Select(entry => entry.Key)];

    [Theory]
    [MemberData(nameof(Files))]
    public void A_file_has_the_published_figures(string file)
    {
        JsonNode expected = Figures[file]!;
        string path = Path.IsPathRooted(file) ? Prerequisites.RequireFile(file, (string)expected["source"]!) : Path.Combine(Folder, file);
        Assert.Equal((string)expected["sha256"]!, Convert.ToHexStringLower(SHA256.HashData(File.ReadAllBytes(path))));
        using var folder = new FreshFolder();
        Assert.Equal(0, BuiltProgram.Run(folder, ["profile", path, "--out", "run"], input: null).ExitCode);
        JsonNode view = RunRecordFile.In(folder.At("run")).Source(Path.GetFileName(path))["views"]![0]!;
        Assert.Equal((long)expected["alphabet"]!, (long)view["symbolsInUse"]!);
        for (int order = 0; order < 3; order++) Assert.Equal((double)expected[$"H{order}"]!, (double)view["orders"]![order]!["entropyBitsPerSymbol"]!, 1e-9);
        Assert.Equal((long)expected["ctx1"]!, (long)view["orders"]![1]!["contextsInUse"]!);
        Assert.Equal((long)expected["ctx2"]!, (long)view["orders"]![2]!["contextsInUse"]!);
        Assert.Equal((long)expected["huff_bits"]!, Payload(view, "huffman", null));
        Assert.Equal((long)expected["huff_maxlen"]!, (long)Code(view, "huffman", null)["longestCode"]!);
        foreach (int limit in (int[])[11, 12, 15]) Assert.Equal((long)expected[$"lim{limit}_bits"]!, Payload(view, "huffman-limited", limit));
    }

    [Fact]
    public void There_are_nine_files() => Assert.Equal(9, Figures.Count);

    private static JsonNode Code(JsonNode view, string code, int? limit) =>
        view["codes"]!.AsArray().Single(price => (string)price!["code"]! == code && (int?)price["lengthLimit"] == limit && (int)price["radix"]! == 2)!;

    private static long Payload(JsonNode view, string code, int? limit) => (long)Code(view, code, limit)["payloadBits"]!;
}
