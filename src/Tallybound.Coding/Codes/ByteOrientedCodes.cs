using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>Exp-Golomb codes of numbers from 0: Elias γ of value/2^k + 1, then the k low bits; k = 0 is ue(v) of ITU-T H.264 §9.1.</summary>
public static class ExpGolombCode
{
    /// <summary>Bits of a number's word.</summary>
    /// <param name="value">At least 0, below 2^62.</param>
    /// <param name="k">Low bits sent plain, 0 to 32.</param>
    public static int Length(long value, int k)
    {
        Check(value, k);
        return EliasGamma.Length((value >> k) + 1) + k;
    }

    /// <summary>Writes a number's word; parameters as for <see cref="Length"/>.</summary>
    public static void Encode<TSink>(long value, int k, ref TSink sink)
        where TSink : IBitSink
    {
        Check(value, k);
        EliasGamma.Encode((value >> k) + 1, ref sink);
        sink.Write((ulong)value & ((1UL << k) - 1), k);
    }

    /// <summary>Reads a number.</summary>
    /// <exception cref="InvalidDataException">The bits end early or stand for no such number.</exception>
    public static long Decode(ref BitReader reader, int k)
    {
        Check(0, k);
        long high = EliasGamma.Decode(ref reader) - 1;
        if (high >> (62 - k) != 0) throw new InvalidDataException("The bits stand for a number of more than 62 bits.");
        return (high << k) | (long)reader.Read(k);
    }

    private static void Check(long value, int k)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(value);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(value, (1L << 62) - 1);
        ArgumentOutOfRangeException.ThrowIfNegative(k);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(k, 32);
    }
}

/// <summary>LEB128 of numbers from 0: seven bits a byte, low ones first, the top bit set while more follow (DWARF 5 §7.6).</summary>
public static class Leb128
{
    /// <summary>Bits of a number's bytes.</summary>
    /// <param name="value">At least 0.</param>
    public static int Length(long value)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(value);
        return 8 * ((BitOperations.Log2((ulong)value | 1) / 7) + 1);
    }

    /// <summary>Writes a number's bytes.</summary>
    public static void Encode<TSink>(long value, ref TSink sink)
        where TSink : IBitSink
    {
        ArgumentOutOfRangeException.ThrowIfNegative(value);
        for (; value >= 128; value >>= 7) sink.Write((ulong)(value & 127) | 128, 8);
        sink.Write((ulong)value, 8);
    }

    /// <summary>Reads a number.</summary>
    /// <exception cref="InvalidDataException">The bits end early or stand for no number of 63 bits.</exception>
    public static long Decode(ref BitReader reader)
    {
        ulong value = 0;
        for (int shift = 0; shift < 63; shift += 7)
        {
            ulong next = reader.Read(8);
            value |= (next & 127) << shift;
            if (next < 128) return (long)value;
        }
        throw new InvalidDataException("The bytes stand for a number of more than 63 bits.");
    }
}
