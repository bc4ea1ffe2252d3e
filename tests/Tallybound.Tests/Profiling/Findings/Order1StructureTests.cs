using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class Order1StructureTests
{
    private static readonly Order1Structure Rule = new();

    private static ViewProfile View(long contexts, long tables, double adaptive1, double? held1 = 4.1, long huffman = 60_000) => Made.View(
        100_000, Made.Huffman(huffman, 100), Made.Code("context-huffman", contexts, tables)) with
    {
        Orders = [Made.Order(0, 4.8, 4.81, 4.82), Made.Order(1, 4, adaptive1, held1)],
    };

    [Fact]
    public void A_table_per_previous_symbol_is_charged_with_its_tables()
    {
        Finding finding = Made.Judge(Rule, View(50_000, 2000, 4.2))!;
        Assert.Equal(60_104 - 52_004, finding.BytesAtStake);
        Assert.Equal(2000, Made.Figure(finding, "Huffman per previous symbol, tables"));
        Assert.Equal(4.1, Made.Figure(finding, "held-out, order 1"));
        Assert.Contains("is 50.8 KiB, tables included, instead of 58.7 KiB with one Huffman table", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void Where_tables_take_the_gain_an_adaptive_coder_could_have_it()
    {
        Finding finding = Made.Judge(Rule, View(50_000, 20_000, 4.2))!;
        Assert.Equal(60_104 - 52_500, finding.BytesAtStake);
        Assert.Contains("could bring the source to 51.3 KiB", finding.Claim, StringComparison.Ordinal);
        Assert.Equal(52_500, Made.Figure(finding, "adaptive cost of order 1"));
    }

    [Fact]
    public void Stored_symbols_are_the_measure_where_Huffman_takes_more()
    {
        Finding finding = Made.Judge(Rule, View(50_000, 20_000, 4.2, huffman: 100_000))!;
        Assert.Equal("stored symbols", finding.Against);
        Assert.Equal(100_004 - 70_004, finding.BytesAtStake);
    }

    [Fact]
    public void Contexts_that_do_not_help_the_other_half_say_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(50_000, 2000, 4.2, held1: 4.9)));
        Assert.NotNull(Made.Judge(Rule, View(50_000, 2000, 4.2, held1: null)));
    }

    [Fact]
    public void No_gain_once_tables_are_charged_and_none_for_an_adaptive_coder_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(50_000, 9000, 4.75)));
        Assert.Null(Made.Judge(Rule, View(50_000, 2000, 4.2) with { Orders = [Made.Order(0, 4.8, 4.81, 4.82)] }));
    }
}
