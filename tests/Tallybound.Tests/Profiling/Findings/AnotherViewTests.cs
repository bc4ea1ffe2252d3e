using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class AnotherViewTests
{
    private static readonly AnotherView Rule = new();

    private static ViewProfile Nibbles(long payload) => Made.View(100_000, Made.Huffman(payload, 8)) with { View = "nibbles" };

    [Fact]
    public void The_cheapest_other_view_is_set_against_the_best_of_the_first()
    {
        Finding finding = Made.Judge(Rule, Made.View(100_000, Made.Huffman(62_000, 100), Made.Code("tans", 60_000, 100)), Nibbles(55_000) with { View = "words-le" }, Nibbles(50_000))!;
        Assert.Equal(60_104 - 50_012, finding.BytesAtStake);
        Assert.Equal("the cheapest code of bytes", finding.Against);
        Assert.Equal(50_012, Made.Figure(finding, "nibbles, Huffman, total"));
        Assert.StartsWith("As nibbles the source is 48.8 KiB with Huffman, as bytes 58.7 KiB with tANS", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void What_the_inverse_needs_beside_the_symbols_is_charged() =>
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100)), Nibbles(50_000) with { SideBits = 8 * 10_000 }));

    [Fact]
    public void A_single_view_or_one_that_saves_less_than_2_percent_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100))));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(60_000, 100)), Nibbles(59_000)));
    }
}
