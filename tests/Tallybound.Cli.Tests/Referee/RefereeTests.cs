using System.Diagnostics;
using System.Text.Json.Nodes;
using Tallybound.Tests;

namespace Tallybound.Cli.Tests.Referee;

/// <summary>Holds <c>profile.json</c> against figures that a script of its own computes anew: 1e-9 for entropies and rates, equal bits for codes.</summary>
public sealed class RefereeTests
{
    private static string Vectors(params string[] parts) => Path.Combine([BuiltProgram.RepositoryRoot, "tests", "vectors", .. parts]);

    private static string[] Script(params string[] arguments)
    {
        var start = new ProcessStartInfo(Prerequisites.RequirePythonWithNumpy(), [Vectors("reference", "referee.py"), .. arguments]) { UseShellExecute = false, RedirectStandardOutput = true };
        using Process process = Process.Start(start)!;
        string output = process.StandardOutput.ReadToEnd();
        process.WaitForExit();
        Assert.Equal(0, process.ExitCode);
        return output.Split('\n', StringSplitOptions.RemoveEmptyEntries);
    }

    [Fact]
    public void The_referee_agrees_with_published_values_itself()
    {
        JsonNode result = JsonNode.Parse(Assert.Single(Script("--self-test")))!;
        Assert.Empty(result["failed"]!.AsArray());
        Assert.True((int)result["checks"]! > 300);
    }

    [Fact]
    public void Figures_of_the_demo_corpora_are_those_of_the_referee() =>
        Compare([.. Directory.EnumerateFiles(Path.Combine(BuiltProgram.RepositoryRoot, "corpora-demo"), "*", SearchOption.AllDirectories)], 13);

    [Fact]
    public void Figures_of_the_open_data_are_those_of_the_referee() =>
        Compare([.. Directory.EnumerateFiles(Vectors("open-data")).Where(file => Path.GetFileName(file) is not ("README.md" or "figures.json" or "LICENSE.go"))], 7);

    private static void Compare(string[] files, int expected)
    {
        Array.Sort(files, StringComparer.Ordinal);
        Assert.Equal(expected, files.Length);
        string[] lines = Script(files);
        using var folder = new FreshFolder();
        Assert.Equal(0, BuiltProgram.Run(folder, ["profile", .. files, "--radix", "3", "--out", "run"], input: null).ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("run"));
        int figures = 0;
        for (int i = 0; i < files.Length; i++) figures += CompareSource(record.Source(files[i]), JsonNode.Parse(lines[i])!, files[i]);
        Assert.True(figures > 40 * (files.Length - 1), $"{figures} figures were compared.");
    }

    private static int CompareSource(JsonNode source, JsonNode referee, string name)
    {
        Assert.Equal((string)referee["sha256"]!, (string)source["sha256"]!);
        Assert.Equal((long)referee["bytes"]!, (long)source["bytes"]!);
        if ((long)referee["bytes"]! == 0) return 0;
        JsonNode view = source["views"]![0]!;
        Assert.Equal((long)referee["symbolsInUse"]!, (long)view["symbolsInUse"]!);
        var compared = new Comparison(name);
        for (int order = 0; order < referee["orders"]!.AsArray().Count; order++) CompareOrder(compared, view["orders"]![order]!, referee["orders"]![order]!, order);
        compared.Close(view["uniformity"]!["chiSquare"], referee["chiSquare"], "chi-square");
        CompareCodes(compared, view, referee);
        foreach (JsonNode? block in referee["blocks"]!.AsArray()) CompareBlocks(compared, view, block!);
        return compared.Figures;
    }

