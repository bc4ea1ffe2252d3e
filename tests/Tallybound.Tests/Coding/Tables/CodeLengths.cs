using CsCheck;
using Tallybound.Coding.Codes;

namespace Tallybound.Tests.Coding.Tables;

/// <summary>Counts and code lengths as sources of every kind would give them.</summary>
internal static class CodeLengths
{
    /// <summary>Counts from 1 to 2^40 with zeros among them, in alphabets up to 256, one symbol in use at least.</summary>
    public static readonly Gen<long[]> Counts = Gen.Select(Gen.Int[0, 45].SelectMany(width => Gen.Select(Gen.Int[0, width], Gen.Long[0, 1L << 40], (shift, n) => n >> shift)).Array[1, 256], Gen.Int[0, 255], Gen.Int[1, 4], (counts, used, every) =>
    {
        for (int i = 0; i < counts.Length; i++)
        {
            if (i % every != 0) counts[i] = 0;
        }
        if (counts.All(n => n == 0)) counts[used % counts.Length] = 7;
        return counts;
    });

    /// <summary>Lengths of the optimal code of such counts, none above 15.</summary>
    public static readonly Gen<byte[]> UpTo15 = Counts.Select(counts => Limited(counts, 15));

    /// <summary>Lengths of the optimal code of such counts, none above 11.</summary>
    public static readonly Gen<byte[]> UpTo11 = Counts.Select(counts => Limited(counts, 11));

    public static byte[] Limited(long[] counts, int limit)
    {
        byte[] lengths = new byte[counts.Length];
        return LengthLimited.TryLengths(counts, limit, lengths) ? lengths : throw new InvalidOperationException($"{counts.Length} symbols do not fit {limit} bits.");
    }

    public static byte[] Free(long[] counts)
    {
        byte[] lengths = new byte[counts.Length];
        Huffman.Lengths(counts, lengths);
        return lengths;
    }
}
