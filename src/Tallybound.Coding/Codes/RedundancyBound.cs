namespace Tallybound.Coding.Codes;

/// <summary>What a free binary Huffman code can waste at most.</summary>
public static class RedundancyBound
{
    /// <summary>1 − log2 e + log2 log2 e, about 0.0861 bit.</summary>
    public static double Sigma { get; } = 1 - Math.Log2(Math.E) + Math.Log2(Math.Log2(Math.E));

    /// <summary>p1 + σ bit/symbol, p1 the share of the commonest symbol: R. Gallager, Variations on a theme by Huffman, IEEE Trans. IT-24 (1978).</summary>
    /// <param name="counts">n(s) of each symbol, at least one above 0.</param>
    public static double Gallager(ReadOnlySpan<long> counts)
    {
        long total = 0, largest = 0;
        foreach (long count in counts)
        {
            total += count;
            largest = Math.Max(largest, count);
        }
        return total > 0 ? ((double)largest / total) + Sigma : throw new ArgumentException("No symbol is in use; there is no redundancy to bound.", nameof(counts));
    }
}
