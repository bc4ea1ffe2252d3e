using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Tables;

/// <summary>Normalised frequencies as RFC 8878 §4.1.1 sends them: 4 bits of accuracy log less 5, then each frequency in as many bits as what is left to give out asks for; whole bytes.</summary>
/// <remarks>Serves tANS and the range coder, whose frequencies add up to 2^R. Symbols behind the last one in use are not sent.</remarks>
public static class Rfc8878FseDistribution
{
    /// <summary>Smallest and largest accuracy log that 4 bits can say.</summary>
    public const int SmallestLog = 5, LargestLog = 20;

    private const int LogBits = 4, RepeatBits = 2, FullRepeat = 3;

    /// <summary>Bits of the table, a multiple of 8; the spans and errors of <see cref="Encode"/>.</summary>
    public static long Bits(ReadOnlySpan<int> frequencies, int accuracyLog)
    {
        var counter = default(BitCounter);
        Encode(frequencies, accuracyLog, ref counter);
        return counter.Bits;
    }

    /// <summary>Writes the table.</summary>
    /// <param name="frequencies">One a symbol, 0 for a symbol not in use, −1 for one with a chance below 1 (it takes one cell); in all 2^R.</param>
    /// <param name="accuracyLog">R, 5 to 20.</param>
    /// <param name="sink">Takes the bits; one that packs the least significant bit first gives the RFC's own. It stands on a byte boundary.</param>
    /// <exception cref="ArgumentException">The frequencies do not add up to 2^R.</exception>
    public static void Encode<TSink>(ReadOnlySpan<int> frequencies, int accuracyLog, ref TSink sink)
        where TSink : IBitSink
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(accuracyLog, SmallestLog);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(accuracyLog, LargestLog);
        long cells = 0;
        foreach (int frequency in frequencies) cells += Math.Abs((long)frequency);
        if (cells != 1L << accuracyLog) throw new ArgumentException($"The frequencies add up to {cells}; the accuracy log asks for {1L << accuracyLog}.", nameof(frequencies));
        sink.Write((ulong)(accuracyLog - SmallestLog), LogBits);
        int left = 1 << accuracyLog;
        for (int symbol = 0; left > 0;)
        {
            int frequency = frequencies[symbol++];
            WriteValue(frequency + 1, left, ref sink);
            left -= Math.Abs(frequency);
            if (frequency != 0 || left == 0) continue;
            int zeros = frequencies[symbol..].IndexOfAnyExcept(0);
            symbol += zeros;
            for (; zeros >= FullRepeat; zeros -= FullRepeat) sink.Write(FullRepeat, RepeatBits);
            sink.Write((ulong)zeros, RepeatBits);
        }
        sink.Write(0, (int)(-sink.Bits & 7));
    }

    /// <summary>Reads a table; the reader stands on a byte boundary before and after it.</summary>
    /// <param name="reader">The bits.</param>
    /// <param name="frequencies">Takes one frequency a symbol; what is behind the last one sent becomes 0.</param>
    /// <returns>R.</returns>
    /// <exception cref="InvalidDataException">The bits end early, or the table names a symbol beyond the span or gives out more than 2^R.</exception>
    public static int Decode(ref LowBitReader reader, scoped Span<int> frequencies)
    {
        frequencies.Clear();
        int accuracyLog = (int)reader.Read(LogBits) + SmallestLog, left = 1 << accuracyLog;
        for (int symbol = 0; left > 0;)
        {
            if (symbol >= frequencies.Length) throw new InvalidDataException($"The distribution goes on behind its {frequencies.Length} symbols.");
            int frequency = ReadValue(ref reader, left) - 1;
            frequencies[symbol++] = frequency;
            left -= Math.Abs(frequency);
            if (left < 0) throw new InvalidDataException($"The distribution gives out more than {1 << accuracyLog}.");
            for (int repeat = frequency == 0 ? FullRepeat : 0; repeat == FullRepeat; symbol += repeat) repeat = (int)reader.Read(RepeatBits);
        }
        reader.Read((int)(-reader.Position & 7));
        return accuracyLog;
    }

    /// <summary>A value of 0…left + 1 takes the full bits of left + 1, or one bit less where the low end of the range has words to spare.</summary>
    private static void WriteValue<TSink>(int value, int left, ref TSink sink)
        where TSink : IBitSink
    {
        (int bits, int half, int spare) = Shape(left);
        if (value < spare) sink.Write((ulong)value, bits - 1);
        else sink.Write((ulong)(value < half ? value : value + spare), bits);
    }

    private static int ReadValue(ref LowBitReader reader, int left)
    {
        (int bits, int half, int spare) = Shape(left);
        int value = (int)reader.Read(bits - 1);
        if (value < spare) return value;
        value += (int)reader.Read(1) * half;
        return value < half ? value : value - spare;
    }

    private static (int Bits, int Half, int Spare) Shape(int left)
    {
        int bits = BitOperations.Log2((uint)left + 1) + 1;
        return (bits, 1 << (bits - 1), (1 << bits) - 2 - left);
    }
}
