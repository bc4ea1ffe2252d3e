using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>Takes the counts of one order context by context and answers with the figures of that order.</summary>
/// <remarks>
/// Contexts come in ascending order and their symbols too, so that the same counts give the same bits however they were gathered.
/// Two folds come aligned (method: one trains, the other pays). One object serves source after source by <see cref="Reset"/>; it
/// holds about 100 KiB and allocates nothing while it is fed. Not for two threads at once.
/// Relative error of every rate below 1e-10.
/// </remarks>
public sealed class ContextMeasures
{
    private readonly int _alphabetSize, _order;
    private readonly AdaptiveGrid? _grid;
    private readonly CountsOfCounts _countsOfCounts;
    private readonly HeldOutCost _heldOut;
    private long[] _both = new long[256];
    private NeumaierSum _informationBits;
    private double _meanBits, _squaresBits;
    private long _predicted, _certain, _contexts, _pairs;
    private bool _foldsWanted = true;

    /// <summary>Measures for contexts of <paramref name="order"/> symbols.</summary>
    /// <param name="alphabetSize">A, the nominal size, 1 or more; 0 where the alphabet has no fixed size: adaptive and held-out figures are absent then.</param>
    /// <param name="order">0 or more; 0 has exactly one context.</param>
    public ContextMeasures(int alphabetSize, int order)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(alphabetSize);
        ArgumentOutOfRangeException.ThrowIfNegative(order);
        _alphabetSize = alphabetSize;
        _order = order;
        _grid = alphabetSize == 0 ? null : AdaptiveGrid.For(alphabetSize);
        _countsOfCounts = new CountsOfCounts(_grid);
        _heldOut = new HeldOutCost(alphabetSize);
    }

    /// <summary>Symbols predicted so far, N_k; 0 until a context with counts came.</summary>
    public long Predicted => _predicted + _certain;

    /// <summary>Adds the next context.</summary>
    /// <param name="fold0">Counts in fold 0 of the symbols that followed this context, in ascending order of symbol; zeros and symbols that never came may be left out or in.</param>
    /// <param name="fold1">Counts in fold 1, aligned with fold 0. Where there are no folds: all zero.</param>
    /// <exception cref="ArgumentException">The folds differ in length, or are longer than the alphabet.</exception>
    public void AddContext(ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        if (fold0.Length != fold1.Length) throw new ArgumentException($"Fold 0 has {fold0.Length} symbols, fold 1 has {fold1.Length}; they must be aligned.", nameof(fold1));
        if (_grid is not null && fold0.Length > _alphabetSize)
            throw new ArgumentException($"The context has {fold0.Length} symbols; the alphabet has {_alphabetSize}.", nameof(fold0));
        if (fold0.Length == 1)
        {
            AddOneSymbol(fold0, fold1);
            return;
        }
        if (_both.Length < fold0.Length) _both = new long[Math.Max(fold0.Length, 2 * _both.Length)];
        Span<long> both = _both.AsSpan(0, fold0.Length);

        long total0 = 0, total1 = 0, largest0 = 0, largest1 = 0, largest = 0;
        int distinct0 = 0, distinct1 = 0, distinct = 0;
        for (int i = 0; i < both.Length; i++)
        {
            long n0 = fold0[i], n1 = fold1[i], n = n0 + n1;
            both[i] = n;
            total0 += n0;
            total1 += n1;
            largest0 = Math.Max(largest0, n0);
            largest1 = Math.Max(largest1, n1);
            largest = Math.Max(largest, n);
            distinct0 += n0 == 0 ? 0 : 1;
            distinct1 += n1 == 0 ? 0 : 1;
            distinct += n == 0 ? 0 : 1;
        }
        long total = total0 + total1;
        if (total == 0) return;

        AddInformation(both, total, largest);
        _contexts++;
        _pairs += distinct;
        _countsOfCounts.AddContext(total);
        _countsOfCounts.AddPairs(both, largest);
        if (!_foldsWanted || _grid is null) return;
        _heldOut.Add(fold0, new FoldSummary(total0, distinct0, largest0), fold1, total1);
        _heldOut.Add(fold1, new FoldSummary(total1, distinct1, largest1), fold0, total0);
    }

    /// <summary>The figures of everything added since the last <see cref="Reset"/>; changes nothing.</summary>
    /// <param name="sourceSymbols">N, the symbols of the whole source, context-less start included: the adaptive bits are divided by it.</param>
    /// <param name="heldOut">False leaves the held-out figures absent.</param>
    /// <exception cref="InvalidOperationException">No symbol was predicted (an order that the source cannot support is absent), or
    /// held-out figures are asked for after a <see cref="Reset"/> that waived them.</exception>
    public OrderFigures Finish(long sourceSymbols, bool heldOut)
    {
        if (Predicted == 0) throw new InvalidOperationException($"Order {_order} predicted no symbol; it has no figures.");
        if (heldOut && !_foldsWanted) throw new InvalidOperationException("The folds were waived; there is no held-out figure.");
        double information = _informationBits.Value;
        double entropy = information / Predicted;
        // Contexts with one symbol join as one group of mean 0, by the rule of Spread.
        double squares = _squaresBits + (_certain == 0 ? 0 : _meanBits * _meanBits * _predicted * ((double)_certain / Predicted));
        double? adaptive = null;
        int? exponent = null;
        if (_grid is not null)
        {
            (double beyond, exponent) = _countsOfCounts.Cheapest();
            adaptive = (information + beyond + _order * Math.Log2(_alphabetSize) + _grid.ChoiceBits) / sourceSymbols;
        }
        bool hasHeldOut = heldOut && _grid is not null;
        return new OrderFigures(
            _order,
            Predicted,
            entropy,
            entropy + (_pairs - _contexts) / (2.0 * Predicted * Logarithm.Ln2),
            Math.Sqrt(squares) / Predicted,
            adaptive,
            exponent,
            hasHeldOut ? _heldOut.Bits / Predicted : null,
            hasHeldOut ? _heldOut.Escapes : null,
            _contexts,
            _countsOfCounts.ContextsUnder8,
            _pairs,
            (double)_countsOfCounts.PairsSeenOnce / Predicted);
    }

    /// <summary>Forgets everything added, ready for the next source.</summary>
    /// <param name="foldsWanted">False waives the held-out figures of the next source and saves their time.</param>
    public void Reset(bool foldsWanted = true)
    {
        _foldsWanted = foldsWanted;
        _informationBits = default;
        _meanBits = _squaresBits = 0;
        _predicted = _certain = _contexts = _pairs = 0;
        _countsOfCounts.Clear();
        _heldOut.Clear();
    }

    /// <summary>A context with one symbol: most contexts of thin data. It holds no information.</summary>
    private void AddOneSymbol(ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        long n0 = fold0[0], n1 = fold1[0], n = n0 + n1;
        if (n == 0) return;
        _certain += n;
        _contexts++;
        _pairs++;
        _countsOfCounts.AddContext(n);
        _countsOfCounts.AddPair(n);
        if (!_foldsWanted || _grid is null) return;
        _heldOut.Add(fold0, new FoldSummary(n0, n0 == 0 ? 0 : 1, n0), fold1, n1);
        _heldOut.Add(fold1, new FoldSummary(n1, n1 == 0 ? 0 : 1, n1), fold0, n0);
    }

    /// <summary>Adds Σ n·log2(n(c)/n) and the spread of log2(n(c)/n) around it.</summary>
    private void AddInformation(ReadOnlySpan<long> counts, long total, long largest)
    {
        if (_order == 0)
        {
            // One context: the very bits of Entropy, so that one figure never has two values.
            Spread(Entropy.InformationBits(counts, total), Entropy.SquaresBits(counts, total, largest), total);
            return;
        }
        if (largest == total)
        {
            _certain += total;
            return;
        }
        // Measured from the context's commonest symbol: equal counts differ by exactly 0, and nothing cancels when one symbol rules.
        double most = Log2Table.Of(largest), first = 0, second = 0;
        foreach (long n in counts)
        {
            double above = most - Log2Table.Of(n), weighted = n * above;
            first += weighted;
            second += weighted * above;
        }
        double least = total < Log2Table.Limit ? Log2Table.Of(total) - most : Entropy.SelfInformation(largest, total);
        Spread(first + total * least, Math.Max(0, second - first * first / total), total);
    }

    /// <summary>Joins a context's information and its squares around its own mean to those of all before it.</summary>
    /// <remarks>T. Chan, G. Golub and R. LeVeque, Updating formulae and a pairwise algorithm for computing sample variances (1979).</remarks>
    private void Spread(double bits, double squares, long total)
    {
        _informationBits.Add(bits);
        long before = _predicted;
        _predicted += total;
        _squaresBits += squares;
        double off = bits / total - _meanBits;
        if (off == 0) return;
        double share = (double)total / _predicted;
        _meanBits += off * share;
        _squaresBits += off * off * share * before;
    }
}
