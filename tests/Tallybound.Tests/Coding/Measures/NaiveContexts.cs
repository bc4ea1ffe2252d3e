using Tallybound.Coding.Measures;

namespace Tallybound.Tests.Coding.Measures;

/// <summary>Order-k figures taken the slow way, straight from the symbols, for the measures to be held against.</summary>
internal sealed class NaiveContexts
{
    private readonly int _alphabetSize, _order, _foldLength;
    private readonly int[] _symbols;
    private readonly SortedDictionary<long, SortedDictionary<int, long[]>> _contexts = [];

    /// <param name="foldLength">Symbols of a fold; folds 0 and 1 alternate.</param>
    public NaiveContexts(int[] symbols, int alphabetSize, int order, int foldLength)
    {
        (_symbols, _alphabetSize, _order, _foldLength) = (symbols, alphabetSize, order, foldLength);
        for (int i = order; i < symbols.Length; i++)
        {
            if (!_contexts.TryGetValue(ContextAt(i), out SortedDictionary<int, long[]>? row)) _contexts[ContextAt(i)] = row = [];
            if (!row.TryGetValue(symbols[i], out long[]? folds)) row[symbols[i]] = folds = new long[2];
            folds[FoldAt(i)]++;
        }
    }

    public int Predicted => Math.Max(0, _symbols.Length - _order);

    public void Feed(ContextMeasures measures)
    {
        foreach (SortedDictionary<int, long[]> row in _contexts.Values)
            measures.AddContext([.. row.Values.Select(folds => folds[0])], [.. row.Values.Select(folds => folds[1])]);
    }

    public OrderFigures Figures(bool heldOut = true)
    {
        var measures = new ContextMeasures(_alphabetSize, _order);
        Feed(measures);
        return measures.Finish(_symbols.Length, heldOut);
    }

    /// <summary>-Σ log2 of each symbol's share of its context.</summary>
    public double InformationBits()
    {
        double bits = 0;
        for (int i = _order; i < _symbols.Length; i++)
        {
            SortedDictionary<int, long[]> row = _contexts[ContextAt(i)];
            bits -= Math.Log2((double)row[_symbols[i]].Sum() / row.Values.Sum(folds => folds.Sum()));
        }
        return bits;
    }

    /// <summary>Runs the Dirichlet coder over the sequence, symbol by symbol, and sums what it spends.</summary>
    public double AdaptiveBits(double alpha)
    {
        var seen = new Dictionary<(long, int), long>();
        var totals = new Dictionary<long, long>();
        double bits = _order * Math.Log2(_alphabetSize);
        for (int i = _order; i < _symbols.Length; i++)
        {
            long context = ContextAt(i);
            long n = seen.GetValueOrDefault((context, _symbols[i])), total = totals.GetValueOrDefault(context);
            bits -= Math.Log2((n + alpha) / (total + _alphabetSize * alpha));
            seen[(context, _symbols[i])] = n + 1;
            totals[context] = total + 1;
        }
        return bits;
    }

    /// <summary>Each symbol by the counts of the fold it does not lie in.</summary>
    public (double Bits, long Escapes) HeldOut()
    {
        double bits = 0;
        long escapes = 0;
        for (int i = _order; i < _symbols.Length; i++)
        {
            int training = 1 - FoldAt(i);
            SortedDictionary<int, long[]> row = _contexts[ContextAt(i)];
            double total = row.Values.Sum(folds => folds[training]), distinct = row.Values.Count(folds => folds[training] > 0);
            double n = row[_symbols[i]][training], weight = distinct == _alphabetSize ? total : total + distinct;
            double probability = total == 0 ? 1.0 / _alphabetSize
                : n > 0 ? n / weight
                : distinct / weight / (_alphabetSize - distinct);
            bits -= Math.Log2(probability);
            if (n == 0) escapes++;
        }
        return (bits, escapes);
    }

    private int FoldAt(int i) => i / _foldLength & 1;

    private long ContextAt(int i)
    {
        long context = 0;
        for (int j = i - _order; j < i; j++) context = context * _alphabetSize + _symbols[j];
        return context;
    }
}
