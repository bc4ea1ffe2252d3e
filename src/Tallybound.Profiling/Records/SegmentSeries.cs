namespace Tallybound.Profiling.Records;

/// <summary>Figures along the source, one entry a segment, tables left out. Segments are the unit of statistics, not of tables.</summary>
public sealed record SegmentSeries
{
    /// <summary>Bytes of a segment, a power of two; the last one may be shorter.</summary>
    public required long SegmentBytes { get; init; }

    /// <summary>Payload bits of each segment under a Huffman code of its own.</summary>
    public required IReadOnlyList<long> OwnTableBits { get; init; }

    /// <summary>Payload bits of each segment under the source's Huffman code.</summary>
    public required IReadOnlyList<long> SourceTableBits { get; init; }

    /// <summary>Payload bits of each segment under the previous segment's code with an escape for symbols it lacks; the first entry is its own table's.</summary>
    public required IReadOnlyList<long> PreviousTableBits { get; init; }

    /// <summary>Jensen–Shannon divergence of each segment from the source, weights ½ and ½, in bits (0 to 1).</summary>
    public required IReadOnlyList<double> DivergenceBits { get; init; }
}

/// <summary>One point of the block-size curve: the source cut into table blocks of one size, each of its cheapest kind.</summary>
public sealed record TableBlockPrice
{
    /// <summary>Bytes of a table block; the last one may be shorter.</summary>
    public required long BlockBytes { get; init; }

    /// <summary>False when the size is an estimate from sample windows.</summary>
    public required bool Exact { get; init; }

    /// <summary>Bits of coded and stored symbols.</summary>
    public required long PayloadBits { get; init; }

    /// <summary>Bits of tables.</summary>
    public required long TableBits { get; init; }

    /// <summary>Bits of kinds, lengths and padding.</summary>
    public required long FramingBits { get; init; }

    /// <summary>Their sum.</summary>
    public required long TotalBits { get; init; }

    /// <summary>95 % interval of <see cref="TotalBits"/> where it is an estimate from at least 16 windows.</summary>
    public long[]? TotalBitsInterval { get; init; }

    /// <summary>The table format, one for all blocks, that made the whole cheapest; absent where no block carries a table.</summary>
    public string? TableFormat { get; init; }

    /// <summary>Blocks by kind, counted where the curve is exact.</summary>
    public BlockKindCounts? Kinds { get; init; }

    /// <summary>Bits above the cheapest exact point of the curve; 0 at that point. Absent where the point is an estimate.</summary>
    public long? LossBits { get; init; }
}

/// <summary>How many table blocks took each kind.</summary>
/// <param name="Stored">Symbols sent plain.</param>
/// <param name="OneSymbol">One symbol throughout, sent once.</param>
/// <param name="LastTable">Coded with the table sent last.</param>
/// <param name="OwnTable">Coded with a table of their own.</param>
public sealed record BlockKindCounts(long Stored, long OneSymbol, long LastTable, long OwnTable);

/// <summary>The best division found (not proved best) of the source into stretches, each with a new table or the last one.</summary>
public sealed record AdaptiveSplitProfile
{
    /// <summary>Byte offsets at which a stretch begins, 0 first: the change points.</summary>
    public required IReadOnlyList<long> Starts { get; init; }

    /// <summary>Bits of coded and stored symbols.</summary>
    public required long PayloadBits { get; init; }

    /// <summary>Bits of tables.</summary>
    public required long TableBits { get; init; }

    /// <summary>Bits of kinds, lengths and padding.</summary>
    public required long FramingBits { get; init; }

    /// <summary>Their sum.</summary>
    public required long TotalBits { get; init; }

    /// <summary>The table format, one for all stretches, that made the whole cheapest; absent where no stretch carries a table.</summary>
    public string? TableFormat { get; init; }

    /// <summary>Bytes of a block of the cheapest exact fixed size.</summary>
    public required long BestFixedBlockBytes { get; init; }

    /// <summary>Total bits of the cheapest exact fixed size.</summary>
    public required long BestFixedTotalBits { get; init; }
}
