using Parquet;
using Parquet.Schema;
using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Parquet;

/// <summary>Writes <c>tallies.parquet</c>: the counts themselves, one row a (source, view, order, context, symbol).</summary>
internal static class TalliesTable
{
    private const int RowsInGroup = 1 << 20;

    // The default level makes the smallest file and is many times slower.
    private static readonly ParquetOptions Options = new() { CompressionMethod = CompressionMethod.Zstd, CompressionLevel = System.IO.Compression.CompressionLevel.Fastest };

    private static readonly DataField Source = new("source", typeof(string), isNullable: false);
    private static readonly DataField View = new("view", typeof(string), isNullable: false);
    private static readonly DataField<int> Order = new("order");
    private static readonly DataField<long> Context = new("context");
    private static readonly DataField<int> Symbol = new("symbol");
    private static readonly DataField<long> Count = new("count");

    /// <summary>Writes the rows in the order they come, in row groups of at most 1,048,576.</summary>
    public static void Write(string path, IEnumerable<TallyRow> rows) =>
        Files.WholeFile.Write(path, stream => WriteAsync(stream, rows).GetAwaiter().GetResult());

    private static async Task WriteAsync(Stream stream, IEnumerable<TallyRow> rows)
    {
        var schema = new ParquetSchema(Source, View, Order, Context, Symbol, Count);
        await using ParquetWriter writer = await ParquetWriter.CreateAsync(schema, stream, Options).ConfigureAwait(false);
        foreach (TallyRow[] group in rows.Chunk(RowsInGroup)) await WriteGroupAsync(writer, group).ConfigureAwait(false);
    }

    private static async Task WriteGroupAsync(ParquetWriter writer, TallyRow[] rows)
    {
        using ParquetRowGroupWriter group = writer.CreateRowGroup();
        await group.WriteAsync(Source, Array.ConvertAll(rows, row => row.Source)).ConfigureAwait(false);
        await group.WriteAsync(View, Array.ConvertAll(rows, row => row.View)).ConfigureAwait(false);
        await group.WriteAsync<int>(Order, Array.ConvertAll(rows, row => row.Order)).ConfigureAwait(false);
        await group.WriteAsync<long>(Context, Array.ConvertAll(rows, row => row.Context)).ConfigureAwait(false);
        await group.WriteAsync<int>(Symbol, Array.ConvertAll(rows, row => row.Symbol)).ConfigureAwait(false);
        await group.WriteAsync<long>(Count, Array.ConvertAll(rows, row => row.Count)).ConfigureAwait(false);
    }
}
