using Tallybound.Profiling.Segments;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Finishing;

/// <summary>Order-0 counts of a source's segments in the symbols of one view.</summary>
/// <param name="Numbers">Counts, one segment after the other.</param>
/// <param name="AlphabetSize">Symbols of the view's alphabet, at most 256.</param>
/// <param name="SegmentBytes">Bytes of a segment.</param>
internal sealed record ViewSegments(long[] Numbers, int AlphabetSize, long SegmentBytes)
{
    /// <summary>As the pricing takes them.</summary>
    public SegmentCounts Counts => new(Numbers, AlphabetSize, SegmentBytes);

    /// <summary>The segments of a view; null for alphabets that are too large to keep a set of counts a segment.</summary>
    public static ViewSegments? Of(string view, SegmentTally segments) => view switch
    {
        Plan.ViewNames.Bytes => new ViewSegments(segments.All.ToArray(), 256, segments.SegmentBytes),
        Plan.ViewNames.Nibbles => Divided(segments, 4),
        Plan.ViewNames.Bits => Divided(segments, 1),
        _ => null,
    };

    /// <summary>A byte's symbols are the same wherever it stands, so the counts of parts follow from those of bytes.</summary>
    private static ViewSegments Divided(SegmentTally segments, int symbolBits)
    {
        int alphabet = 1 << symbolBits;
        var numbers = new long[segments.Count * alphabet];
        for (int segment = 0; segment < segments.Count; segment++)
        {
            ReadOnlySpan<long> bytes = segments.Counts(segment);
            Span<long> parts = numbers.AsSpan(segment * alphabet, alphabet);
            for (int symbol = 0; symbol < 256; symbol++)
                for (int shift = 0; shift < 8; shift += symbolBits) parts[(symbol >> shift) & (alphabet - 1)] += bytes[symbol];
        }
        return new ViewSegments(numbers, alphabet, segments.SegmentBytes);
    }
}

/// <summary>Gathers the order-0 counts of a tally.</summary>
internal sealed class SingleCounts(int alphabetSize) : IContextVisitor
{
    /// <summary>n(s) of each symbol of the alphabet.</summary>
    public long[] Counts { get; } = new long[alphabetSize];

    public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        for (int i = 0; i < symbols.Length; i++) Counts[symbols[i]] = fold0[i] + fold1[i];
    }
}
