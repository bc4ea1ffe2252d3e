using System.Runtime.Intrinsics;
using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Tables;

/// <summary>The plainest table: 7 bits for the longest length, then every length of the alphabet in ⌈log2(longest + 1)⌉ bits.</summary>
public static class FlatTable
{
    internal const int LongestBits = 7;

    /// <summary>Bits of the table.</summary>
    /// <param name="alphabetSize">Symbols in the alphabet, in use or not.</param>
    /// <param name="longestLength">Longest code length, 0 to 127.</param>
    public static long Bits(long alphabetSize, int longestLength) => LongestBits + (alphabetSize * LengthBits(longestLength));

    /// <summary>Writes the table.</summary>
    /// <param name="lengths">One length a symbol, 0 for a symbol not in use, at most 127.</param>
    /// <param name="sink">Takes <see cref="Bits"/> bits.</param>
    /// <exception cref="ArgumentException">A length is above 127.</exception>
    public static void Encode<TSink>(ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        int longest = Longest(lengths);
        if (longest >> LongestBits != 0) throw new ArgumentException($"The longest length is {longest}; this table allows {(1 << LongestBits) - 1}.", nameof(lengths));
        sink.Write((ulong)longest, LongestBits);
        int bits = LengthBits(longest);
        foreach (byte length in lengths) sink.Write(length, bits);
    }

    /// <summary>Reads the table of an alphabet of <c>lengths.Length</c> symbols.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or a length is above the longest.</exception>
    public static void Decode(ref BitReader reader, scoped Span<byte> lengths)
    {
        int longest = (int)reader.Read(LongestBits), bits = LengthBits(longest);
        for (int symbol = 0; symbol < lengths.Length; symbol++)
        {
            int length = (int)reader.Read(bits);
            if (length > longest) throw new InvalidDataException($"Symbol {symbol} has length {length}; the longest is {longest}.");
            lengths[symbol] = (byte)length;
        }
    }

    internal static int Longest(ReadOnlySpan<byte> lengths)
    {
        int longest = 0, at = 0;
        if (Vector128.IsHardwareAccelerated && lengths.Length >= Vector128<byte>.Count)
        {
            // Asked for every table of every context: sixteen lengths a step.
            Vector128<byte> most = Vector128<byte>.Zero;
            for (; at <= lengths.Length - Vector128<byte>.Count; at += Vector128<byte>.Count) most = Vector128.Max(most, Vector128.Create(lengths.Slice(at, Vector128<byte>.Count)));
            for (int lane = 0; lane < Vector128<byte>.Count; lane++) longest = Math.Max(longest, most[lane]);
        }
        for (; at < lengths.Length; at++) longest = Math.Max(longest, lengths[at]);
        return longest;
    }

    private static int LengthBits(int longest) => longest == 0 ? 0 : BitOperations.Log2((uint)longest) + 1;
}
