using Tallybound.Coding.Measures;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Finishing;

/// <summary>Hands each context of a tally to the measures of its order.</summary>
internal sealed class MeasuringVisitor(ContextMeasures measures) : IContextVisitor
{
    public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1) => measures.AddContext(fold0, fold1);
}

/// <summary>Order 1: the measures, the price of one Huffman table a context, and the pair counts where a page will draw them.</summary>
internal sealed class PairVisitor(ContextMeasures measures, ContextHuffmanPrice price, Dictionary<string, IReadOnlyList<long[]>>? pairs) : IContextVisitor
{
    public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        measures.AddContext(fold0, fold1);
        price.AddContext(symbols, fold0, fold1);
        if (pairs is null) return;
        var row = new long[symbols.Length][];
        for (int i = 0; i < row.Length; i++) row[i] = [symbols[i], fold0[i] + fold1[i]];
        pairs.Add(context.ToString(System.Globalization.CultureInfo.InvariantCulture), row);
    }
}
