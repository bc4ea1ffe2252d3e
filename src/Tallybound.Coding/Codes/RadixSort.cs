using System.Buffers;
using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>Stable least-significant-digit sort of symbols by weight, a byte a pass, as many passes as the largest weight has bytes.</summary>
internal static class RadixSort
{
    public static void ByWeight(Span<int> symbols, Span<long> weights)
    {
        long all = 0;
        foreach (long weight in weights) all |= weight;
        int passes = (BitOperations.Log2((ulong)all | 1) / 8) + 1;
        int[] otherSymbols = ArrayPool<int>.Shared.Rent(symbols.Length);
        long[] otherWeights = ArrayPool<long>.Shared.Rent(symbols.Length);
        try
        {
            Span<int> fromSymbols = symbols, toSymbols = otherSymbols.AsSpan(0, symbols.Length);
            Span<long> fromWeights = weights, toWeights = otherWeights.AsSpan(0, symbols.Length);
            for (int pass = 0; pass < passes; pass++)
            {
                Pass(fromSymbols, fromWeights, toSymbols, toWeights, pass * 8);
                Span<int> s = fromSymbols;
                fromSymbols = toSymbols;
                toSymbols = s;
                Span<long> w = fromWeights;
                fromWeights = toWeights;
                toWeights = w;
            }
            if (passes % 2 == 0) return;
            fromSymbols.CopyTo(symbols);
            fromWeights.CopyTo(weights);
        }
        finally
        {
            ArrayPool<int>.Shared.Return(otherSymbols);
            ArrayPool<long>.Shared.Return(otherWeights);
        }
    }

    private static void Pass(ReadOnlySpan<int> symbols, ReadOnlySpan<long> weights, Span<int> toSymbols, Span<long> toWeights, int shift)
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
