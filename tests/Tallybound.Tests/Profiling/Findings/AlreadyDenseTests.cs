using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class AlreadyDenseTests
{
    private static readonly AlreadyDense Rule = new();

    private static ViewProfile View(double adaptive0, double adaptive1, params RefereePrice[] referee) =>
        Made.View(100_000) with { Orders = [Made.Order(0, 7.99, adaptive0), Made.Order(1, 7.9, adaptive1)], Referee = referee };

    [Fact]
    public void Bytes_that_neither_models_nor_codecs_shrink_are_dense()
    {
        Finding finding = Made.Judge(Rule, View(8.01, 8.2, new RefereePrice("deflate", 6, 1 << 20, 100_020), new RefereePrice("zstandard", 3, 1 << 20, 99_700), new RefereePrice("brotli", 5, 4096, 90_000)))!;
        Assert.Equal(0, finding.BytesAtStake);
        Assert.Equal(99_700, Made.Figure(finding, "zstandard, level 3, blocks of 1 MiB"));
        Assert.Contains("zstandard at level 3 makes 97.4 KiB of 97.7 KiB", finding.Claim, StringComparison.Ordinal);
        Assert.Contains("store-it", finding.Excludes!);
    }

    [Fact]
    public void A_codec_or_a_model_that_saves_1_percent_or_no_referee_says_nothing()
    {
        Assert.Null(Made.Judge(Rule, View(8.01, 8.2, new RefereePrice("zstandard", 3, 1 << 20, 99_000))));
        Assert.Null(Made.Judge(Rule, View(8.01, 7.9, new RefereePrice("zstandard", 3, 1 << 20, 99_700))));
        Assert.Null(Made.Judge(Rule, View(8.01, 8.2, new RefereePrice("zstandard", 3, 4096, 99_700))));
        Assert.Null(Made.Judge(Rule, View(8.01, 8.2) with { Referee = null }));
    }
}
