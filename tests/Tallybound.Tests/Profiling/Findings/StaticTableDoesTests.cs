using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class StaticTableDoesTests
{
    private static readonly StaticTableDoes Rule = new();

    /// <summary>A source of 1,000,000 bytes in equal segments, 800,104 under one table.</summary>
    private static ViewProfile View(int segments, long own, long one, TableBlockPrice point) => Made.View(1_000_000, Made.Huffman(800_000, 100)) with
    {
        TableBlocks = [Made.Point(4096, 790_000, 40_000, 1000), point],
        Segments = new SegmentSeries
        {
            SegmentBytes = 4096, OwnTableBits = [.. Enumerable.Repeat(8 * own, segments)], SourceTableBits = [.. Enumerable.Repeat(8 * one, segments)],
            PreviousTableBits = [.. Enumerable.Repeat(8 * one, segments)], DivergenceBits = [.. Enumerable.Repeat(0.0, segments)],
        },
    };

    [Fact]
    public void Own_tables_that_could_save_1_percent_at_most_make_one_table_do()
    {
        Finding finding = Made.Judge(Rule, View(16, 49_600, 50_000, Made.Point(65_536, 799_000, 9000, 500)))!;
        Assert.Equal(808_500 - 800_104, finding.BytesAtStake);
        Assert.Equal("table blocks of 64 KiB, each of its cheapest kind", finding.Against);
        Assert.Equal(0.8, Made.Figure(finding, "payload that own tables of segments could save"));
        Assert.Contains("could save 6.25 KiB before tables are paid for", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Blocks_that_take_about_as_much_leave_the_claim_and_put_nothing_at_stake()
    {
        Assert.Equal(0, Made.Judge(Rule, View(16, 49_600, 50_000, Made.Point(65_536, 799_000, 1000, 500)))!.BytesAtStake);
        Assert.Equal(0, Made.Judge(Rule, View(16, 49_600, 50_000, Made.Point(65_536, 795_000, 1000, 500)))!.BytesAtStake);
    }

    [Fact]
    public void Blocks_that_take_1_percent_less_say_nothing() => Assert.Null(Made.Judge(Rule, View(16, 49_600, 50_000, Made.Point(65_536, 791_000, 1000, 100))));

    [Fact]
    public void Own_tables_that_could_save_more_or_few_segments_or_a_code_of_no_use_say_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(16, 49_400, 50_000, Made.Point(65_536, 799_000, 9000, 500))));
        Assert.Null(Made.Judge(Rule, View(15, 49_600, 50_000, Made.Point(65_536, 799_000, 9000, 500))));
        Assert.Null(Made.Judge(Rule, View(16, 49_600, 50_000, Made.Point(65_536, 799_000, 9000, 500)) with { Codes = [Made.Huffman(995_000, 100)] }));
        Assert.Null(Made.Judge(Rule, Made.View(1_000_000, Made.Huffman(800_000, 100))));
    }
}
