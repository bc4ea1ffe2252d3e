using System.Globalization;
using Tallybound.Profiling.Records;

namespace Tallybound.Tests.Reports.Json;

/// <summary>Records that no run made: every member present or absent by chance, the same for the same seed.</summary>
internal sealed class GeneratedRecords(int seed)
{
    private static readonly string[] Parts = ["depot", "door", "unit 7", "größe", "温度", "\"quoted\"", "a\\b", "\u0001", "🚢", "100%25", "<b>&amp;"];
    private readonly Random random = new(seed);

    /// <summary>A record of a name that no other record of a document has.</summary>
    public SourceProfile Source(int number)
    {
        bool read = Chance(0.8);
        return new SourceProfile
        {
            Name = $"{Pick(Parts)}/{Pick(Parts)}-{number.ToString(CultureInfo.InvariantCulture)}",
            Kind = Pick(Enum.GetValues<SourceProfileKind>()),
            Status = read ? Pick([SourceStatus.Profiled, SourceStatus.Profiled, SourceStatus.Partial]) : Pick([SourceStatus.Failed, SourceStatus.Skipped]),
            Reason = read && Chance(0.5) ? null : "the " + Pick(Parts) + " was shut",
            Notes = Chance(0.2) ? ["a note", Pick(Parts)] : null,
            // Few sizes, so that many sources weigh the same.
            Bytes = read ? random.Next(0, 12) : null,
            CompressedBytes = Maybe(0.2),
            Sha256 = Chance(0.3) ? "00ff" : null,
            Sha256Pieces = Chance(0.2) ? "ff00" : null,
            Views = read ? Many(1, 3, View) : null,
            Findings = read && number % 3 == 0 ? [Finding("of-a-source"), Finding("another") with { BytesAtStakeInterval = null, Excludes = null }] : null,
        };
    }

    /// <summary>A finding with every member that a source's list has.</summary>
    public static Finding Finding(string id) => new()
    {
        Id = id, Claim = "A claim.", BytesAtStake = 7, BytesAtStakeInterval = [5, 9], Against = "nothing", Evidence = [new FindingEvidence("rate", 1.5, "bit/symbol")],
        HoldsUnless = "It is not so.", Excludes = ["another"],
    };

    /// <summary>Counts for the drawings of a source, for the views it has.</summary>
    public DrawingCounts Counts(SourceProfile profile) => new([.. profile.Views!.Select(_ => new DrawingCountsOfView(
        Chance(0.7) ? SymbolSeries.FromDense(Longs(4)) : null,
        Chance(0.7) ? SymbolSeries.FromPairs([[3, Long()], [70_000, Long()]]) : null,
        Chance(0.7) ? new Dictionary<string, IReadOnlyList<long[]>> { ["7"] = [[1, Long()], [2, Long()]], ["250"] = [[0, Long()]] } : null))]);

    /// <summary>The whole of a run.</summary>
    public CorpusProfile Corpus() => new()
    {
        Sources = Long(), Profiled = Long(), Partial = Long(), Failed = Long(), Skipped = Long(), ExcludedByRule = Long(), Empty = Long(), Bytes = Long(),
        Totals = new Dictionary<string, long> { ["raw"] = Long(), ["huffman"] = Long(), ["bestPerSource"] = Long() },
        Bounds = Chance(0.5) ? new CorpusBounds(Long(), Maybe(0.5), Maybe(0.5), Maybe(0.5)) : null,
        Verdict = Chance(0.5) ? new Verdict("huffman", Long(), Long(), "One sentence.") : null,
        Quantiles = Chance(0.5) ? new CorpusQuantiles(Real(), Real(), Real(), Real(), Real()) : null,
        Duplicates = Chance(0.5) ? [new DuplicateSet("00ff", Long(), 2, [Pick(Parts), "second"])] : null,
    };

    /// <summary>Provenance.</summary>
    public RunRecord Run() => new()
    {
        Complete = Chance(0.5), EndedBecause = Chance(0.5) ? "stopped by the user" : null, PlanDigest = "0a1b",
        StartedUtc = DateTime.UnixEpoch.AddTicks(random.NextInt64(1L << 59)), FinishedUtc = DateTime.UnixEpoch.AddTicks(random.NextInt64(1L << 59)),
        Machine = new MachineRecord("an operating system", "x64", 2, Long(), "a runtime"),
        Parameters = new RunParametersRecord
        {
            Inputs = ["depot", Pick(Parts)], Include = [], Exclude = ["**/*.gz"], Order = 2, BlockLength = 3, LengthLimit = [11, 12], Radix = [], View = ["bytes"], Segment = Maybe(0.5),
            Seed = Long(), Inside = Chance(0.5), InsideRatio = Long(), InsideSize = Long(), Digest = Chance(0.5), Threads = 2, DenseThreads = 1, Memory = Long(),
        },
    };

