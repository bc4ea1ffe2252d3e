using Tallybound.Reports.Html;
using Xunit;

namespace Tallybound.Tests.Reports.Html;

public sealed class VisibleTextTests
{
    [Theory]
    [InlineData("depot/log.txt", "depot/log.txt")]
    [InlineData("a\u001b[2Jb", "a\\u{1b}[2Jb")]
    [InlineData("a\nb", "a\\u{a}b")]
    [InlineData("a\u202eb", "a\\u{202e}b")]
    [InlineData("货柜🚢", "货柜🚢")]
    public void What_would_not_show_becomes_visible(string text, string expected) => Assert.Equal(expected, VisibleText.Of(text));

    /// <summary>Apart from the others: an attribute cannot hold half a surrogate pair.</summary>
    [Fact]
    public void Half_a_surrogate_pair_becomes_visible() => Assert.Equal("a\\u{d800}b", VisibleText.Of("a" + (char)0xD800 + "b"));
}
