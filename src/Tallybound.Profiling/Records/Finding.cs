namespace Tallybound.Profiling.Records;

/// <summary>One claim that the figures carry: what to do, what it saves, against what, and when it would not hold.</summary>
/// <remarks>In a source's record it speaks of that source's first view; in the corpus list of all sources in which its rule fires.</remarks>
public sealed record Finding
{
    /// <summary>Name of the rule, such as <c>integer-lengths-lose</c>; unique in a list.</summary>
    public required string Id { get; init; }

    /// <summary>The claim in one sentence, with the size at stake where there is one.</summary>
    public required string Claim { get; init; }

    /// <summary>Whole bytes that following the claim saves against <see cref="Against"/>, tables and framing charged; 0 where the claim is that nothing is lost.</summary>
    public required long BytesAtStake { get; init; }

    /// <summary>95 % interval of <see cref="BytesAtStake"/> where that is an estimate.</summary>
    public long[]? BytesAtStakeInterval { get; init; }

    /// <summary>What the bytes are saved against, such as "one Huffman table for the whole source".</summary>
    public required string Against { get; init; }

    /// <summary>The figures behind the claim, in reading order; at least one.</summary>
    public required IReadOnlyList<FindingEvidence> Evidence { get; init; }

    /// <summary>When the claim would not hold, in one sentence.</summary>
    public required string HoldsUnless { get; init; }

    /// <summary>Ids of findings on the same bytes: the saving of one must not be added to that of the other. Null: none.</summary>
    public IReadOnlyList<string>? Excludes { get; init; }

    /// <summary>In a corpus list: sources in which the rule fires. Null in a source's own list.</summary>
    public long? Sources { get; init; }

    /// <summary>In a corpus list: the source with the most bytes at stake. Null in a source's own list, and where the claim is of the corpus itself.</summary>
    public string? HeaviestSource { get; init; }
}

/// <summary>One figure behind a claim.</summary>
/// <param name="Figure">What it is, in words.</param>
/// <param name="Value">The number.</param>
/// <param name="Unit">Its unit, such as <c>bit/symbol</c>, <c>bytes</c>, <c>%</c>.</param>
public sealed record FindingEvidence(string Figure, double Value, string Unit);
