namespace Tallybound.Coding.Codes;

/// <summary>Hands a histogram of lengths to symbols by rank: the longest lengths to the lowest (count, symbol).</summary>
internal static class LengthRanks
{
    /// <param name="symbols">Symbols in ascending order of (count, symbol).</param>
    /// <param name="histogram">How many symbols get each length.</param>
    /// <param name="lengths">Takes the length of each symbol, by symbol.</param>
    public static void HandOut(ReadOnlySpan<int> symbols, ReadOnlySpan<int> histogram, Span<byte> lengths)
    {
        int at = 0;
        for (int length = histogram.LastIndexOfAnyExcept(0); length > 0; length--)
            for (int i = 0; i < histogram[length]; i++) lengths[symbols[at++]] = (byte)length;
    }
}
