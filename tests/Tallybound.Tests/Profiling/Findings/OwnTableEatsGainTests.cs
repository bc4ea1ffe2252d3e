using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class OwnTableEatsGainTests
{
    private static readonly OwnTableEatsGain Rule = new();

    [Fact]
    public void A_table_of_a_third_of_the_gain_is_at_stake_whole()
    {
        Finding finding = Made.Judge(Rule, Made.View(2000, Made.Code("huffman", 1700, 96)))!;
        Assert.Equal(96, finding.BytesAtStake);
        Assert.Equal(33.333333, Made.Figure(finding, "share of the payload's saving that table and framing take"));
        Assert.Equal(1800, Made.Figure(finding, "Huffman, total"));
        Assert.Contains("could save the 96 B of the table", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_smaller_part_or_a_code_that_saves_nothing_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, Made.View(2000, Made.Code("huffman", 1600, 96))));
        Assert.Null(Made.Judge(Rule, Made.View(2000, Made.Code("huffman", 2000, 96))));
        Assert.Null(Made.Judge(Rule, Made.View(2000)));
    }

    [Fact]
    public void A_table_of_less_than_64_bytes_is_not_worth_a_word() =>
        Assert.Null(Made.Judge(Rule, Made.View(300, Made.Code("huffman", 200, 63))));
}
