using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class IntegerLengthsLoseTests
{
    private static readonly IntegerLengthsLose Rule = new();

    private static ViewProfile View(double entropy, double redundancy, double? topShare, long tans = 50_200) => Made.View(
        100_000, Made.Huffman(52_500, 100, topShare) with { RedundancyBitsPerSymbol = redundancy },
        Made.Code("tans", tans, 150) with { Exact = false }, Made.Code("range", 51_900, 200), Made.Code("block-huffman", 51_000, 900, blockLength: 2)) with
    {
        Orders = [Made.Order(0, entropy)],
    };

    [Fact]
    public void A_loss_of_3_percent_is_won_back_by_the_cheapest_coder_without_whole_bits()
    {
        Finding finding = Made.Judge(Rule, View(4, 0.2, 0.4))!;
        Assert.Equal(52_604 - 50_354, finding.BytesAtStake);
        Assert.Equal("one Huffman table for the whole source", finding.Against);
        Assert.Equal(40, Made.Figure(finding, "share of the commonest symbol"));
        Assert.Equal(50_354, Made.Figure(finding, "tANS, total priced from counts"));
        Assert.Equal(51_904, Made.Figure(finding, "Huffman of 2-symbol blocks, total"));
        Assert.Contains("with tANS, the source is 49.2 KiB", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_share_that_is_not_known_is_no_figure()
    {
        Finding finding = Made.Judge(Rule, View(4, 0.2, null))!;
        Assert.DoesNotContain(finding.Evidence, figure => figure.Figure == "share of the commonest symbol");
    }

    [Fact]
    public void A_small_loss_or_a_near_constant_stream_or_nothing_won_back_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(4, 0.1, 0.4)));
        Assert.Null(Made.Judge(Rule, View(0.5, 0.019, 0.4)));
        Assert.Null(Made.Judge(Rule, View(4, 0.2, 0.91)));
        // Symbol blocks, the cheapest left, save 700 bytes; without them too little is saved.
        Assert.Equal(700, Made.Judge(Rule, View(4, 0.2, 0.4, tans: 60_000) with { Codes = [.. View(4, 0.2, 0.4, 60_000).Codes.Where(code => code.Code != "range")] })!.BytesAtStake);
        Assert.Null(Made.Judge(Rule, View(4, 0.2, 0.4, tans: 60_000) with { Codes = [.. View(4, 0.2, 0.4, 60_000).Codes.Where(code => code.Code is "huffman" or "tans")] }));
    }
}
