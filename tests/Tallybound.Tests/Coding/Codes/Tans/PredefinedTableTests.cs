using System.Numerics;
using Tallybound.Coding.Codes.Tans;
using Tallybound.Tests.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Codes.Tans;

public sealed class PredefinedTableTests
{
    /// <summary>RFC 8878 appendix A: all 160 rows, among them the cells at the end of a table where symbols with a chance below 1 stand.</summary>
    [Fact]
    public void Every_row_of_the_predefined_tables_is_that_of_the_standard()
    {
        int rows = 0;
        foreach (string id in (string[])["zstd-predefined-literal-length", "zstd-predefined-match-length", "zstd-predefined-offset"])
        {
            System.Text.Json.JsonElement vector = TableVectors.Of(id);
            int[] expected = vector.Integers("expected");
            int cells = expected.Length / 3;
            var table = new TansTable(vector.Integers("input"), BitOperations.Log2((uint)cells));
            for (int cell = 0; cell < cells; cell++, rows++)
            {
                Assert.Equal((id, cell, expected[3 * cell], expected[(3 * cell) + 1], expected[(3 * cell) + 2]), (id, cell, table.SymbolOf(cell), table.BitsOf(cell), table.BaselineOf(cell)));
            }
        }
        Assert.Equal(160, rows);
    }
}
