using System.Numerics;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>Bits that a table in a given format needs at least; never above its price, and much quicker than it.</summary>
internal static class TableFloor
{
    /// <summary>RFC 1951 §3.2.7: HLIT, HDIST, HCLEN and the four lengths that are always sent.</summary>
    private const int DynamicHeaderHead = 5 + 5 + 4 + (4 * 3);

    /// <summary>RFC 8878 §4.2.1: the byte that says how the weights follow.</summary>
    private const int HuffmanWeightsHead = 8;

    /// <summary>The floor from the number of symbols in use alone: some word has ⌈log2 m⌉ bits or more.</summary>
    public static long Before(TableFormat format, int alphabetSize, int inUse) => format switch
    {
        TableFormat.Flat => FlatTable.Bits(alphabetSize, inUse < 2 ? 1 : BitOperations.Log2((uint)inUse - 1) + 1),
        TableFormat.Rfc1951DynamicHeader => DynamicHeaderHead,
        TableFormat.Rfc8878HuffmanWeights => HuffmanWeightsHead,
        // δ of the number of symbols, one bit of δ for each place, 7 bits for the longest and 4 for each length up to it.
        TableFormat.Sparse => inUse + 7 + 4,
        _ => 0,
    };

    /// <summary>The floor from the lengths.</summary>
    public static long Of(TableFormat format, ReadOnlySpan<byte> lengths) => format switch
    {
        TableFormat.Rfc1951DynamicHeader => DynamicHeaderHead + DynamicHeaderTokens(lengths),
        TableFormat.Rfc8878HuffmanWeights => HuffmanWeightsHead + HuffmanWeightsSteps(lengths),
        _ => 0,
    };

    /// <summary>A run of equal lengths starts with a token of its own, and a code of these tokens cannot beat their entropy nor one bit each; longer runs only add to it.</summary>
    private static long DynamicHeaderTokens(ReadOnlySpan<byte> lengths)
    {
        Span<int> heads = stackalloc int[256];
        heads.Clear();
        int before = -1, runs = 0;
        foreach (byte length in lengths)
        {
            if (length == before) continue;
            before = length;
            heads[length]++;
            runs++;
        }
        double bits = 0;
        // Runs of unused symbols have three tokens to start with: they are left out of the sum, their share of the code is not.
        for (int length = 1; length <= 15; length++) bits -= WeightedLogarithm.Of(heads[length]);
        int coded = runs - heads[0];
        bits += WeightedLogarithm.Of(coded);
        return Math.Max(runs, (long)(bits * (1 - 1e-6)));
    }

    /// <summary>All weights but the last symbol's are sent, 4 bits each or by two states. A step of a state reads no bit only for a weight that has more than half of the cells;
    /// there is one such weight at most. The first two weights cost nothing.</summary>
    private static long HuffmanWeightsSteps(ReadOnlySpan<byte> lengths)
    {
        int last = lengths.LastIndexOfAnyExcept((byte)0), commonest = 0;
        Span<int> sent = stackalloc int[256];
        sent.Clear();
        for (int symbol = 0; symbol < last; symbol++) commonest = Math.Max(commonest, ++sent[lengths[symbol]]);
        return Math.Max(0, last - 2 - commonest);
    }
}
