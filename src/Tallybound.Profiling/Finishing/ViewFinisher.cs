using Tallybound.Coding;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Segments;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Finishing;

/// <summary>Turns the counts of one view into its record. One object a thread; it keeps its tables from source to source.</summary>
internal sealed class ViewFinisher(RunParameters parameters)
{
    /// <summary>Below this many bytes a source has too little of one fold to train on.</summary>
    private const long HeldOutFromBytes = 8192;

    /// <summary>From here on block codes can be large, and the tables of contexts are given back before they are built.</summary>
    private const long ReleaseAboveBytes = 16L << 20;

    private readonly Dictionary<(int Alphabet, int Order), ContextMeasures> measures = [];
    private readonly ContextHuffmanPrice contextPrice = new();
    private readonly CodeLadder ladder = new(parameters);
    private readonly BlockPricing blockPricing = new();

    /// <summary>What a view gives: its record, and the counts for drawings.</summary>
    public readonly record struct Finished(ViewProfile Profile, DrawingCountsOfView? Drawing);

    /// <summary>Finishes a view.</summary>
    /// <param name="name">The view's name.</param>
    /// <param name="tally">Its counts; large tables may be given back.</param>
    /// <param name="sourceBytes">Bytes of the source.</param>
    /// <param name="segments">Order-0 counts of its segments, in symbols of this view; null where it keeps none.</param>
    /// <param name="windows">Sample windows for block sizes below a segment; empty: none.</param>
    /// <param name="keepCounts">Whether counts for drawings are wanted.</param>
    /// <param name="keepPairs">Whether pair counts are wanted too.</param>
    public Finished Finish(string name, ISymbolTally tally, long sourceBytes, ViewSegments? segments, IReadOnlyList<byte[]> windows, bool keepCounts, bool keepPairs)
    {
        ViewFacts facts = Facts(name, tally);
        if (facts.Symbols == 0) return new Finished(Empty(facts), null);
        // What follows from the segments alone is worked out beside the rest where a second thread may be used and there is much of it.
        Task<AlongSource>? along = segments is not null && parameters.Threads > 1 && sourceBytes > ReleaseAboveBytes ? Task.Run(() => AlongSource.Of(segments, windows, sourceBytes, (ulong)parameters.Seed)) : null;
        Dictionary<string, IReadOnlyList<long[]>>? pairs = keepPairs && facts.AlphabetSize <= 256 ? [] : null;
        contextPrice.Begin(Math.Min(facts.AlphabetSize, 256));
        List<OrderProfile> orders = Orders(tally, facts, sourceBytes, segments, pairs);
        var prices = new List<CodePrice>();
        var notMet = new List<LimitNotMet>();
        ladder.Price(facts, orders[0].EntropyBitsPerSymbol, prices, notMet);
        SymbolSeries? lengths = keepCounts ? Series(facts.AlphabetSize, symbol => ladder.HuffmanLengths[symbol]) : null;
        if (sourceBytes > ReleaseAboveBytes) tally.ReleaseContexts();
        List<SymbolBlockProfile> blocks = Blocks(tally, facts, prices);
        if (orders.Count > 1 && facts.AlphabetSize <= 256) prices.Add(ContextHuffman(facts, orders[1]));
        (double chiSquare, int degrees, double tail) = Uniformity.ChiSquare(facts.Counts);
        var profile = Empty(facts) with
        {
            Orders = orders,
            Uniformity = new UniformityProfile(chiSquare, degrees, tail),
            Codes = prices,
            LimitsNotMet = notMet.Count > 0 ? notMet : null,
            SymbolBlocks = blocks,
        };
        if (segments is not null) profile = (along?.GetAwaiter().GetResult() ?? AlongSource.Of(segments, windows, sourceBytes, (ulong)parameters.Seed)).AddTo(profile);
        DrawingCountsOfView? drawing = keepCounts ? new DrawingCountsOfView(Series(facts.AlphabetSize, symbol => facts.Counts[symbol]), lengths, pairs) : null;
        return new Finished(profile, drawing);
    }

    private static ViewFacts Facts(string name, ISymbolTally tally)
    {
        var single = new SingleCounts(tally.AlphabetSize);
        tally.VisitContexts(0, single);
        return new ViewFacts(name, tally.AlphabetSize, tally.Symbols, single.Counts, 8L * tally.LeftOverBytes);
    }

