namespace Tallybound.Profiling.Segments;

/// <summary>Order-0 counts along a source, segment after segment: all that the figures of this room are made of.</summary>
public readonly ref struct SegmentCounts
{
    /// <summary>Largest alphabet: symbols of at most one byte.</summary>
    public const int LargestAlphabet = 256;

    /// <summary>Counts of whole segments.</summary>
    /// <param name="counts">Segment after segment, <paramref name="alphabetSize"/> counts each; not copied.</param>
    /// <param name="alphabetSize">A, 1 to 256.</param>
    /// <param name="segmentBytes">Bytes of a segment; the last one may be shorter.</param>
    /// <exception cref="ArgumentException">The counts are not whole segments.</exception>
    public SegmentCounts(ReadOnlySpan<long> counts, int alphabetSize, long segmentBytes)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(alphabetSize, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(alphabetSize, LargestAlphabet);
        ArgumentOutOfRangeException.ThrowIfLessThan(segmentBytes, 1);
        if (counts.Length % alphabetSize != 0) throw new ArgumentException($"{counts.Length} counts are no whole segments of {alphabetSize} symbols.", nameof(counts));
        All = counts;
        AlphabetSize = alphabetSize;
        SegmentBytes = segmentBytes;
    }

    /// <summary>Segments; 0 for a source without symbols.</summary>
    public int Segments => All.Length / AlphabetSize;

    /// <summary>A.</summary>
    public int AlphabetSize { get; }

    /// <summary>Bytes of a segment; the last one may be shorter.</summary>
    public long SegmentBytes { get; }

    /// <summary>All counts, segment after segment.</summary>
    public ReadOnlySpan<long> All { get; }

    /// <summary>The counts of one segment, by symbol.</summary>
    public ReadOnlySpan<long> this[int segment] => All.Slice(segment * AlphabetSize, AlphabetSize);

    /// <summary>Writes the counts of the whole source, by symbol.</summary>
    /// <param name="whole">Room for A counts.</param>
    public void Sum(Span<long> whole)
    {
        whole.Clear();
        for (int segment = 0; segment < Segments; segment++) AddTo(whole, this[segment]);
    }

    /// <summary>Adds counts symbol by symbol.</summary>
    internal static void AddTo(Span<long> sum, ReadOnlySpan<long> counts)
    {
        for (int symbol = 0; symbol < counts.Length; symbol++) sum[symbol] += counts[symbol];
    }
}
