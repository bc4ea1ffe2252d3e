using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>How often each count occurred among the pairs and among the contexts of one order: all that the adaptive cost needs.</summary>
/// <remarks>Counts below a limit are tallied in a small array; the few above it go straight into sums, one for each α.
/// Terms are those of <see cref="GammaFunction.RisingFactorialExcess"/>: the plug-in information is added whole at the end.</remarks>
internal sealed class CountsOfCounts
{
    private const int Tallied = 4096;

    private readonly AdaptiveGrid? _grid;
    private readonly long[] _pairs = new long[Tallied], _contexts = new long[Tallied];
    private readonly NeumaierSum[] _nats;
    private int _pairsUsed, _contextsUsed;

    public CountsOfCounts(AdaptiveGrid? grid)
    {
        _grid = grid;
        _nats = new NeumaierSum[grid?.Size ?? 0];
    }

    public long PairsSeenOnce => _pairs[1];

    /// <summary>Contexts that predicted fewer than 8 symbols.</summary>
    public long ContextsUnder8
    {
        get
        {
            long under = 0;
            for (int n = 1; n < 8; n++) under += _contexts[n];
            return under;
        }
    }

    public void AddContext(long total)
    {
        if (total < Tallied)
        {
            _contexts[total]++;
            _contextsUsed = Math.Max(_contextsUsed, (int)total);
        }
        else
        {
            _grid?.AddContexts(total, 1, _nats);
        }
    }

    public void AddPair(long n)
    {
        if (n < Tallied)
        {
            _pairs[n]++;
            _pairsUsed = Math.Max(_pairsUsed, (int)n);
        }
        else
        {
            _grid?.AddPairs(n, -1, _nats);
        }
    }

    /// <summary>Adds the pairs of one context, none above <paramref name="largest"/>. Absent symbols land in entry 0, which is never read.</summary>
    public void AddPairs(ReadOnlySpan<long> counts, long largest)
    {
        long[] pairs = _pairs;
        if (largest < Tallied)
        {
            foreach (long n in counts) pairs[n]++;
            _pairsUsed = Math.Max(_pairsUsed, (int)largest);
            return;
        }
        foreach (long n in counts)
        {
            if (n < Tallied) pairs[n]++;
            else _grid?.AddPairs(n, -1, _nats);
        }
        _pairsUsed = Tallied - 1;
    }

    /// <summary>The cheapest α and its bits beyond the plug-in information, start and choice of α left out.</summary>
    public (double Bits, int AlphaExponent) Cheapest()
    {
        AdaptiveGrid grid = _grid ?? throw new InvalidOperationException("The adaptive cost needs a fixed alphabet.");
        Span<NeumaierSum> nats = stackalloc NeumaierSum[_nats.Length];
        _nats.CopyTo(nats);
        for (int n = 1; n <= _contextsUsed; n++)
        {
            if (_contexts[n] != 0) grid.AddContexts(n, _contexts[n], nats);
        }
        for (int n = 1; n <= _pairsUsed; n++)
        {
            if (_pairs[n] != 0) grid.AddPairs(n, -_pairs[n], nats);
        }
        int best = 0;
        for (int j = 1; j < nats.Length; j++)
        {
            if (nats[j].Value < nats[best].Value) best = j;
        }
        return (Math.Max(0, nats[best].Value) / Logarithm.Ln2, best);
    }

    public void Clear()
    {
        _pairs.AsSpan(0, _pairsUsed + 1).Clear();
        _contexts.AsSpan(0, _contextsUsed + 1).Clear();
        _nats.AsSpan().Clear();
        _pairsUsed = _contextsUsed = 0;
    }
}