    private static ViewProfile Empty(ViewFacts facts) => new()
    {
        View = facts.Name,
        AlphabetSize = facts.AlphabetSize,
        Symbols = facts.Symbols,
        SymbolsInUse = facts.SymbolsInUse,
        SideBits = 0,
        RawBits = facts.RawBits,
        StoredTotalBits = facts.Symbols == 0 ? facts.OutsideBits : facts.RawBits + Framing.Bits(facts.Symbols, 0, facts.Symbols * facts.PlainBits),
        Orders = [],
        Codes = [],
        SymbolBlocks = [],
    };

    private List<OrderProfile> Orders(ISymbolTally tally, ViewFacts facts, long sourceBytes, ViewSegments? segments, Dictionary<string, IReadOnlyList<long[]>>? pairs)
    {
        bool heldOut = sourceBytes >= HeldOutFromBytes;
        var orders = new List<OrderProfile>(tally.HighestOrder + 1);
        for (int order = 0; order <= tally.HighestOrder && facts.Symbols > order; order++)
        {
            ContextMeasures measure = MeasureOf(facts.AlphabetSize, order);
            measure.Reset(heldOut);
            bool priceContexts = order == 1 && facts.AlphabetSize <= 256;
            tally.VisitContexts(order, priceContexts ? new PairVisitor(measure, contextPrice, pairs) : new MeasuringVisitor(measure));
            Estimate? interval = order == 0 && segments is not null ? SegmentPricing.EntropyInterval(segments.Counts, (ulong)parameters.Seed) : null;
            orders.Add(OrderRecord(measure.Finish(facts.Symbols, heldOut), interval));
        }
        return orders;
    }

    private static OrderProfile OrderRecord(OrderFigures figures, Estimate? interval) => new()
    {
        Order = figures.Order,
        EntropyBitsPerSymbol = figures.EntropyBitsPerSymbol,
        EntropyBitsPerSymbolInterval = interval is { } known ? [known.Low, known.High] : null,
        CorrectedBitsPerSymbol = figures.CorrectedBitsPerSymbol,
        StandardErrorBits = figures.StandardErrorBits,
        AdaptiveBitsPerSymbol = figures.AdaptiveBitsPerSymbol,
        AdaptiveAlphaExponent = figures.AdaptiveAlphaExponent,
        HeldOutBitsPerSymbol = figures.HeldOutBitsPerSymbol,
        HeldOutEscapes = figures.HeldOutEscapes,
        ContextsInUse = figures.ContextsInUse,
        ContextsSeenUnder8 = figures.ContextsSeenUnder8,
        PairsInUse = figures.PairsInUse,
        ThinMass = figures.ThinMass,
        Exact = true,
    };

    private List<SymbolBlockProfile> Blocks(ISymbolTally tally, ViewFacts facts, List<CodePrice> prices)
    {
        var blocks = new List<SymbolBlockProfile>();
        for (int length = 2; length <= tally.LongestBlock; length++)
        {
            if (blockPricing.Price(facts, tally, length) is not { } priced) continue;
            blocks.Add(priced.Profile);
            prices.Add(priced.Price);
        }
        return blocks;
    }

    private CodePrice ContextHuffman(ViewFacts facts, OrderProfile order1)
    {
        (long tableBits, TableFormat format) = contextPrice.Tables();
        double bound = (facts.Symbols - 1) * order1.EntropyBitsPerSymbol / facts.Symbols;
        return new PriceMaker(facts, bound, "context").Make("context-huffman", contextPrice.PayloadBits + facts.PlainBits, tableBits, format.Name()) with { LongestCode = contextPrice.LongestCode };
    }

    private ContextMeasures MeasureOf(int alphabet, int order)
    {
        if (measures.TryGetValue((alphabet, order), out ContextMeasures? measure)) return measure;
        measure = new ContextMeasures(alphabet, order);
        measures.Add((alphabet, order), measure);
        return measure;
    }

    private static SymbolSeries Series(int alphabet, Func<int, long> number)
    {
        if (alphabet <= 256) return SymbolSeries.FromDense([.. Enumerable.Range(0, alphabet).Select(number)]);
        return SymbolSeries.FromPairs([.. Enumerable.Range(0, alphabet).Where(symbol => number(symbol) > 0).Select(symbol => new[] { symbol, number(symbol) })]);
    }
}
