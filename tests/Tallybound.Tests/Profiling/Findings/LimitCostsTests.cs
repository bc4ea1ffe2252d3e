using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class LimitCostsTests
{
    private static readonly LimitCosts Rule = new();

    [Fact]
    public void The_least_limit_that_costs_a_thousandth_is_priced_beside_the_next_one()
    {
        Finding finding = Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100, longest: 16), Made.Limited(12, 60_100, 95, 800), Made.Limited(11, 60_300, 90, 2400)))!;
        Assert.Equal(60_394 - 60_104, finding.BytesAtStake);
        Assert.Equal("codes of at most 11 bits", finding.Against);
        Assert.Equal(60_199, Made.Figure(finding, "codes of at most 12 bits, total"));
        Assert.Equal(0.5, Made.Figure(finding, "payload that the limit costs"));
        Assert.EndsWith("; at most 12 bits cost 95 B.", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_longer_limit_whose_table_is_cheaper_costs_nothing()
    {
        Finding finding = Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100, longest: 16), Made.Limited(11, 60_300, 90, 2400), Made.Limited(15, 60_010, 60, 80)))!;
        Assert.EndsWith("; at most 15 bits cost nothing.", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_limit_that_costs_less_or_wins_it_back_in_its_table_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100), Made.Limited(11, 60_059, 200, 472))));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 600), Made.Limited(11, 60_300, 300, 2400))));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100))));
    }
}
