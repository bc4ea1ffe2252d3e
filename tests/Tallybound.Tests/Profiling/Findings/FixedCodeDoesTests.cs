using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class FixedCodeDoesTests
{
    private static readonly FixedCodeDoes Rule = new();

    private static ViewProfile View(long fixedPayload, long huffman) =>
        Made.View(100_000, Made.Code("fixed", fixedPayload, 32) with { LongestCode = 2 }, Made.Huffman(huffman, 10)) with { SymbolsInUse = 4 };

    [Fact]
    public void Fixed_codes_within_1_percent_of_Huffman_are_enough()
    {
        Finding finding = Made.Judge(Rule, View(25_000, 24_900))!;
        Assert.Equal(100_004 - 25_036, finding.BytesAtStake);
        Assert.Equal(2, Made.Figure(finding, "width of a fixed-length code"));
        Assert.StartsWith("Fixed-length codes of 2 bits are enough: ", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_skew_that_Huffman_uses_or_an_alphabet_in_full_use_or_one_symbol_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(25_000, 24_000)));
        Assert.Null(Made.Judge(Rule, View(99_500, 99_400)));
        Assert.Null(Made.Judge(Rule, View(0, 12_500) with { SymbolsInUse = 1 }));
    }
}
