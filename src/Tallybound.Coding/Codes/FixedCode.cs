using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes;

/// <summary>Every symbol in use in equally many bits, ⌈log2 m⌉: its rank among the symbols in use. The table is a map of the alphabet, one bit a symbol.</summary>
public static class FixedCode
{
    /// <summary>Bits a symbol, ⌈log2 m⌉; 0 where one symbol or none is in use.</summary>
    public static int Width(long inUse) => inUse <= 1 ? 0 : BitOperations.Log2((ulong)inUse - 1) + 1;

    /// <summary>N·⌈log2 m⌉.</summary>
    public static long PayloadBits(ReadOnlySpan<long> counts)
    {
        long symbols = 0;
        int inUse = 0;
        foreach (long count in counts)
        {
            symbols += count;
            inUse += count > 0 ? 1 : 0;
        }
        return symbols * Width(inUse);
    }

    /// <summary>A bits: one for each symbol of the alphabet.</summary>
    public static long TableBits(long alphabetSize) => alphabetSize;

    /// <summary>Writes the map: 1 for a symbol in use.</summary>
    public static void EncodeTable<TSink>(ReadOnlySpan<long> counts, ref TSink sink)
        where TSink : IBitSink
    {
        foreach (long count in counts) sink.Write(count > 0 ? 1UL : 0, 1);
    }

    /// <summary>Reads the map of an alphabet.</summary>
    /// <returns>The symbols in use, ascending: the symbol of each rank.</returns>
    /// <exception cref="InvalidDataException">The bits end early.</exception>
    public static int[] DecodeTable(ref BitReader reader, int alphabetSize)
    {
        var inUse = new List<int>();
        for (int symbol = 0; symbol < alphabetSize; symbol++)
        {
            if (reader.Read(1) == 1) inUse.Add(symbol);
        }
        return [.. inUse];
    }
}
