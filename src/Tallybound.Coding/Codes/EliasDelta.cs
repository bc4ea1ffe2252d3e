using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>Elias δ: the binary length of a positive integer in Elias γ, then its bits without the leading one (P. Elias, Universal codeword sets and representations of the integers, IEEE Trans. IT 21, 1975).</summary>
public static class EliasDelta
{
    /// <summary>Bits of the word for <paramref name="value"/>.</summary>
    /// <param name="value">1 or more.</param>
    /// <exception cref="ArgumentOutOfRangeException">The value is below 1.</exception>
    public static int Length(long value)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        int suffixBits = BitOperations.Log2((ulong)value);
        return suffixBits + (2 * BitOperations.Log2((uint)suffixBits + 1)) + 1;
    }

    /// <summary>Writes the word for <paramref name="value"/>, its first bit as the most significant.</summary>
    /// <param name="value">1 or more.</param>
    /// <param name="sink">Takes <see cref="Length"/> bits; one that packs the most significant bit first can be read back by <see cref="Decode"/>.</param>
    public static void Encode<TSink>(long value, ref TSink sink)
        where TSink : IBitSink
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        int suffixBits = BitOperations.Log2((ulong)value);
        int zeros = BitOperations.Log2((uint)suffixBits + 1);
        sink.Write((uint)suffixBits + 1, (2 * zeros) + 1);
        sink.Write((ulong)value & ((1UL << suffixBits) - 1), suffixBits);
    }

    /// <summary>Reads one word.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or the number does not fit a long.</exception>
    public static long Decode(ref BitReader reader)
    {
        int zeros = 0;
        while (reader.Read(1) == 0) zeros++;
        if (zeros > 5) throw new InvalidDataException($"An Elias delta word starts with {zeros} zeros; a number below 2^63 has at most 5.");
        int suffixBits = (int)((1UL << zeros) | reader.Read(zeros)) - 1;
        if (suffixBits > 62) throw new InvalidDataException($"An Elias delta word has {suffixBits + 1} bits; a long has 63.");
        return (long)((1UL << suffixBits) | reader.Read(suffixBits));
    }
}
