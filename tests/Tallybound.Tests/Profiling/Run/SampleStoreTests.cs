using CsCheck;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Run;
using Xunit;

namespace Tallybound.Tests.Profiling.Run;

public sealed class SampleStoreTests
{
    private const int Window = SamplePlan.WindowBytes;

    /// <summary>Bytes of a source, computed from their place so that no large array is needed.</summary>
    private static byte[] Piece(long offset, int length)
    {
        var bytes = new byte[length];
        for (int i = 0; i < length; i++) bytes[i] = (byte)(((offset + i) >> 20) + (offset + i));
        return bytes;
    }

    private static SampleStore Read(long total, long? known, int step, long seed)
    {
        var store = new SampleStore(new SamplePlan(seed), known);
        for (long offset = 0; offset < total; offset += step) store.Offer(offset, Piece(offset, (int)Math.Min(step, total - offset)));
        return store;
    }

    [Fact]
    public void A_stream_keeps_the_windows_that_a_known_length_would_have_chosen()
    {
        const long total = (90L * Window) + 12345;
        IReadOnlyList<byte[]> known = Read(total, total, Window, 7).Windows();
        IReadOnlyList<byte[]> stream = Read(total, null, 700_001, 7).Windows();
        Assert.Equal(SamplePlan.MostWindows, known.Count);
        Assert.Equal(known.Count, stream.Count);
        for (int i = 0; i < known.Count; i++) Assert.True(known[i].AsSpan().SequenceEqual(stream[i]));
    }

    [Fact]
    public void Another_seed_takes_other_windows()
    {
        long[] one = new SamplePlan(1).Choose(1000L * Window);
        long[] two = new SamplePlan(2).Choose(1000L * Window);
        Assert.Equal(64, one.Length);
        Assert.True(one.Intersect(two).Count() < 32);
    }

    [Fact]
    public void A_short_source_gives_each_of_its_whole_windows_once()
    {
        int cases = 0;
        Gen.Int[0, 5 * Window].Sample(
            bytes =>
            {
                cases++;
                return new SamplePlan(1).Choose(bytes).SequenceEqual(Enumerable.Range(0, bytes / Window).Select(i => (long)i));
            },
            iter: 50, threads: 1);
        Assert.Equal(50, cases);
    }
}
