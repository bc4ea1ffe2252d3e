using System.Buffers.Binary;
using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.Intrinsics.X86;

namespace Tallybound.Tallies.Kernels;

/// <summary>Counts byte triples into two tables: those whose first byte stands at a multiple of 3 in the source, and the rest.</summary>
/// <remarks>Triples of the first table are the non-overlapping blocks of 3; both tables together are order 2.</remarks>
internal static unsafe class TripleKernel
{
    private const int Step = 6;
    private const int PrefetchAhead = 48;

    /// <summary>The plain walk that every other path is held against.</summary>
    /// <param name="first">First byte of the first triple; <paramref name="triples"/> + 2 bytes can be read.</param>
    /// <param name="triples">How many triples begin here, one a byte.</param>
    /// <param name="phase">Place of the first triple's first byte in the source, modulo 3.</param>
    /// <param name="blocks">Table of the triples at phase 0.</param>
    /// <param name="rest">Table of the others.</param>
    public static void CountScalar(byte* first, nint triples, int phase, uint* blocks, uint* rest)
    {
        for (nint i = 0; i < triples; i++)
        {
            uint key = ((uint)first[i] << 16) | ((uint)first[i + 1] << 8) | first[i + 2];
            if (phase == 0) blocks[key]++;
            else rest[key]++;
            phase = phase == 2 ? 0 : phase + 1;
        }
    }

    /// <summary>Six triples a 64-bit load, runs of one value in one step, and look-ahead where the keys jump about.</summary>
    public static void CountInSixes(byte* first, nint triples, int phase, uint* blocks, uint* rest)
    {
        if (phase != 0)
        {
            nint head = Math.Min(triples, 3 - phase);
            CountScalar(first, head, phase, blocks, rest);
            first += head;
            triples -= head;
        }
        nint sixes = triples / Step * Step;
        if (sixes > 0)
        {
            if (Sse.IsSupported && LooksRandom(first, sixes)) CountAhead(first, sixes, blocks, rest);
            else CountSixes(first, sixes, blocks, rest);
        }
        CountScalar(first + sixes, triples - sixes, 0, blocks, rest);
    }

    private static void CountSixes(byte* first, nint triples, uint* blocks, uint* rest)
    {
        byte* end = first + triples;
        while (first < end)
        {
            ulong eight = Load(first);
            if (eight == BitOperations.RotateLeft(eight, 8))
            {
                first += CountRun(first, end, blocks, rest);
                continue;
            }
            CountSix(eight, blocks, rest);
            first += Step;
        }
    }

    private static void CountAhead(byte* first, nint triples, uint* blocks, uint* rest)
    {
        byte* end = first + triples;
        byte* lastAhead = end - PrefetchAhead - Step;
        while (first < end)
        {
            ulong eight = Load(first);
            if (eight == BitOperations.RotateLeft(eight, 8))
            {
                first += CountRun(first, end, blocks, rest);
                continue;
            }
            if (first < lastAhead)
            {
                ulong ahead = Load(first + PrefetchAhead);
                Sse.Prefetch0(blocks + (uint)(ahead >> 40));
                Sse.Prefetch0(rest + ((uint)(ahead >> 32) & 0xFFFFFF));
                Sse.Prefetch0(rest + ((uint)(ahead >> 24) & 0xFFFFFF));
                Sse.Prefetch0(blocks + ((uint)(ahead >> 16) & 0xFFFFFF));
                Sse.Prefetch0(rest + ((uint)(ahead >> 8) & 0xFFFFFF));
                Sse.Prefetch0(rest + ((uint)ahead & 0xFFFFFF));
            }
            CountSix(eight, blocks, rest);
            first += Step;
        }
    }

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static ulong Load(byte* from) => BinaryPrimitives.ReverseEndianness(Unsafe.ReadUnaligned<ulong>(from));

    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static void CountSix(ulong eight, uint* blocks, uint* rest)
    {
        blocks[(uint)(eight >> 40)]++;
        rest[(uint)(eight >> 32) & 0xFFFFFF]++;
        rest[(uint)(eight >> 24) & 0xFFFFFF]++;
        blocks[(uint)(eight >> 16) & 0xFFFFFF]++;
        rest[(uint)(eight >> 8) & 0xFFFFFF]++;
        rest[(uint)eight & 0xFFFFFF]++;
    }

    /// <summary>Counts the triples of one value that begin here, in whole sixes; answers how many.</summary>
    private static nint CountRun(byte* first, byte* end, uint* blocks, uint* rest)
    {
        // Two bytes past the last triple can be read.
        var stretch = new ReadOnlySpan<byte>(first, (int)(end - first) + 2);
        int run = stretch.IndexOfAnyExcept(*first);
        run = run < 0 ? stretch.Length : run;
        nint triples = Math.Max(Step, (run - 2) / Step * Step);
        uint key = *first * 0x010101u;
        blocks[key] += (uint)(triples / 3);
        rest[key] += (uint)(triples / 3 * 2);
        return triples;
    }

    /// <summary>Whether a stretch has so many different bytes that its keys will miss the cache.</summary>
    private static bool LooksRandom(byte* first, nint triples)
    {
        if (triples < 1024) return false;
        ulong* seen = stackalloc ulong[4];
        for (int i = 0; i < 4; i++) seen[i] = 0;
        for (int i = 0; i < 256; i++) seen[first[i] >> 6] |= 1UL << (first[i] & 63);
        int distinct = BitOperations.PopCount(seen[0]) + BitOperations.PopCount(seen[1]) + BitOperations.PopCount(seen[2]) + BitOperations.PopCount(seen[3]);
        return distinct > 100;
    }
}
