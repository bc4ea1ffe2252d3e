using System.IO.Compression;
using System.Text.Json.Nodes;
using Microsoft.Data.Sqlite;
using Parquet;
using Parquet.Schema;

namespace Tallybound.Cli.Tests;

public sealed class OptionTests
{
    [Fact]
    public void Include_and_exclude_choose_the_files_of_a_folder()
    {
        using var folder = new FreshFolder();
        foreach (string name in (string[])["a.log", "b.csv", "deep/c.csv", "deep/d.bin", "old/e.csv"]) folder.Write($"depot/{name}", TestData.Log(20, seed: 1));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "depot", "--out", "run", "--include", "**/*.csv", "--include", "*.log", "--exclude", "old/**").ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("run"));
        Assert.Equal(["a.log", "b.csv", "deep/c.csv"], record.Names);
        Assert.Equal(2, (int)record.Corpus["excludedByRule"]!);
    }

    [Fact]
    public void With_several_inputs_names_start_with_the_input_as_typed()
    {
        using var folder = new FreshFolder();
        folder.Write("one/a.log", TestData.Log(20, seed: 1));
        folder.Write("two/a.log", TestData.Log(20, seed: 2));
        folder.Write("b.log", TestData.Log(20, seed: 3));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "one/", "./two", "b.log").ExitCode);
        Assert.Equal(["./two/a.log", "b.log", "one/a.log"], RunRecordFile.In(folder.At("reports", "one")).Names.Order(StringComparer.Ordinal));
    }

    [Fact]
    public void Compressed_files_are_read_as_what_they_hold_only_when_asked_and_only_to_the_limit()
    {
        using var folder = new FreshFolder();
        byte[] lines = TestData.Log(4000, seed: 1);
        folder.Write("depot/door.log.gz", Packed(lines));
        folder.Write("depot/zeros.gz", Packed(new byte[20 << 20]));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "depot", "--out", "plain").ExitCode);
        Outcome inside = BuiltProgram.Run(folder, "profile", "depot", "--out", "inside", "--inside", "--inside-ratio", "100", "--inside-size", "1GiB");
        Assert.Equal(1, inside.ExitCode);
        JsonNode packed = RunRecordFile.In(folder.At("plain")).Source("door.log.gz");
        Assert.Equal("file", (string)packed["kind"]!);
        Assert.Equal(Packed(lines).Length, (int)packed["bytes"]!);
        RunRecordFile record = RunRecordFile.In(folder.At("inside"));
        JsonNode member = record.Source("door.log.gz");
        Assert.Equal("member", (string)member["kind"]!);
        Assert.Equal("profiled", (string)member["status"]!);
        Assert.Equal(lines.Length, (int)member["bytes"]!);
        JsonNode bomb = record.Source("zeros.gz");
        Assert.Equal("partial", (string)bomb["status"]!);
        Assert.InRange((long)bomb["bytes"]!, 1, 110L * Packed(new byte[20 << 20]).Length);
        Assert.True(record.Complete);
        Assert.Contains("zeros.gz", inside.Output, StringComparison.Ordinal);
    }

    [Fact]
    public async Task Kept_tallies_are_the_counts_of_the_source()
    {
        using var folder = new FreshFolder();
        byte[] bytes = TestData.Skewed(30_000, seed: 4);
        folder.Write("a.bin", bytes);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.bin", "--out", "run", "--keep-tallies").ExitCode);
        await using ParquetReader reader = await ParquetReader.CreateAsync(folder.At("run", "tallies.parquet"), cancellationToken: TestContext.Current.CancellationToken);
        DataField[] fields = reader.Schema.GetDataFields();
        Assert.Equal(["source", "view", "order", "context", "symbol", "count"], fields.Select(field => field.Name));
        long[] byOrder = new long[3];
        long[] single = new long[256];
        for (int number = 0; number < reader.RowGroupCount; number++)
        {
            using ParquetRowGroupReader group = reader.OpenRowGroupReader(number);
            int rows = (int)group.RowCount;
            int[] orders = new int[rows];
            int[] symbols = new int[rows];
            long[] counts = new long[rows];
            await group.ReadAsync<int>(fields[2], orders.AsMemory(), null, TestContext.Current.CancellationToken);
            await group.ReadAsync<int>(fields[4], symbols.AsMemory(), null, TestContext.Current.CancellationToken);
            await group.ReadAsync<long>(fields[5], counts.AsMemory(), null, TestContext.Current.CancellationToken);
            for (int row = 0; row < rows; row++)
            {
                byOrder[orders[row]] += counts[row];
                if (orders[row] == 0) single[symbols[row]] += counts[row];
            }
        }
        Assert.Equal([bytes.Length, bytes.Length - 1, bytes.Length - 2], byOrder);
        long[] expected = new long[256];
        foreach (byte symbol in bytes) expected[symbol]++;
        Assert.Equal(expected, single);
    }

    [Fact]
    public void The_ledger_says_what_became_of_each_source_and_is_whole()
    {
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(20, seed: 1));
        folder.Write("depot/empty", []);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "depot", "--out", "run").ExitCode);
        using var ledger = new SqliteConnection($"Data Source={folder.At("run", "ledger.sqlite")};Mode=ReadOnly;Pooling=False");
        ledger.Open();
        Assert.Equal("ok", One(ledger, "PRAGMA integrity_check"));
        Assert.Equal("a.log=profiled,empty=profiled", One(ledger, "SELECT group_concat(name || '=' || state) FROM (SELECT * FROM source ORDER BY id)"));
    }

    [Fact]
    public void Digests_are_left_out_when_they_are_not_wanted()
    {
        using var folder = new FreshFolder();
        byte[] bytes = TestData.Log(20, seed: 1);
        folder.Write("a.log", bytes);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.log", "--out", "with").ExitCode);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.log", "--out", "without", "--no-digest").ExitCode);
        Assert.Equal(Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(bytes)), (string)RunRecordFile.In(folder.At("with")).Source("a.log")["sha256"]!);
        Assert.Null(RunRecordFile.In(folder.At("without")).Source("a.log")["sha256"]);
    }

    [Fact]
    public void Limits_radices_and_views_asked_for_stand_in_the_record()
    {
        using var folder = new FreshFolder();
        folder.Write("a.bin", TestData.Skewed(10_000, seed: 5));
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "a.bin", "--out", "run", "--view", "nibbles,bytes", "--length-limit", "15,9", "--radix", "16,3").ExitCode);
        JsonArray views = RunRecordFile.In(folder.At("run")).Source("a.bin")["views"]!.AsArray();
        Assert.Equal(["nibbles", "bytes"], views.Select(view => (string)view!["view"]!));
        JsonArray codes = views[1]!["codes"]!.AsArray();
        Assert.Equal([9, 15], codes.Where(code => (string)code!["code"]! == "huffman-limited").Select(code => (int)code!["lengthLimit"]!));
        Assert.Equal([2, 3, 16], codes.Where(code => (string)code!["code"]! == "huffman").Select(code => (int)code!["radix"]!));
    }

    private static byte[] Packed(byte[] bytes)
    {
        using var packed = new MemoryStream();
        using (var gzip = new GZipStream(packed, CompressionLevel.Optimal)) gzip.Write(bytes);
        return packed.ToArray();
    }

    private static string One(SqliteConnection ledger, string query)
    {
        using SqliteCommand command = ledger.CreateCommand();
#pragma warning disable CA2100 // A constant of this class.
        command.CommandText = query;
#pragma warning restore CA2100
        return (string)command.ExecuteScalar()!;
    }
}
