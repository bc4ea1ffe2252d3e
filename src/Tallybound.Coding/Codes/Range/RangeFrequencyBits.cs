using System.Numerics;
using Tallybound.Coding.Codes.Tans;

namespace Tallybound.Coding.Codes.Range;

/// <summary>How fine the range coder's frequencies are when nobody asks for a size.</summary>
public static class RangeFrequencyBits
{
    /// <summary>Coarsest frequencies.</summary>
    public const int Smallest = 12;

    /// <summary>Finest frequencies; a 32-bit coder keeps 2^14 or more steps of range above them.</summary>
    public const int Largest = QuantizedFrequencies.LargestLog;

    /// <summary>Two bits less than the number of symbols has, at least one bit more than the symbols in use need, from 12 to 16.</summary>
    /// <param name="symbols">N, at least 1.</param>
    /// <param name="inUse">m, at least 1; above 2^16 no frequencies of the result can be made.</param>
    public static int For(long symbols, int inUse)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(symbols, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(inUse, 1);
        int lowest = Math.Max(Smallest, FixedCode.Width(inUse) + 1);
        return Math.Min(Largest, Math.Max(lowest, BitOperations.Log2((ulong)symbols) + 1 - 2));
    }
}
