namespace Tallybound.Profiling.Records;

/// <summary>The figures of one way of reading symbols out of a source.</summary>
public sealed record ViewProfile
{
    /// <summary>The view's name, such as <c>bytes</c> or <c>words-le</c>.</summary>
    public required string View { get; init; }

    /// <summary>Nominal alphabet size A.</summary>
    public required long AlphabetSize { get; init; }

    /// <summary>Symbols N.</summary>
    public required long Symbols { get; init; }

    /// <summary>Distinct symbols m.</summary>
    public required long SymbolsInUse { get; init; }

    /// <summary>Bits the inverse needs beside the symbols; 0 for views of plain bytes.</summary>
    public required long SideBits { get; init; }

    /// <summary>Bits of the symbols sent plain: N·⌈log2 A⌉ and the bytes outside the view.</summary>
    public required long RawBits { get; init; }

    /// <summary>Bits of the whole view as one stored table block, framing included; 0 when N = 0.</summary>
    public required long StoredTotalBits { get; init; }

    /// <summary>Order-k figures, order 0 first; an order that N cannot support, or that was not counted, is absent. Empty when N = 0.</summary>
    public required IReadOnlyList<OrderProfile> Orders { get; init; }

    /// <summary>Chi-square test of uniformity over the nominal alphabet; null when N = 0.</summary>
    public UniformityProfile? Uniformity { get; init; }

    /// <summary>What named codes cost on the whole source as one table block. Empty when N = 0.</summary>
    public required IReadOnlyList<CodePrice> Codes { get; init; }

    /// <summary>Length limits asked for that this source cannot meet. Null when all were met.</summary>
    public IReadOnlyList<LimitNotMet>? LimitsNotMet { get; init; }

    /// <summary>Symbols coded n at a time, n = 2 upwards. Empty when N = 0.</summary>
    public required IReadOnlyList<SymbolBlockProfile> SymbolBlocks { get; init; }

    /// <summary>Figures along the source; null when N = 0 or the view keeps no segments.</summary>
    public SegmentSeries? Segments { get; init; }

    /// <summary>The block-size curve, smallest block first; null when it was not computed.</summary>
    public IReadOnlyList<TableBlockPrice>? TableBlocks { get; init; }

    /// <summary>The best division found into stretches with a table of their own; null when it was not computed.</summary>
    public AdaptiveSplitProfile? AdaptiveSplit { get; init; }

    /// <summary>What general-purpose codecs make of the same bytes; null when none was run.</summary>
    public IReadOnlyList<RefereePrice>? Referee { get; init; }

    /// <summary>n(s), kept for the sources that have a page.</summary>
    public SymbolSeries? SymbolCounts { get; init; }

    /// <summary>Lengths of the free Huffman code in bits, kept for the sources that have a page.</summary>
    public SymbolSeries? CodeLengths { get; init; }

    /// <summary>n(c,s) of order 1: context in decimal → [symbol, count] pairs; kept for the ten heaviest sources.</summary>
    public IReadOnlyDictionary<string, IReadOnlyList<long[]>>? PairCounts { get; init; }
}

/// <summary>Pearson's chi-square statistic of the counts against equal probabilities over the nominal alphabet.</summary>
/// <param name="ChiSquare">Σ (n(s) − N/A)²/(N/A).</param>
/// <param name="DegreesOfFreedom">A − 1.</param>
/// <param name="UpperTailProbability">Probability of a statistic at least as large if the symbols were independent and uniform.</param>
public sealed record UniformityProfile(double ChiSquare, int DegreesOfFreedom, double UpperTailProbability);

/// <summary>A length limit that was asked for and cannot hold the symbols in use.</summary>
/// <param name="LengthLimit">The limit asked for, in bits.</param>
/// <param name="ShortestPossible">⌈log2 m⌉, the least limit that can.</param>
public sealed record LimitNotMet(int LengthLimit, int ShortestPossible);

/// <summary>What a general-purpose codec makes of a view's bytes, cut into blocks that are coded apart.</summary>
/// <param name="Codec">The codec's name, such as <c>zstandard</c>.</param>
/// <param name="Level">Its level.</param>
/// <param name="BlockBytes">Bytes of a block before coding; the last one may be shorter.</param>
/// <param name="Bytes">Bytes of all coded blocks.</param>
public sealed record RefereePrice(string Codec, int Level, long BlockBytes, long Bytes);
