using Tallybound.Coding.Codes;
using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

/// <summary>Records made by hand, sizes in bytes: a view of bytes whose stored block has 4 bytes of framing.</summary>
internal static class Made
{
    public static ViewProfile View(long bytes, params CodePrice[] codes) => new()
    {
        View = "bytes", AlphabetSize = 256, Symbols = bytes, SymbolsInUse = 200, SideBits = 0, RawBits = 8 * bytes, StoredTotalBits = 8 * (bytes + 4), Orders = [], Codes = codes, SymbolBlocks = [],
    };

    /// <summary>A binary code with 4 bytes of framing.</summary>
    public static CodePrice Code(string code, long payload, long table, int blockLength = 1) => new()
    {
        Code = code, Radix = 2, BlockLength = blockLength, PayloadBits = 8 * payload, TableBits = 8 * table, FramingBits = 32, TotalBits = 8 * (payload + table + 4), BoundClass = "memoryless", Exact = true,
    };

    public static OrderProfile Order(int order, double entropy, double? adaptive = null, double? heldOut = null) => new()
    {
        Order = order, EntropyBitsPerSymbol = entropy, CorrectedBitsPerSymbol = entropy, AdaptiveBitsPerSymbol = adaptive, HeldOutBitsPerSymbol = heldOut,
        ContextsInUse = 1, ContextsSeenUnder8 = 0, PairsInUse = 1, ThinMass = 0, Exact = true,
    };

    public static TableBlockPrice Point(long blockBytes, long payload, long table, long framing) => new()
    {
        BlockBytes = blockBytes, Exact = true, PayloadBits = 8 * payload, TableBits = 8 * table, FramingBits = 8 * framing, TotalBits = 8 * (payload + table + framing),
        Kinds = new BlockKindCounts(0, 0, 0, 1),
    };

    /// <summary>Huffman with what the record tells of the commonest symbol's share.</summary>
    public static CodePrice Huffman(long payload, long table, double? topShare = null, int longest = 12) =>
        Code("huffman", payload, table) with { RedundancyBoundBitsPerSymbol = topShare + RedundancyBound.Sigma, LongestCode = longest };

    /// <summary>Huffman under a length limit.</summary>
    public static CodePrice Limited(int limit, long payload, long table, long costBits) =>
        Code("huffman-limited", payload, table) with { LengthLimit = limit, LimitCostBits = costBits, LongestCode = limit, SymbolsAtLimit = 2 };

    /// <summary>The whole of a run of as many sources.</summary>
    public static CorpusProfile Corpus(long sources, long raw = 1000, long best = 1000) => new()
    {
        Sources = sources, Profiled = sources, Partial = 0, Failed = 0, Skipped = 0, ExcludedByRule = 0, Empty = 0, Bytes = raw,
        Totals = new Dictionary<string, long> { ["raw"] = raw, ["bestPerSource"] = best }, Verdict = new Verdict("raw", raw, raw, "One sentence."),
    };

    public static SourceProfile Source(string name, params ViewProfile[] views) => new()
    {
        Name = name, Kind = SourceProfileKind.File, Status = SourceStatus.Profiled, Bytes = views[0].RawBits / 8, Views = views,
    };

    public static SourceProfile Judged(string name, params ViewProfile[] views)
    {
        SourceProfile source = Source(name, views);
        return source with { Findings = FindingRules.Of(source) };
    }

    /// <summary>What a rule says of a source with these views.</summary>
    public static Finding? Judge(IFindingRule rule, params ViewProfile[] views) => rule.Judge(Source("unit", views), views[0]);

    /// <summary>The figures of a finding by name.</summary>
    public static double Figure(Finding finding, string figure) => Assert.Single(finding.Evidence, each => each.Figure == figure).Value;
}
