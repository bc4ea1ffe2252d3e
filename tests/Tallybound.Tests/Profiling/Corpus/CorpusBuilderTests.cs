using Tallybound.Profiling.Corpus;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Corpus;

public sealed class CorpusBuilderTests : IDisposable
{
    private readonly string root = Directory.CreateTempSubdirectory("tallybound-").FullName;

    public void Dispose() => Directory.Delete(root, recursive: true);

    private static CodePrice Code(string name, long bytes, int? limit = null) => new()
    {
        Code = name, Radix = 2, LengthLimit = limit, BlockLength = 1, PayloadBits = bytes * 8, TableBits = 0, FramingBits = 0, TotalBits = bytes * 8, BoundClass = "memoryless", Exact = true,
    };

    private static SourceProfile Source(string name, long bytes, long stored, params CodePrice[] codes) => new()
    {
        Name = name, Kind = SourceProfileKind.File, Status = SourceStatus.Profiled, Bytes = bytes,
        Views = [new ViewProfile { View = "bytes", AlphabetSize = 256, Symbols = bytes, SymbolsInUse = 2, SideBits = 0, RawBits = bytes * 8, StoredTotalBits = stored * 8, Orders = [], Codes = codes, SymbolBlocks = [] }],
    };

    private CorpusProfile RollUp(params SourceProfile[] sources)
    {
        using RunLedger ledger = RunLedger.Create(Path.Combine(root, Guid.NewGuid() + ".sqlite"), [], []);
        var builder = new CorpusBuilder();
        foreach (SourceProfile source in sources) builder.Add(source);
        return builder.Finish(ledger, 0);
    }

    [Fact]
    public void A_source_takes_the_smaller_of_the_code_and_stored()
    {
        CorpusProfile corpus = RollUp(
            Source("a", 1000, 1003, Code("huffman", 500), Code("tans", 480)),
            Source("b", 100, 103, Code("huffman", 140)));
        Assert.Equal(1100, corpus.Totals["raw"]);
        Assert.Equal(500 + 103, corpus.Totals["huffman"]);
        Assert.Equal(480 + 103, corpus.Totals["tans"]);
        Assert.Equal(480 + 103, corpus.Totals["bestPerSource"]);
        Assert.Equal("tans", corpus.Verdict!.Code);
        Assert.Equal(583, corpus.Verdict.CodedBytes);
    }

    [Fact]
    public void The_total_is_weighted_by_bytes_where_a_mean_of_ratios_would_mislead()
    {
        // Two files, 10× of 1 kB and 1.11× of 1 MB: the mean of ratios says 5.56, the truth is 1.11 (arithmetic).
        CorpusProfile corpus = RollUp(Source("a", 1000, 1003, Code("huffman", 100)), Source("b", 1_000_000, 1_000_004, Code("huffman", 900_000)));
        Assert.Equal("1.11×", Tallybound.Profiling.Wording.SizeText.Ratio(corpus.Verdict!.RawBytes, corpus.Verdict.CodedBytes));
    }

    [Fact]
    public void Nothing_read_gives_no_verdict()
    {
        CorpusProfile corpus = RollUp(new SourceProfile { Name = "x", Kind = SourceProfileKind.File, Status = SourceStatus.Failed, Reason = "permission denied" });
        Assert.Null(corpus.Verdict);
        Assert.Equal(1, corpus.Failed);
        Assert.Null(corpus.Quantiles);
    }

    [Fact]
    public void Data_that_no_code_shrinks_is_called_best_stored()
    {
        CorpusProfile corpus = RollUp(Source("key", 1000, 1003, Code("huffman", 1040)));
        Assert.Equal("raw", corpus.Verdict!.Code);
        Assert.Equal(corpus.Verdict.RawBytes, corpus.Verdict.CodedBytes);
    }

    [Fact]
    public void Quantiles_are_of_nearest_rank()
    {
        SourceProfile[] sources = [.. Enumerable.Range(1, 20).Select(i => Source($"s{i:d2}", 1000, 1003, Code("huffman", i * 10)))];
        CorpusQuantiles quantiles = RollUp(sources).Quantiles!;
        Assert.Equal([0.08, 0.40, 0.80, 1.20, 1.52], [quantiles.P05, quantiles.P25, quantiles.P50, quantiles.P75, quantiles.P95]);
    }
}
