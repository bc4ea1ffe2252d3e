namespace Tallybound.Profiling.Records;

/// <summary>The whole of a run: totals weighted by bytes, never a mean of ratios.</summary>
public sealed record CorpusProfile
{
    /// <summary>Records of all statuses.</summary>
    public required long Sources { get; init; }

    /// <summary>Sources read whole.</summary>
    public required long Profiled { get; init; }

    /// <summary>Sources read in part.</summary>
    public required long Partial { get; init; }

    /// <summary>Sources that could not be read.</summary>
    public required long Failed { get; init; }

    /// <summary>Sources left out by a rule, each with its reason.</summary>
    public required long Skipped { get; init; }

    /// <summary>Names kept out by <c>--include</c> and <c>--exclude</c>; they have no record of their own.</summary>
    public required long ExcludedByRule { get; init; }

    /// <summary>Sources of 0 bytes.</summary>
    public required long Empty { get; init; }

    /// <summary>Bytes counted over profiled and partial sources.</summary>
    public required long Bytes { get; init; }

    /// <summary>Bytes by code over each source's first view, table and framing included, a source taking the smaller of the code and
    /// a stored block; <c>raw</c> first, <c>bestPerSource</c> last. Codes that no source has are absent.</summary>
    public required IReadOnlyDictionary<string, long> Totals { get; init; }

    /// <summary>Entropy figures added up over each source's first view; null when nothing was read.</summary>
    public CorpusBounds? Bounds { get; init; }

    /// <summary>What the figures say in one sentence, with both sizes; null when nothing was read.</summary>
    public Verdict? Verdict { get; init; }

    /// <summary>Nearest-rank quantiles over sources of at least one byte; null when there are none.</summary>
    public CorpusQuantiles? Quantiles { get; init; }

    /// <summary>Sets of sources with equal digests, each at least two, ordered by bytes; at most 100 sets. Null when there are none.</summary>
    public IReadOnlyList<DuplicateSet>? Duplicates { get; init; }
}

/// <summary>The one code with the lowest total over the corpus, and both sizes.</summary>
/// <param name="Code">Key of <see cref="CorpusProfile.Totals"/> of the code; <c>raw</c> where no code wins.</param>
/// <param name="RawBytes">Bytes read.</param>
/// <param name="CodedBytes">Bytes under the code, tables and framing included.</param>
/// <param name="Sentence">The verdict in words.</param>
public sealed record Verdict(string Code, long RawBytes, long CodedBytes, string Sentence);

/// <summary>Nearest-rank quantiles over sources of Huffman total bits a byte, table and framing included.</summary>
public sealed record CorpusQuantiles(double P05, double P25, double P50, double P75, double P95)
{
    /// <summary>What the quantiles are of.</summary>
    public string Measure => "huffmanTotalBitsPerByte";
}

/// <summary>Sources that hold the same bytes.</summary>
/// <param name="Digest">Their digest.</param>
/// <param name="Bytes">Bytes of each.</param>
/// <param name="Count">How many there are.</param>
/// <param name="Names">Their names in ordinal order, at most 20.</param>
public sealed record DuplicateSet(string Digest, long Bytes, long Count, IReadOnlyList<string> Names);

/// <summary>Sums over sources of each one's entropy figures, every source's rounded to whole bits before it is added.</summary>
/// <param name="Order0BoundBits">Static order-0 bound of each source by itself: no coder with one fixed table and no memory goes below it. Models are left out.</param>
/// <param name="AdaptiveOrder0Bits">Adaptive cost of order 0: an upper figure that a real coder reaches, nothing left out.</param>
/// <param name="AdaptiveOrder1Bits">The same with one symbol of context; a source without that order adds its raw bits. Null when no source has it.</param>
/// <param name="AdaptiveOrder2Bits">The same with two symbols of context.</param>
public sealed record CorpusBounds(long Order0BoundBits, long? AdaptiveOrder0Bits, long? AdaptiveOrder1Bits, long? AdaptiveOrder2Bits);
