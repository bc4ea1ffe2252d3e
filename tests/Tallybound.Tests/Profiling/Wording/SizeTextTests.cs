using Tallybound.Profiling.Wording;
using Xunit;

namespace Tallybound.Tests.Profiling.Wording;

public sealed class SizeTextTests
{
    [Theory]
    [InlineData(0, "0 B")]
    [InlineData(1023, "1023 B")]
    [InlineData(1024, "1.00 KiB")]
    [InlineData(10_230, "9.99 KiB")]
    [InlineData(102_348, "99.9 KiB")]
    [InlineData(102_400, "100 KiB")]
    [InlineData(1_048_575, "1.00 MiB")]
    [InlineData(1_048_576, "1.00 MiB")]
    [InlineData(long.MaxValue, "8.00 EiB")]
    public void A_size_has_three_figures_and_a_unit_of_1024(long bytes, string expected) => Assert.Equal(expected, SizeText.Bytes(bytes));

    [Fact]
    public void A_ratio_is_raw_over_coded_and_a_saving_is_what_is_left_of_one()
    {
        Assert.Equal("2.00×", SizeText.Ratio(100, 50));
        Assert.Equal("50.0 %", SizeText.Saving(100, 50));
        Assert.Equal("-10.0 %", SizeText.Saving(100, 110));
        Assert.Equal("", SizeText.Ratio(0, 0));
    }

    [Theory]
    [InlineData(0, "0.0 %")]
    [InlineData(0.2549, "25.5 %")]
    [InlineData(0.99999, "99.9 %")]
    [InlineData(1, "100.0 %")]
    public void A_share_has_one_decimal_and_only_the_whole_is_100(double share, string expected) => Assert.Equal(expected, SizeText.Percent(share));

    [Theory]
    [InlineData(0, "0 B")]
    [InlineData(1500, "1,500 B")]
    [InlineData(65_536, "64 KiB")]
    [InlineData(1_572_864, "1,536 KiB")]
    [InlineData(1 << 30, "1 GiB")]
    public void A_size_that_was_set_is_given_to_the_last_byte(long bytes, string expected) => Assert.Equal(expected, SizeText.Whole(bytes));
}
