using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class CorpusFindingsTests
{
    private static SourceProfile Short(string name, long table) => Made.Judged(name, Made.View(2000, Made.Code("huffman", 1700, table)));

    private static IReadOnlyList<Finding> RollUp(params SourceProfile[] sources) => RollUp(Made.Corpus(sources.Length), sources);

    private static IReadOnlyList<Finding> RollUp(CorpusProfile whole, params SourceProfile[] sources)
    {
        var corpus = new CorpusFindings();
        foreach (SourceProfile source in sources) corpus.Add(source);
        return corpus.Finish(whole);
    }

    [Fact]
    public void Sources_add_up_and_the_heaviest_is_named()
    {
        Finding finding = Assert.Single(RollUp(Short("c", 100), Short("b", 120), Short("a", 120), Made.Judged("quiet", Made.View(2000))), each => each.Id == "own-table-eats-gain");
        Assert.Equal(340, finding.BytesAtStake);
        Assert.Equal(3, finding.Sources);
        Assert.Equal("a", finding.HeaviestSource);
        Assert.Equal(6000, Made.Figure(finding, "size of these sources"));
        Assert.Equal(120, Made.Figure(finding, "at stake in the source with the most"));
        Assert.StartsWith("In 3 sources of 5.86 KiB together, ", finding.Claim, StringComparison.Ordinal);
        Assert.Contains("340 B", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void The_order_of_sources_never_matters()
    {
        SourceProfile[] sources = [.. Enumerable.Range(0, 12).Select(i => Short($"s{i % 5}-{i}", 96 + (i % 3)))];
        string expected = System.Text.Json.JsonSerializer.Serialize(RollUp(sources), RecordJson.Default.IReadOnlyListFinding);
        var random = new Random(7);
        int orders = 0;
        for (; orders < 20; orders++)
        {
            random.Shuffle(sources);
            Assert.Equal(expected, System.Text.Json.JsonSerializer.Serialize(RollUp(sources), RecordJson.Default.IReadOnlyListFinding));
        }
        Assert.Equal(20, orders);
    }

    [Fact]
    public void The_findings_of_a_single_source_stand_as_they_are()
    {
        SourceProfile source = Short("only", 100);
        Finding expected = Assert.Single(source.Findings!, each => each.Id == "own-table-eats-gain"), found = Assert.Single(RollUp(source), each => each.Id == "own-table-eats-gain");
        Assert.Equal(expected with { Sources = 1, HeaviestSource = "only" }, found);
    }

    [Fact]
    public void Intervals_add_up_with_exact_sources_at_both_ends()
    {
        static SourceProfile Curve(string name, long[]? interval) => Made.Judged(name, Made.View(100_000) with
        {
            TableBlocks = [Made.Point(4096, 80_000, 5000, 1000) with { Exact = interval is null, TotalBitsInterval = interval }, Made.Point(65_536, 80_000, 300, 60)],
        });
        Finding finding = Assert.Single(RollUp(Curve("a", [8 * 85_000, 8 * 88_000]), Curve("b", null)), each => each.Id == "table-eats-gain");
        Assert.Equal(2 * 5640, finding.BytesAtStake);
        Assert.Equal([4640 + 5640, 7640 + 5640], finding.BytesAtStakeInterval!);
    }

    [Fact]
    public void Nothing_read_gives_an_empty_list() => Assert.Empty(RollUp());
}
