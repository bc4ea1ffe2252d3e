using System.Collections.Concurrent;
using System.Numerics;
using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>The values of α that the adaptive coder of an alphabet may take, α = 2^-j for j = 0…⌈log2 A⌉, with its terms for small counts looked up.</summary>
internal sealed class AdaptiveGrid
{
    /// <summary>Terms of counts below this are kept. Small sources hardly pass it, and it is built in a fraction of a millisecond.</summary>
    public const int Kept = RisingFactorialSeries.From;

    private static readonly ConcurrentDictionary<int, AdaptiveGrid> s_grids = new();

    private readonly double[] _pairTerms, _contextTerms;   // [n × Size + j], natural logarithms
    private readonly RisingFactorialSeries[] _pairSeries;

    private AdaptiveGrid(int alphabetSize)
    {
        AlphabetSize = alphabetSize;
        Size = BitOperations.Log2(BitOperations.RoundUpToPowerOf2((uint)alphabetSize)) + 1;
        ChoiceBits = BitOperations.Log2(BitOperations.RoundUpToPowerOf2((uint)Size));
        _pairSeries = new RisingFactorialSeries[Size];
        for (int j = 0; j < Size; j++) _pairSeries[j] = new RisingFactorialSeries(Alpha(j));
        _pairTerms = new double[Kept * Size];
        _contextTerms = new double[Kept * Size];
        for (int n = 1; n < Kept; n++)
        {
            for (int j = 0; j < Size; j++)
            {
                _pairTerms[n * Size + j] = GammaFunction.RisingFactorialExcess(n, Alpha(j));
                _contextTerms[n * Size + j] = GammaFunction.RisingFactorialExcess(n, alphabetSize * Alpha(j));
            }
        }
    }

    public int AlphabetSize { get; }

    /// <summary>⌈log2 A⌉ + 1 values of α.</summary>
    public int Size { get; }

    /// <summary>⌈log2 Size⌉, what naming the chosen α costs.</summary>
    public int ChoiceBits { get; }

    public static AdaptiveGrid For(int alphabetSize) => s_grids.GetOrAdd(alphabetSize, static size => new AdaptiveGrid(size));

    public static double Alpha(int exponent) => Math.ScaleB(1, -exponent);

    /// <summary>Adds times · [ln Γ(n+α)/Γ(α) - n ln n + n] for every α.</summary>
    public void AddPairs(long n, double times, Span<NeumaierSum> nats)
    {
        if (n < Kept)
        {
            AddKept(_pairTerms, n, times, nats);
            return;
        }
        double lnN = Math.Log(n), inverse = 1.0 / n;
        for (int j = 0; j < _pairSeries.Length; j++) nats[j].Add(times * _pairSeries[j].At(lnN, inverse));
    }

    /// <summary>Adds times · [ln Γ(n+Aα)/Γ(Aα) - n ln n + n] for every α.</summary>
    public void AddContexts(long n, double times, Span<NeumaierSum> nats)
    {
        if (n < Kept)
        {
            AddKept(_contextTerms, n, times, nats);
            return;
        }
        for (int j = 0; j < Size; j++) nats[j].Add(times * GammaFunction.RisingFactorialExcess(n, AlphabetSize * Alpha(j)));
    }

    private void AddKept(double[] terms, long n, double times, Span<NeumaierSum> nats)
    {
        ReadOnlySpan<double> row = terms.AsSpan((int)n * Size, Size);
        for (int j = 0; j < row.Length; j++) nats[j].Add(times * row[j]);
    }
}
