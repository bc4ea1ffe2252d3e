using Tallybound.Reports.Csv;
using Xunit;

namespace Tallybound.Tests.Reports.Csv;

public sealed class CsvCellTests
{
    /// <summary>RFC 4180 section 2, rules 5 to 7; formula starts as spreadsheets read them (common practice).</summary>
    [Theory]
    [InlineData("plain", "plain")]
    [InlineData("a,b", "\"a,b\"")]
    [InlineData("a\"b", "\"a\"\"b\"")]
    [InlineData("a\nb", "\"a\nb\"")]
    [InlineData("=1+1", "\"'=1+1\"")]
    [InlineData("@x", "\"'@x\"")]
    [InlineData("-x", "\"'-x\"")]
    [InlineData(null, "")]
    public void A_text_cell_is_quoted_where_it_must_be(string? text, string expected) => Assert.Equal(expected, CsvCell.Text(text));
}