    private static void CompareOrder(Comparison compared, JsonNode ours, JsonNode theirs, int order)
    {
        foreach ((string our, string their) in new[] { ("entropyBitsPerSymbol", "entropy"), ("correctedBitsPerSymbol", "corrected"), ("standardErrorBits", "standardError"), ("adaptiveBitsPerSymbol", "adaptive"), ("heldOutBitsPerSymbol", "heldOut"), ("thinMass", "thin") })
            compared.Close(ours[our], theirs[their], $"{our} of order {order}");
        foreach ((string our, string their) in new[] { ("heldOutEscapes", "escapes"), ("contextsInUse", "contexts"), ("contextsSeenUnder8", "under8"), ("pairsInUse", "pairs") })
            compared.Equal(ours[our], theirs[their], $"{our} of order {order}");
    }

    private static void CompareCodes(Comparison compared, JsonNode view, JsonNode referee)
    {
        JsonNode huffman = Code(view, "huffman")!;
        compared.Equal(huffman["payloadBits"], referee["huffman"], "Huffman payload");
        compared.Equal(huffman["longestCode"], referee["longestCode"], "longest code");
        string format = (string)huffman["tableFormat"]!;
        foreach ((string theirFormat, JsonNode? bits) in referee["tables"]!.AsObject())
        {
            if (theirFormat == format) compared.Equal(huffman["tableBits"], bits, "table as " + format);
            else if (bits is not null) Assert.True((long)huffman["tableBits"]! <= (long)bits, $"{compared.Name}: {format} was taken, {theirFormat} is cheaper.");
        }
        foreach ((string limit, JsonNode? bits) in referee["limited"]!.AsObject())
            compared.Equal(Code(view, "huffman-limited", limit: int.Parse(limit, System.Globalization.CultureInfo.InvariantCulture))?["payloadBits"], bits, "payload limited to " + limit);
        compared.Equal(Code(view, "huffman", radix: 3)!["payloadDigits"], referee["radix3"], "ternary payload");
        compared.Equal(Code(view, "fixed")!["payloadBits"], referee["fixed"], "fixed payload");
        compared.Equal(Code(view, "context-huffman")!["payloadBits"], referee["contextHuffman"], "payload with one table a context");
    }

    private static void CompareBlocks(Comparison compared, JsonNode view, JsonNode theirs)
    {
        int length = (int)theirs["blockLength"]!;
        JsonNode ours = view["symbolBlocks"]!.AsArray().Single(block => (int)block!["blockLength"]! == length)!;
        compared.Equal(Code(view, "block-huffman", block: length)!["payloadBits"], theirs["payload"], $"payload of blocks of {length}");
        compared.Equal(ours["blocksInUse"], theirs["inUse"], $"blocks of {length} in use");
        compared.Close(ours["blockEntropyBitsPerSymbol"], theirs["entropy"], $"entropy of blocks of {length}");
        if (theirs["extension"] is { } extension && ours["independent"] is { } independent) compared.Close(independent["expectedBitsPerSymbol"], extension, $"extension of {length}");
    }

    private static JsonNode? Code(JsonNode view, string code, int? limit = null, int block = 1, int radix = 2) => view["codes"]!.AsArray().SingleOrDefault(price =>
        (string)price!["code"]! == code && (int?)price["lengthLimit"] == limit && (int)price["blockLength"]! == block && (int)price["radix"]! == radix);

    private sealed class Comparison(string name)
    {
        public string Name => name;

        public int Figures { get; private set; }

        public void Close(JsonNode? ours, JsonNode? theirs, string what)
        {
            Assert.True(ours is null == theirs is null, $"{name}: {what} stands on one side only.");
            if (theirs is null) return;
            double our = (double)ours!, their = (double)theirs;
            Assert.True(Math.Abs(our - their) <= 1e-9 * Math.Max(Math.Abs(their), 1e-3), $"{name}: {what} is {our:R}; the referee has {their:R}.");
            Figures++;
        }

        public void Equal(JsonNode? ours, JsonNode? theirs, string what)
        {
            Assert.True(ours is null == theirs is null, $"{name}: {what} stands on one side only.");
            if (theirs is null) return;
            Assert.True((long)ours! == (long)theirs, $"{name}: {what} is {ours}; the referee has {theirs}.");
            Figures++;
        }
    }
}
