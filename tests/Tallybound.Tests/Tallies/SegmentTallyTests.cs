using CsCheck;
using Tallybound.Tallies;
using Tallybound.Tallies.Files;
using Xunit;

namespace Tallybound.Tests.Tallies;

public sealed class SegmentTallyTests
{
    private static long[][] Plain(byte[] bytes, long segment) =>
        [.. Enumerable.Range(0, (int)((bytes.Length + segment - 1) / segment)).Select(i =>
        {
            var counts = new long[256];
            foreach (byte each in bytes.AsSpan((int)(i * segment), (int)Math.Min(segment, bytes.Length - (i * segment)))) counts[each]++;
            return counts;
        })];

    [Fact]
    public void A_stream_ends_with_the_segments_that_a_known_length_would_have_had()
    {
        int cases = 0;
        Gen.Select(Gen.Byte.Array[0, 3000], Gen.Int[1, 400]).Sample(
            (bytes, step) =>
            {
                cases++;
                const int most = 8;
                var stream = new SegmentTally(16, most);
                for (int at = 0; at < bytes.Length; at += step) stream.Append(at, bytes.AsSpan(at, Math.Min(step, bytes.Length - at)));
                long segment = 16;
                while (bytes.Length > segment * most) segment *= 2;
                long[][] expected = Plain(bytes, segment);
                return stream.SegmentBytes == segment && stream.Count == expected.Length && Enumerable.Range(0, stream.Count).All(i => stream.Counts(i).SequenceEqual(expected[i]));
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
    }

    [Fact]
    public void Pieces_merge_in_any_order_and_lie_down()
    {
        int cases = 0;
        Gen.Select(Gen.Byte.Array[1, 3000], Gen.Int[0, 3000], Gen.Bool).Sample(
            (bytes, at, swap) =>
            {
                cases++;
                int cut = Math.Min(at, bytes.Length);
                var whole = new SegmentTally(16, 8);
                whole.Append(0, bytes);
                SegmentTally one = new(16, 8), two = new(16, 8);
                one.Append(0, bytes.AsSpan(0, cut));
                two.Append(cut, bytes.AsSpan(cut));
                if (swap) (one, two) = (two, one);
                one.Merge(two);
                using var stream = new MemoryStream();
                one.WriteTo(stream);
                stream.Position = 0;
                SegmentTally back = SegmentTally.ReadFrom(stream);
                return back.All.SequenceEqual(whole.All) && back.SegmentBytes == whole.SegmentBytes;
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
    }

    [Fact]
    public void A_file_that_asks_for_too_many_segments_is_refused_before_room_is_made()
    {
        Assert.Throws<ArgumentOutOfRangeException>(() => new SegmentTally(4096, 65_538));
        using var stream = new MemoryStream();
        using (var writer = new TallyWriter(stream, TallyKind.Segments))
        {
            writer.Write(12);
            writer.Write(1 << 20);
            writer.Write(1 << 20);
            writer.WriteSparse(_ => { });
        }
        stream.Position = 0;
        Assert.Contains("greatest number of segments", Assert.Throws<InvalidDataException>(() => SegmentTally.ReadFrom(stream)).Message, StringComparison.Ordinal);
    }
}
