using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class TernaryFitsTests
{
    private static readonly TernaryFits Rule = new();

    private static ViewProfile View(long trits, int radix = 3) => Made.View(
        100_000, Made.Huffman(55_000, 100), new CodePrice { Code = "huffman", Radix = radix, BlockLength = 1, PayloadDigits = trits, BoundClass = "memoryless", Exact = true });

    [Fact]
    public void Trits_saved_are_worth_log2_of_3_bits_each()
    {
        // 440,000 bits are 40,000 groups of 11, 280,000 trits.
        Finding finding = Made.Judge(Rule, View(272_000))!;
        Assert.Equal(280_000, Made.Figure(finding, "binary Huffman code, payload in trits"));
        Assert.Equal((long)(8000 * 1.5849625 / 8), finding.BytesAtStake);
        Assert.Contains("takes 272,000 trits instead of 280,000", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Fewer_than_1_percent_of_trits_or_another_radix_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(277_300)));
        Assert.Null(Made.Judge(Rule, View(200_000, radix: 4)));
        Assert.Null(Made.Judge(Rule, Made.View(100_000, Made.Huffman(55_000, 100))));
    }
}