    private ViewProfile View() => new()
    {
        View = Pick(["bytes", "nibbles", "words-le"]), AlphabetSize = 1 << 17, Symbols = Long(), SymbolsInUse = Long(), SideBits = 0, RawBits = Long(), StoredTotalBits = Long(),
        Orders = Many(0, 3, Order), Codes = Many(0, 4, Code), SymbolBlocks = Many(0, 2, Block),
        Uniformity = Chance(0.5) ? new UniformityProfile(Real(), 255, Real()) : null,
        LimitsNotMet = Chance(0.2) ? [new LimitNotMet(5, 8)] : null,
        Segments = Chance(0.4) ? new SegmentSeries { SegmentBytes = 4096, OwnTableBits = Longs(3), SourceTableBits = Longs(3), PreviousTableBits = Longs(3), DivergenceBits = [Real(), 0, Real()] } : null,
        TableBlocks = Chance(0.4) ? Many(1, 3, Point) : null,
        AdaptiveSplit = Chance(0.3)
            ? new AdaptiveSplitProfile { Starts = [0, 4096], PayloadBits = Long(), TableBits = Long(), FramingBits = Long(), TotalBits = Long(), BestFixedBlockBytes = Long(), BestFixedTotalBits = Long() }
            : null,
    };

    private OrderProfile Order() => new()
    {
        Order = random.Next(3), EntropyBitsPerSymbol = Real(), EntropyBitsPerSymbolInterval = Chance(0.3) ? [Real(), Real()] : null, CorrectedBitsPerSymbol = -Real(),
        StandardErrorBits = MaybeReal(), AdaptiveBitsPerSymbol = MaybeReal(), AdaptiveAlphaExponent = Chance(0.5) ? 4 : null, HeldOutBitsPerSymbol = MaybeReal(), HeldOutEscapes = Maybe(0.5),
        ContextsInUse = Long(), ContextsSeenUnder8 = Long(), PairsInUse = Long(), ThinMass = Real(), Exact = Chance(0.5),
    };

    private CodePrice Code() => new()
    {
        Code = Pick(["huffman", "huffman-limited", "tans"]), Radix = 2, LengthLimit = Chance(0.5) ? 12 : null, BlockLength = 1, Parameter = Chance(0.5) ? 11 : null,
        PayloadBits = Maybe(0.9), TableBits = Maybe(0.9), FramingBits = Maybe(0.9), TotalBits = Maybe(0.9), BitsPerSymbol = MaybeReal(), PayloadDigits = Maybe(0.1), DigitsPerSymbol = MaybeReal(),
        Efficiency = MaybeReal(), RedundancyBitsPerSymbol = MaybeReal(), RedundancyBoundBitsPerSymbol = MaybeReal(), KraftSum = Chance(0.5) ? "1" : null, LongestCode = Chance(0.5) ? 9 : null,
        LimitCostBits = Maybe(0.3), SymbolsAtLimit = Chance(0.3) ? 3 : null, BreakEvenSymbols = Maybe(0.3), TableFormat = Chance(0.5) ? "flat" : null, BoundClass = "memoryless", Exact = Chance(0.5),
    };

    private SymbolBlockProfile Block() => new()
    {
        BlockLength = 2, Blocks = Long(), BlocksInUse = Long(), BlockEntropyBitsPerSymbol = Real(), Observed = new ObservedBlocks(Long(), Long(), Long(), Long()),
        Independent = Chance(0.5) ? new IndependentExtension { ExpectedBitsPerSymbol = Real(), TableBits = Maybe(0.5), ExpectedTotalBits = Maybe(0.5) } : null,
    };

    private TableBlockPrice Point() => new()
    {
        BlockBytes = Long(), Exact = Chance(0.5), PayloadBits = Long(), TableBits = Long(), FramingBits = Long(), TotalBits = Long(), TotalBitsInterval = Chance(0.5) ? [Long(), Long()] : null,
        TableFormat = Chance(0.5) ? "flat" : null, Kinds = Chance(0.5) ? new BlockKindCounts(Long(), Long(), Long(), Long()) : null, LossBits = Maybe(0.5),
    };

    private bool Chance(double probability) => random.NextDouble() < probability;

    private long Long() => random.NextInt64(1L << random.Next(1, 62));

    private long? Maybe(double probability) => Chance(probability) ? Long() : null;

    private double Real() => random.NextDouble() * 8;

    private double? MaybeReal() => Chance(0.5) ? Real() : null;

    private long[] Longs(int count) => [.. Many(count, count, Long)];

    private T Pick<T>(IReadOnlyList<T> from) => from[random.Next(from.Count)];

    private List<T> Many<T>(int least, int most, Func<T> make) => [.. Enumerable.Range(0, random.Next(least, most + 1)).Select(_ => make())];
}
