namespace Tallybound.Coding.Codes.Tans;

/// <summary>Which symbol each cell of the table belongs to, RFC 8878 §4.1.1.</summary>
internal static class TansSpread
{
    /// <summary>Fills all 2^R cells: "less than 1" symbols from the end downwards, the others in steps of 5/8·2^R + 3 around what is left.</summary>
    /// <exception cref="ArgumentException">The frequencies do not take 2^R cells.</exception>
    public static void Fill(ReadOnlySpan<int> frequencies, int tableLog, Span<int> symbolOfCell)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(tableLog, TansTableLog.Smallest);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(tableLog, TansTableLog.Largest);
        int size = 1 << tableLog, mask = size - 1, step = (size >> 1) + (size >> 3) + 3, free = size;
        long cells = 0;
        foreach (int frequency in frequencies) cells += Math.Abs((long)frequency);
        if (cells != size) throw new ArgumentException($"The frequencies take {cells} cells; the table has {size}.", nameof(frequencies));
        for (int symbol = 0; symbol < frequencies.Length; symbol++)
        {
            if (frequencies[symbol] < 0) symbolOfCell[--free] = symbol;
        }
        int cell = 0;
        for (int symbol = 0; symbol < frequencies.Length; symbol++)
        {
            for (int i = frequencies[symbol]; i > 0; i--)
            {
                symbolOfCell[cell] = symbol;
                do cell = (cell + step) & mask;
                while (cell >= free);
            }
        }
    }
}
