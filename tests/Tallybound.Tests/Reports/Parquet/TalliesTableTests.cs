using Parquet;
using Parquet.Schema;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Parquet;
using Xunit;

namespace Tallybound.Tests.Reports.Parquet;

public sealed class TalliesTableTests
{
    [Fact]
    public async Task Rows_come_back_as_they_were_written()
    {
        string path = Path.GetTempFileName();
        try
        {
            TallyRow[] rows = [.. Enumerable.Range(0, 3000).Select(i => new TallyRow("depot/ü", "bytes", i % 3, i * 3L, i % 256, 1L << (i % 40)))];
            TalliesTable.Write(path, rows);
            await using ParquetReader reader = await ParquetReader.CreateAsync(path, cancellationToken: TestContext.Current.CancellationToken);
            DataField[] fields = reader.Schema.GetDataFields();
            Assert.Equal(["source", "view", "order", "context", "symbol", "count"], fields.Select(field => field.Name));
            using ParquetRowGroupReader group = reader.OpenRowGroupReader(0);
            Assert.Equal(rows.Length, group.RowCount);
            var contexts = new long[rows.Length];
            var counts = new long[rows.Length];
            await group.ReadAsync<long>(fields[3], contexts.AsMemory(), null, TestContext.Current.CancellationToken);
            await group.ReadAsync<long>(fields[5], counts.AsMemory(), null, TestContext.Current.CancellationToken);
            Assert.Equal(rows.Select(row => row.Context), contexts);
            Assert.Equal(rows.Select(row => row.Count), counts);
        }
        finally
        {
            File.Delete(path);
        }
    }
}
