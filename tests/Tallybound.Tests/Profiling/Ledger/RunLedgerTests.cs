using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Ledger;

public sealed class RunLedgerTests : IDisposable
{
    private readonly string root = Directory.CreateTempSubdirectory("tallybound-").FullName;

    public void Dispose() => Directory.Delete(root, recursive: true);

    private static SourceProfile Profile(string name, long bytes, string digest) => new()
    {
        Name = name,
        Kind = SourceProfileKind.File,
        Status = SourceStatus.Profiled,
        Bytes = bytes,
        Sha256 = digest,
        Views =
        [
            new ViewProfile
            {
                View = "bytes", AlphabetSize = 256, Symbols = bytes, SymbolsInUse = 3, SideBits = 0, RawBits = bytes * 8, StoredTotalBits = (bytes * 8) + 24,
                Orders = [], SymbolBlocks = [],
                Codes =
                [
                    new CodePrice { Code = "huffman", Radix = 2, BlockLength = 1, PayloadBits = bytes * 2, TableBits = 64, FramingBits = 0, TotalBits = (bytes * 2) + 64, BoundClass = "memoryless", Exact = true },
                ],
            },
        ],
    };

    private RunLedger Make(int sources) => RunLedger.Create(
        Path.Combine(root, "ledger.sqlite"),
        [new("digest", "00")],
        Enumerable.Range(0, sources).Select(id => new PlannedSource(id, $"depot/{id:d4}", SourceProfileKind.File, [1, 2], 10, DateTime.UnixEpoch)));

    [Fact]
    public void Records_come_back_in_the_plans_order_however_they_finished()
    {
        using RunLedger ledger = Make(1000);
        int[] order = [.. Enumerable.Range(0, 1000).OrderBy(id => (id * 7919) % 1000)];
        foreach (int id in order) ledger.Finish(id, Profile($"depot/{id:d4}", id, "aa"), null);
        Assert.Equal(Enumerable.Range(0, 1000), ledger.Records().Select(record => record.Id));
        Assert.Equal(Enumerable.Range(0, 1000).Select(id => (long?)id), ledger.Summaries().Select(line => line.Bytes));
        Assert.Empty(ledger.Unfinished());
        ledger.Settle();
        Assert.Equal(["ledger.sqlite"], Directory.GetFiles(root).Select(Path.GetFileName));
    }

    [Fact]
    public void Unfinished_sources_are_those_without_a_record()
    {
        using RunLedger ledger = Make(4);
        ledger.Finish(2, Profile("depot/0002", 5, "aa"), null);
        Assert.Equal([0, 1, 3], ledger.Unfinished());
    }

    [Fact]
    public void The_heaviest_come_first_and_equal_ones_by_name()
    {
        using RunLedger ledger = Make(4);
        long[] sizes = [5, 9, 5, 1];
        for (int id = 0; id < 4; id++) ledger.Finish(id, Profile($"depot/{id:d4}", sizes[id], "aa"), null);
        Assert.Equal(["depot/0001", "depot/0000", "depot/0002"], ledger.Heaviest(3).Select(line => line.Name));
        Assert.Equal([1, 0, 2], ledger.HeaviestIds(3));
    }

    [Fact]
    public void Sources_with_one_digest_are_found_as_duplicates()
    {
        using RunLedger ledger = Make(5);
        string[] digests = ["aa", "bb", "aa", "cc", "bb"];
        long[] sizes = [100, 300, 100, 50, 300];
        for (int id = 0; id < 5; id++) ledger.Finish(id, Profile($"depot/{id:d4}", sizes[id], digests[id]), null);
        IReadOnlyList<DuplicateSet> sets = ledger.Duplicates(10, 10);
        Assert.Equal(["bb", "aa"], sets.Select(set => set.Digest));
        Assert.Equal(["depot/0001", "depot/0004"], sets[0].Names);
    }

    [Fact]
    public void Drawing_counts_come_back_as_they_were_kept()
    {
        using RunLedger ledger = Make(1);
        var drawing = new DrawingCounts([new DrawingCountsOfView(SymbolSeries.FromDense([1, 2, 3]), SymbolSeries.FromPairs([[5, 2]]), new Dictionary<string, IReadOnlyList<long[]>> { ["7"] = [[1, 2]] })]);
        ledger.Finish(0, Profile("depot/0000", 6, "aa"), drawing);
        DrawingCountsOfView back = ledger.Drawing(0)!.Views[0];
        Assert.Equal([1L, 2, 3], back.SymbolCounts!.Dense!);
        Assert.Equal([[5L, 2]], back.CodeLengths!.Pairs!);
        Assert.Equal([1L, 2], back.PairCounts!["7"][0]);
    }

    [Fact]
    public void A_ledger_that_is_there_already_is_not_overwritten()
    {
        Make(1).Dispose();
        Assert.Throws<IOException>(() => Make(1));
    }
}
