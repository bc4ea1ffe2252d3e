namespace Tallybound.Coding.Codes;

/// <summary>Symbols in use in ascending order of (count, symbol).</summary>
internal static class SortedWeights
{
    /// <summary>Fills both spans, whose length is the number of symbols in use.</summary>
    public static void Gather(ReadOnlySpan<long> counts, Span<int> symbols, Span<long> weights)
    {
        int at = 0;
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            if (counts[symbol] == 0) continue;
            symbols[at] = symbol;
            weights[at++] = counts[symbol];
        }
        Sort(symbols, weights);
    }

    private static void Sort(Span<int> symbols, Span<long> weights)
    {
        if (symbols.Length > 32)
        {
            RadixSort.ByWeight(symbols, weights);
            return;
        }
        for (int i = 1; i < symbols.Length; i++)
        {
            (long weight, int symbol) = (weights[i], symbols[i]);
            int at = i;
            for (; at > 0 && weights[at - 1] > weight; at--) (weights[at], symbols[at]) = (weights[at - 1], symbols[at - 1]);
            (weights[at], symbols[at]) = (weight, symbol);
        }
    }
}
