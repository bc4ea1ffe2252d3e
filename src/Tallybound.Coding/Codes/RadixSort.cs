using System.Buffers;
using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Stable least-significant-digit sort of items by weight, a byte a pass; passes in which all weights agree are left out.</summary>
internal static class RadixSort
{
    /// <param name="symbols">Items, aligned with the weights.</param>
    /// <param name="weights">Weights, at least 0.</param>
    public static void ByWeight<TItem>(Span<TItem> symbols, Span<long> weights)
        where TItem : struct
    {
        long differing = 0;
        foreach (long weight in weights) differing |= weight ^ weights[0];
        int passes = differing == 0 ? 0 : (BitOperations.Log2((ulong)differing) / 8) + 1;
        TItem[] otherSymbols = ArrayPool<TItem>.Shared.Rent(symbols.Length);
        long[] otherWeights = ArrayPool<long>.Shared.Rent(symbols.Length);
        try
        {
            Span<TItem> fromSymbols = symbols, toSymbols = otherSymbols.AsSpan(0, symbols.Length);
            Span<long> fromWeights = weights, toWeights = otherWeights.AsSpan(0, symbols.Length);
            int done = 0;
            for (int pass = 0; pass < passes; pass++)
            {
                if (((differing >> (pass * 8)) & 255) == 0) continue;
                done++;
                Pass(fromSymbols, fromWeights, toSymbols, toWeights, pass * 8);
                Span<TItem> s = fromSymbols;
                fromSymbols = toSymbols;
                toSymbols = s;
                Span<long> w = fromWeights;
                fromWeights = toWeights;
                toWeights = w;
            }
            if (done % 2 == 0) return;
            fromSymbols.CopyTo(symbols);
            fromWeights.CopyTo(weights);
        }
        finally
        {
            ArrayPool<TItem>.Shared.Return(otherSymbols);
            ArrayPool<long>.Shared.Return(otherWeights);
        }
    }

    private static void Pass<TItem>(ReadOnlySpan<TItem> symbols, ReadOnlySpan<long> weights, Span<TItem> toSymbols, Span<long> toWeights, int shift)
    {
        Span<int> starts = stackalloc int[256];
        starts.Clear();
        foreach (long weight in weights) starts[(int)(weight >> shift) & 255]++;
        int sum = 0;
        foreach (ref int start in starts) (start, sum) = (sum, sum + start);
        for (int i = 0; i < weights.Length; i++)
        {
            int to = starts[(int)(weights[i] >> shift) & 255]++;
            toSymbols[to] = symbols[i];
            toWeights[to] = weights[i];
        }
    }
}
