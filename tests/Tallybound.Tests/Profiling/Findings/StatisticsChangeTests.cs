using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class StatisticsChangeTests
{
    private static readonly StatisticsChange Rule = new();

    private static ViewProfile View(int stretches, long total) => Made.View(100_000, Made.Huffman(60_000, 100)) with
    {
        AdaptiveSplit = new AdaptiveSplitProfile
        {
            Starts = [.. Enumerable.Range(0, stretches).Select(i => 4096L * i)], PayloadBits = 8 * (total - 310), TableBits = 8 * 300, FramingBits = 80, TotalBits = 8 * total,
            BestFixedBlockBytes = 16_384, BestFixedTotalBits = 8 * 55_500,
        },
    };

    [Fact]
    public void Stretches_that_save_2_percent_are_counted_and_set_beside_the_best_fixed_block()
    {
        Finding finding = Made.Judge(Rule, View(3, 55_000))!;
        Assert.Equal(60_104 - 55_000, finding.BytesAtStake);
        Assert.Equal(3, Made.Figure(finding, "stretches"));
        Assert.Equal(300, Made.Figure(finding, "stretches, tables"));
        Assert.Equal(55_500, Made.Figure(finding, "best fixed table block, 16 KiB, total"));
    }

    [Fact]
    public void One_stretch_or_a_smaller_saving_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(1, 55_000)));
        Assert.Null(Made.Judge(Rule, View(3, 59_000)));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100))));
    }
}
