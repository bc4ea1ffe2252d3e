using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

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
    internal static void AddInLanes(ReadOnlySpan<byte> source, Span<long> counts)
    {
        Span<uint> lanes = stackalloc uint[Lanes * 256];
        lanes.Clear();
        ref uint table = ref MemoryMarshal.GetReference(lanes);
        ref byte at = ref MemoryMarshal.GetReference(source);
        int position = 0, end = source.Length - 64;
        while (position <= end)
        {
            ref byte from = ref Unsafe.Add(ref at, position);
            ulong first = Unsafe.ReadUnaligned<ulong>(ref from);
            if (first == ulong.RotateLeft(first, 8) && from == Unsafe.Add(ref from, 63))
            {
                int run = source[position..].IndexOfAnyExcept(from);
                run = run < 0 ? source.Length - position : run;
                counts[from] += run;
                position += run;
                continue;
            }
            for (int i = 0; i < 64; i += Lanes)
            {
                Unsafe.Add(ref table, Unsafe.Add(ref from, i))++;
                Unsafe.Add(ref table, 256 + Unsafe.Add(ref from, i + 1))++;
                Unsafe.Add(ref table, 512 + Unsafe.Add(ref from, i + 2))++;
                Unsafe.Add(ref table, 768 + Unsafe.Add(ref from, i + 3))++;
                Unsafe.Add(ref table, 1024 + Unsafe.Add(ref from, i + 4))++;
                Unsafe.Add(ref table, 1280 + Unsafe.Add(ref from, i + 5))++;
                Unsafe.Add(ref table, 1536 + Unsafe.Add(ref from, i + 6))++;
                Unsafe.Add(ref table, 1792 + Unsafe.Add(ref from, i + 7))++;
            }
            position += 64;
        }
        AddScalar(source[position..], counts);
        for (int symbol = 0; symbol < 256; symbol++)
        {
            long sum = 0;
            for (int lane = 0; lane < Lanes; lane++) sum += lanes[(lane * 256) + symbol];
            counts[symbol] += sum;
        }
    }
}
