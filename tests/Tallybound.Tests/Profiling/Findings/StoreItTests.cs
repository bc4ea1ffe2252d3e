using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class StoreItTests
{
    private static readonly StoreIt Rule = new();

    private static ViewProfile View(long huffman, long tans, long bytes = 100_000) =>
        Made.View(bytes, Made.Huffman(huffman, 150), Made.Code("tans", tans, 300)) with { Orders = [Made.Order(0, 7.99, 8.01)] };

    [Fact]
    public void Codes_that_take_more_than_stored_symbols_put_what_Huffman_adds_at_stake()
    {
        Finding finding = Made.Judge(Rule, View(99_990, 99_980))!;
        Assert.Equal(100_144 - 100_004, finding.BytesAtStake);
        Assert.Equal(2, Made.Figure(finding, "codes priced"));
        Assert.Equal(100_144, Made.Figure(finding, "Huffman, total"));
        Assert.StartsWith("Best stored: none of the 2 codes priced here saves 1 % of 97.7 KiB stored", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Codes_that_save_less_than_1_percent_put_nothing_at_stake() => Assert.Equal(0, Made.Judge(Rule, View(99_300, 99_400))!.BytesAtStake);

    [Fact]
    public void A_code_an_adaptive_model_or_a_division_that_saves_1_percent_or_a_tiny_source_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(99_990, 98_000)));
        Assert.Null(Made.Judge(Rule, View(99_990, 99_980) with { Orders = [Made.Order(0, 7.99, 8.01), Made.Order(1, 6, 7)] }));
        Assert.Null(Made.Judge(Rule, View(99_990, 99_980) with { TableBlocks = [Made.Point(4096, 90_000, 1000, 100)] }));
        Assert.Null(Made.Judge(Rule, View(1100, 1100, bytes: 1023)));
        Assert.NotNull(Made.Judge(Rule, View(1100, 1100, bytes: 1024)));
    }
}
