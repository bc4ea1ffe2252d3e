using System.Numerics;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>How large a tANS table to take when nobody asks for a size.</summary>
public static class TansTableLog
{
    /// <summary>Smallest accuracy log of RFC 8878 §4.1.1.</summary>
    public const int Smallest = 5;

    /// <summary>Largest one taken by <see cref="For"/>.</summary>
    public const int LargestDefault = 12;

    /// <summary>Largest one that this code builds.</summary>
    public const int Largest = 16;

    /// <summary>The table log R: two bits less than the number of symbols has, at least one bit more than the symbols in use need, from 5 to 12.</summary>
    /// <remarks>A table of a quarter to a half of the source's symbols costs less to describe than the finer frequencies of a larger one would win back.</remarks>
    /// <param name="symbols">N, at least 1.</param>
    /// <param name="inUse">m, at least 1. Above 2^12 the result is 12 and no table of it can be built.</param>
    public static int For(long symbols, int inUse)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(symbols, 1);
        ArgumentOutOfRangeException.ThrowIfLessThan(inUse, 1);
        int lowest = Math.Max(Smallest, 1 + (inUse == 1 ? 0 : BitOperations.Log2((uint)inUse - 1) + 1));
        return Math.Min(LargestDefault, Math.Max(lowest, BitOperations.Log2((ulong)symbols) + 1 - 2));
    }
}
