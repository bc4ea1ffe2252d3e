using Tallybound.Coding.Codes;

namespace Tallybound.Coding.Tables;

/// <summary>The price of the table of an independent extension, whose blocks are too many to list.</summary>
public static partial class SparseTable
{
    /// <summary>Bits of the table of the n-th extension: all m^n blocks of the symbols in use are in use, packed in base A, the first symbol most significant.</summary>
    /// <remarks>Two neighbouring blocks differ by a carry: the last k digits fall back from the greatest symbol to the least and the digit before them moves to its successor.
    /// The gap depends on that k and that digit alone, and stands m^(n−1−k) times; so m·n gaps are priced instead of m^n.</remarks>
    /// <param name="symbolsInUse">The m symbols in use, ascending, at least one.</param>
    /// <param name="alphabetSize">A, above the last symbol.</param>
    /// <param name="blockLength">n, at least 1; A^n fits a long.</param>
    /// <param name="lengthHistogram">How many blocks have each code length, indexed by length, none above 127; the total is m^n.</param>
    /// <exception cref="ArgumentException">No symbol is in use, or the histogram's total is not m^n.</exception>
    /// <exception cref="OverflowException">A^n does not fit a long.</exception>
    public static long BitsOfExtension(ReadOnlySpan<int> symbolsInUse, int alphabetSize, int blockLength, ReadOnlySpan<long> lengthHistogram)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(blockLength, 1);
        if (symbolsInUse.IsEmpty) throw new ArgumentException("No symbol is in use; a sparse table needs one.", nameof(symbolsInUse));
        long blocks = Power(symbolsInUse.Length, blockLength), total = 0;
        foreach (long count in lengthHistogram) total += count;
        if (total != blocks) throw new ArgumentException($"The lengths are of {total} blocks; {symbolsInUse.Length}^{blockLength} are in use.", nameof(lengthHistogram));
        CheckLengths(lengthHistogram);
        long bits = EliasDelta.Length(blocks) + LengthsBits(lengthHistogram);
        int least = symbolsInUse[0], greatest = symbolsInUse[^1];
        long placeValue = 1, lowerPlaces = 0, repeats = blocks / symbolsInUse.Length;
        for (int carries = 0; carries < blockLength; carries++)
        {
            for (int i = 1; i < symbolsInUse.Length; i++)
            {
                long gap = ((symbolsInUse[i] - (long)symbolsInUse[i - 1]) * placeValue) - ((greatest - (long)least) * lowerPlaces);
                bits += repeats * EliasDelta.Length(gap);
            }
            lowerPlaces += placeValue;
            placeValue = checked(placeValue * alphabetSize);
            repeats /= symbolsInUse.Length;
        }
        return bits + EliasDelta.Length((least * lowerPlaces) + 1);
    }

    private static long Power(long value, int exponent)
    {
        long power = 1;
        for (int i = 0; i < exponent; i++) power = checked(power * value);
        return power;
    }
}
