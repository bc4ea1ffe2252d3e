using System.Runtime.CompilerServices;

namespace Tallybound.Tallies.Kernels;

/// <summary>Counts byte pairs, as 16-bit loads with the first byte in the low half.</summary>
internal static unsafe class PairKernel
{
    /// <summary>Counts <paramref name="pairs"/> pairs that stand side by side without overlap.</summary>
    /// <param name="first">First byte; 2 × pairs bytes can be read.</param>
    /// <param name="pairs">How many.</param>
    /// <param name="counts">65,536 counters.</param>
    public static void CountApart(byte* first, nint pairs, uint* counts)
    {
        byte* end = first + (pairs * 2);
        while (end - first >= 8)
        {
            ulong eight = Unsafe.ReadUnaligned<ulong>(first);
            ushort pair = (ushort)eight;
            if (eight == pair * 0x0001000100010001UL)
            {
                var stretch = new ReadOnlySpan<ushort>(first, (int)((end - first) / 2));
                int run = stretch.IndexOfAnyExcept(pair);
                run = run < 0 ? stretch.Length : run;
                counts[pair] += (uint)run;
                first += run * 2;
                continue;
            }
            counts[pair]++;
            counts[(ushort)(eight >> 16)]++;
            counts[(ushort)(eight >> 32)]++;
            counts[(ushort)(eight >> 48)]++;
            first += 8;
        }
        for (; first < end; first += 2) counts[Unsafe.ReadUnaligned<ushort>(first)]++;
    }

    /// <summary>Counts every pair of neighbours, overlapping, in two tables in turn.</summary>
    /// <param name="first">First byte; pairs + 1 bytes can be read.</param>
    /// <param name="pairs">How many pairs begin here.</param>
    /// <param name="even">65,536 counters.</param>
    /// <param name="odd">65,536 counters.</param>
    public static void CountNeighbours(byte* first, nint pairs, uint* even, uint* odd)
    {
        byte* end = first + pairs;
        while (end - first >= 8)
        {
            ulong eight = Unsafe.ReadUnaligned<ulong>(first);
            if (eight == ulong.RotateLeft(eight, 8))
            {
                var stretch = new ReadOnlySpan<byte>(first, (int)(end - first) + 1);
                int run = stretch.IndexOfAnyExcept(*first);
                run = (run < 0 ? stretch.Length : run) - 1;
                even[(ushort)eight] += (uint)run;
                first += run;
                continue;
            }
            // Loads at every byte: taking the pairs out of one word by shifts is slower.
            even[Unsafe.ReadUnaligned<ushort>(first)]++;
            odd[Unsafe.ReadUnaligned<ushort>(first + 1)]++;
            even[Unsafe.ReadUnaligned<ushort>(first + 2)]++;
            odd[Unsafe.ReadUnaligned<ushort>(first + 3)]++;
            even[Unsafe.ReadUnaligned<ushort>(first + 4)]++;
            odd[Unsafe.ReadUnaligned<ushort>(first + 5)]++;
            even[Unsafe.ReadUnaligned<ushort>(first + 6)]++;
            odd[Unsafe.ReadUnaligned<ushort>(first + 7)]++;
            first += 8;
        }
        for (; first < end; first++) even[Unsafe.ReadUnaligned<ushort>(first)]++;
    }
}
