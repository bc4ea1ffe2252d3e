using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class NearConstantTests
{
    private static readonly NearConstant Rule = new();

    private static ViewProfile View(double topShare) =>
        Made.View(100_000, Made.Huffman(12_700, 10, topShare), Made.Code("tans", 2000, 30), Made.Code("block-huffman", 6300, 50, blockLength: 2)) with { Orders = [Made.Order(0, 0.16)] };

    [Fact]
    public void A_symbol_of_nine_in_ten_is_worth_another_coder()
    {
        Finding finding = Made.Judge(Rule, View(0.95))!;
        Assert.Equal(12_714 - 2034, finding.BytesAtStake);
        Assert.Equal(95, Made.Figure(finding, "share of the commonest symbol"));
        Assert.StartsWith("95.0 % of symbols are one and the same", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void One_symbol_throughout_is_called_all()
    {
        ViewProfile view = View(0.95) with { SymbolsInUse = 1, Codes = [Made.Huffman(12_500, 4), Made.Code("tans", 0, 4)] };
        Assert.StartsWith("All symbols are one and the same", Made.Judge(Rule, view)!.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Of_many_sources_the_least_share_is_named_and_not_rounded_up()
    {
        static FindingTotal Of(double share) => FindingTotal.Of(Made.Source("unit", Made.View(100_000)), Made.Judge(Rule, View(share))!);
        Assert.Contains("one symbol is at least 95.1 % of all", Rule.ClaimOfMany(Of(0.97).Plus(Of(0.95199))), StringComparison.Ordinal);
        Assert.Contains("one symbol is all there is", Rule.ClaimOfMany(Of(1).Plus(Of(1))), StringComparison.Ordinal);
    }

    [Fact]
    public void A_rarer_symbol_or_no_other_coder_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(0.89)));
        Assert.Null(Made.Judge(Rule, View(0.95) with { Codes = [Made.Huffman(12_700, 10, 0.95)] }));
    }
}
