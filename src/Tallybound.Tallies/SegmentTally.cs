using System.Numerics;
using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>Order-0 counts of bytes along a source, one set a segment; the last segment may be shorter.</summary>
/// <remarks>When one segment too many would begin, neighbours are added pairwise and segments are twice as long from then on, so that a stream ends with the segments
/// that a source of known length would have had. Bytes may come in any order of pieces, and from several tallies that are merged.</remarks>
public sealed class SegmentTally
{
    private const int Alphabet = 256;
    private const int LongestShift = 62;

    /// <summary>Counts of this many segments take 128 MiB: no more is believed of a file before its checksum is known.</summary>
    private const int MostPossible = 1 << 16;
    private readonly int mostSegments;
    private long[] counts = new long[Alphabet];
    private int shift;
    private int used;

    /// <summary>An empty tally.</summary>
    /// <param name="segmentBytes">Starting size of a segment, a power of two.</param>
    /// <param name="mostSegments">Segments kept at most, an even number up to 65,536.</param>
    public SegmentTally(long segmentBytes, int mostSegments)
    {
        if (segmentBytes <= 0 || !BitOperations.IsPow2(segmentBytes)) throw new ArgumentException($"A segment of {segmentBytes} bytes was asked for; sizes are powers of two.", nameof(segmentBytes));
        if (mostSegments < 2 || mostSegments % 2 != 0) throw new ArgumentException($"{mostSegments} segments were allowed; the number is even.", nameof(mostSegments));
        ArgumentOutOfRangeException.ThrowIfGreaterThan(mostSegments, MostPossible);
        shift = BitOperations.TrailingZeroCount(segmentBytes);
        this.mostSegments = mostSegments;
    }

    /// <summary>Bytes of a segment now.</summary>
    public long SegmentBytes => 1L << shift;

    /// <summary>Segments so far.</summary>
    public int Count => used;

    /// <summary>n(s) of one segment, 256 counts.</summary>
    public ReadOnlySpan<long> Counts(int segment)
    {
        ArgumentOutOfRangeException.ThrowIfGreaterThanOrEqual(segment, used);
        return counts.AsSpan(segment * Alphabet, Alphabet);
    }

    /// <summary>n(s) of all segments, one after the other.</summary>
    public ReadOnlySpan<long> All => counts.AsSpan(0, used * Alphabet);

    /// <summary>Counts bytes that stand at <paramref name="offset"/> of the source.</summary>
    public void Append(long offset, ReadOnlySpan<byte> bytes)
    {
        while (!bytes.IsEmpty)
        {
            while (offset >> shift >= mostSegments) Pair();
            int segment = (int)(offset >> shift);
            int length = (int)Math.Min(bytes.Length, ((long)(segment + 1) << shift) - offset);
            Reach(segment + 1);
            ByteHistogram.Add(bytes[..length], counts.AsSpan(segment * Alphabet, Alphabet));
            offset += length;
            bytes = bytes[length..];
        }
    }

    /// <summary>Adds the counts of another part of the same source.</summary>
    /// <exception cref="ArgumentException">It allows another number of segments.</exception>
    public void Merge(SegmentTally other)
    {
        if (other.mostSegments != mostSegments) throw new ArgumentException($"A tally of at most {mostSegments} segments was to be merged with one of {other.mostSegments}.", nameof(other));
        while (shift < other.shift) Pair();
        int up = shift - other.shift;
        for (int segment = 0; segment < other.used; segment++)
        {
            int to = segment >> up;
            Reach(to + 1);
            Span<long> sum = counts.AsSpan(to * Alphabet, Alphabet);
            ReadOnlySpan<long> part = other.Counts(segment);
            for (int symbol = 0; symbol < Alphabet; symbol++) sum[symbol] += part[symbol];
        }
    }

    /// <summary>Writes the counts, versioned and with a checksum.</summary>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.Segments);
        writer.Write(shift);
        writer.Write(mostSegments);
        writer.Write(used);
        writer.WriteSparse(entry =>
        {
            for (int i = 0; i < used * Alphabet; i++)
                if (counts[i] > 0) entry(i, counts[i]);
        });
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is of another kind.</exception>
    public static SegmentTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.Segments);
        int shift = (int)reader.Read("segment size", LongestShift);
        int most = (int)reader.Read("greatest number of segments", MostPossible);
        if (most < 2 || most % 2 != 0) throw new InvalidDataException("The tally is damaged: its greatest number of segments is odd or 0.");
        var tally = new SegmentTally(1L << shift, most);
        int used = (int)reader.Read("number of segments", most);
        tally.Reach(used);
        reader.ReadSparse((long)used * Alphabet, (key, count) => tally.counts[key] = count);
        reader.Finish();
        return tally;
    }

    private void Reach(int segments)
    {
        if (segments <= used) return;
        if (counts.Length < segments * Alphabet) Array.Resize(ref counts, Math.Max(segments, Math.Min(2 * used, mostSegments)) * Alphabet);
        used = segments;
    }

    private void Pair()
    {
        int paired = (used + 1) / 2;
        for (int segment = 0; segment < paired; segment++)
        {
            Span<long> sum = counts.AsSpan(segment * Alphabet, Alphabet);
            counts.AsSpan(2 * segment * Alphabet, Alphabet).CopyTo(sum);
            if ((2 * segment) + 1 >= used) continue;
            ReadOnlySpan<long> right = counts.AsSpan(((2 * segment) + 1) * Alphabet, Alphabet);
            for (int symbol = 0; symbol < Alphabet; symbol++) sum[symbol] += right[symbol];
        }
        counts.AsSpan(paired * Alphabet, (used - paired) * Alphabet).Clear();
        used = paired;
        shift++;
    }
}
