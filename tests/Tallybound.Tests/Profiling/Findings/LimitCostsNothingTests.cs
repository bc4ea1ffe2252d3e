using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class LimitCostsNothingTests
{
    private static readonly LimitCostsNothing Rule = new();

    [Fact]
    public void The_least_limit_without_cost_is_named_with_its_decoding_table()
    {
        Finding finding = Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100, longest: 13), Made.Limited(11, 60_010, 100, 80), Made.Limited(15, 60_000, 100, 0), Made.Limited(12, 60_000, 100, 0)))!;
        Assert.Equal(0, finding.BytesAtStake);
        Assert.Equal(12, Made.Figure(finding, "least limit priced that costs nothing"));
        Assert.Contains("though the free Huffman code's longest has 13: a decoding table of 4,096 entries", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_code_shorter_than_every_limit_needs_no_larger_table_than_its_own()
    {
        Finding finding = Made.Judge(Rule, Made.View(100_000, Made.Huffman(25_000, 10, longest: 2), Made.Limited(11, 25_000, 10, 0)))!;
        Assert.Contains("a decoding table of 4 entries", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Limits_that_all_cost_or_a_code_of_no_use_or_one_symbol_say_nothing()
    {
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(12_500, 4, longest: 1), Made.Limited(11, 12_500, 4, 0)) with { SymbolsInUse = 1 }));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100, longest: 13), Made.Limited(11, 60_010, 100, 80))));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(99_500, 100), Made.Limited(12, 99_500, 100, 0))));
    }
}
