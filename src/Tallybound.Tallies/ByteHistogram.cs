using System.Runtime.CompilerServices;

namespace Tallybound.Tallies;

/// <summary>Counts bytes: the order-0 kernel.</summary>
public static class ByteHistogram
{
    private const int Lanes = 8;

    /// <summary>Adds the bytes to 256 counts.</summary>
    /// <exception cref="ArgumentException">There is not room for 256 counts.</exception>
    public static void Add(ReadOnlySpan<byte> source, Span<long> counts)
    {
        if (counts.Length < 256) throw new ArgumentException($"There is room for {counts.Length} counts; bytes need 256.", nameof(counts));
        if (source.Length < 256) AddScalar(source, counts);
        else AddInLanes(source, counts);
    }

    internal static void AddScalar(ReadOnlySpan<byte> source, Span<long> counts)
    {
        foreach (byte symbol in source) counts[symbol]++;
    }

    /// <summary>Eight tables, so that neighbours of one value do not wait on each other's store; runs of one value are stepped over.</summary>
    /// <remarks>A lane is 32 bits wide and cannot overflow: a span is shorter than 2^31.</remarks>
    [SkipLocalsInit]
    internal static unsafe void AddInLanes(ReadOnlySpan<byte> source, Span<long> counts)
    {
        uint* lanes = stackalloc uint[Lanes * 256];
        new Span<uint>(lanes, Lanes * 256).Clear();
        fixed (byte* start = source)
        {
            byte* at = start, end = start + source.Length;
            while (end - at >= 64)
            {
                ulong first = Unsafe.ReadUnaligned<ulong>(at);
                if (first == ulong.RotateLeft(first, 8) && *at == at[63])
                {
                    int run = new ReadOnlySpan<byte>(at, (int)(end - at)).IndexOfAnyExcept(*at);
                    run = run < 0 ? (int)(end - at) : run;
                    counts[*at] += run;
                    at += run;
                    continue;
                }
                byte* stop = at + 64;
                for (; at < stop; at += 16)
                {
                    lanes[at[0]]++;
                    (lanes + 256)[at[1]]++;
                    (lanes + 512)[at[2]]++;
                    (lanes + 768)[at[3]]++;
                    (lanes + 1024)[at[4]]++;
                    (lanes + 1280)[at[5]]++;
                    (lanes + 1536)[at[6]]++;
                    (lanes + 1792)[at[7]]++;
                    lanes[at[8]]++;
                    (lanes + 256)[at[9]]++;
                    (lanes + 512)[at[10]]++;
                    (lanes + 768)[at[11]]++;
                    (lanes + 1024)[at[12]]++;
                    (lanes + 1280)[at[13]]++;
                    (lanes + 1536)[at[14]]++;
                    (lanes + 1792)[at[15]]++;
                }
            }
            AddScalar(new ReadOnlySpan<byte>(at, (int)(end - at)), counts);
        }
        for (int symbol = 0; symbol < 256; symbol++)
        {
            long sum = 0;
            for (int lane = 0; lane < Lanes; lane++) sum += lanes[(lane * 256) + symbol];
            counts[symbol] += sum;
        }
    }
}
