using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class TableEatsGainTests
{
    private static readonly TableEatsGain Rule = new();

    private static ViewProfile Curve(params TableBlockPrice[] points) => Made.View(100_000) with { TableBlocks = points };

    [Fact]
    public void Tables_that_take_a_quarter_of_the_gain_at_4_KiB_give_what_the_best_size_saves()
    {
        // Payload saves 20,000 bytes; 4,000 + 1,000 of them, a quarter, go to tables and framing.
        Finding finding = Made.Judge(Rule, Curve(Made.Point(4096, 80_000, 4000, 1000), Made.Point(65_536, 80_500, 300, 60), Made.Point(131_072, 81_000, 200, 10)))!;
        Assert.Equal(85_000 - 80_860, finding.BytesAtStake);
        Assert.Equal("table blocks of 4 KiB", finding.Against);
        Assert.Equal(25, Made.Figure(finding, "share of the payload's saving that tables and framing take"));
        Assert.Equal(80_860, Made.Figure(finding, "blocks of 64 KiB, total"));
        Assert.Null(finding.BytesAtStakeInterval);
        Assert.DoesNotContain("about", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void An_estimated_point_is_called_so_and_brings_its_interval()
    {
        TableBlockPrice estimate = Made.Point(4096, 80_000, 5000, 1000) with { Exact = false, Kinds = null, TotalBitsInterval = [8 * 80_000, 8 * 90_000] };
        Finding finding = Made.Judge(Rule, Curve(estimate, Made.Point(65_536, 80_500, 300, 60)))!;
        Assert.Equal([0, 90_000 - 80_860], finding.BytesAtStakeInterval!);
        Assert.Contains("about", finding.Claim, StringComparison.Ordinal);
        Assert.Equal(86_000, Made.Figure(finding, "blocks of 4 KiB, total, estimated"));
    }

    [Fact]
    public void A_size_below_the_usual_ones_is_passed_over()
    {
        Finding finding = Made.Judge(Rule, Curve(Made.Point(8192, 80_000, 9000, 1000), Made.Point(16_384, 80_000, 4500, 500), Made.Point(65_536, 80_500, 300, 60)))!;
        Assert.Equal(85_000 - 80_860, finding.BytesAtStake);
    }

    [Fact]
    public void Tables_that_take_less_or_a_curve_that_gains_nothing_say_nothing()
    {
        Assert.Null(Made.Judge(Rule, Curve(Made.Point(4096, 80_000, 3900, 1000), Made.Point(65_536, 80_500, 300, 60))));
        Assert.Null(Made.Judge(Rule, Curve(Made.Point(4096, 100_000, 0, 50), Made.Point(65_536, 100_000, 0, 4))));
        Assert.Null(Made.Judge(Rule, Curve(Made.Point(4096, 80_000, 5000, 1000))));
        Assert.Null(Made.Judge(Rule, Made.View(100_000)));
    }
}
