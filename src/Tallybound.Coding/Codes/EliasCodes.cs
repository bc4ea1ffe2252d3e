using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>Elias γ: the length in unary, then the number in binary. P. Elias, Universal codeword sets and representations of the integers, IEEE Trans. IT-21 (1975).</summary>
public static class EliasGamma
{
    /// <summary>Bits of a number's word.</summary>
    /// <param name="value">At least 1.</param>
    public static int Length(long value)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        return (2 * BitOperations.Log2((ulong)value)) + 1;
    }

    /// <summary>Writes a number's word; parameter as for <see cref="Length"/>.</summary>
    public static void Encode<TSink>(long value, ref TSink sink)
        where TSink : IBitSink
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        int bits = BitOperations.Log2((ulong)value);
        sink.Write(0, bits);
        sink.Write((ulong)value, bits + 1);
    }

    /// <summary>Reads a number.</summary>
    /// <exception cref="InvalidDataException">The bits end early or stand for no number of 63 bits.</exception>
    public static long Decode(ref BitReader reader)
    {
        int bits = 0;
        while (reader.Read(1) == 0)
            if (++bits > 62) throw new InvalidDataException("The bits stand for a number of more than 63 bits.");
        return (1L << bits) | (long)reader.Read(bits);
    }
}

/// <summary>Elias ω: the number in binary, before it its length in binary, and so on down to one. P. Elias 1975, as <see cref="EliasGamma"/>.</summary>
public static class EliasOmega
{
    /// <summary>Bits of a number's word.</summary>
    /// <param name="value">At least 1.</param>
    public static int Length(long value)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        int bits = 1;
        for (long left = value; left > 1; left = BitOperations.Log2((ulong)left)) bits += BitOperations.Log2((ulong)left) + 1;
        return bits;
    }

    /// <summary>Writes a number's word; parameter as for <see cref="Length"/>.</summary>
    public static void Encode<TSink>(long value, ref TSink sink)
        where TSink : IBitSink
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(value, 1);
        Span<long> groups = stackalloc long[8];
        int used = 0;
        for (long left = value; left > 1; left = BitOperations.Log2((ulong)left)) groups[used++] = left;
        while (used > 0)
        {
            long group = groups[--used];
            sink.Write((ulong)group, BitOperations.Log2((ulong)group) + 1);
        }
        sink.Write(0, 1);
    }

    /// <summary>Reads a number.</summary>
    /// <exception cref="InvalidDataException">The bits end early or stand for no number of 63 bits.</exception>
    public static long Decode(ref BitReader reader)
    {
        long value = 1;
        while (reader.Read(1) == 1)
        {
            if (value > 62) throw new InvalidDataException("The bits stand for a number of more than 63 bits.");
            value = (1L << (int)value) | (long)reader.Read((int)value);
        }
        return value;
    }
}
