using Tallybound.Coding.Codes;
using Tallybound.Coding.Codes.Range;
using Tallybound.Coding.Codes.Tans;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Finishing;

/// <summary>Prices the single-symbol codes of a view from its order-0 counts, each as one table block with a table of its own.</summary>
/// <remarks>Block and context codes join the list from the tallies that know them.</remarks>
internal sealed class CodeLadder(RunParameters parameters)
{
    /// <summary>Longest code length that a table format takes.</summary>
    private const int LongestPriced = 127;

    private byte[] free = new byte[256];
    private byte[] other = new byte[256];

    /// <summary>Lengths of the free Huffman code of the view priced last, one a symbol of its alphabet.</summary>
    public ReadOnlySpan<byte> HuffmanLengths => free;

    /// <summary>Adds the prices of a view with at least one symbol.</summary>
    /// <param name="facts">The view.</param>
    /// <param name="entropyBitsPerSymbol">H0.</param>
    /// <param name="prices">Takes the prices, in the order they are shown.</param>
    /// <param name="notMet">Takes limits that were asked for and cannot be met.</param>
    public void Price(ViewFacts facts, double entropyBitsPerSymbol, List<CodePrice> prices, List<LimitNotMet> notMet)
    {
        if (free.Length != facts.AlphabetSize) (free, other) = (new byte[facts.AlphabetSize], new byte[facts.AlphabetSize]);
        var price = new PriceMaker(facts, entropyBitsPerSymbol, "memoryless");
        prices.Add(price.Make("fixed", FixedCode.PayloadBits(facts.Counts), FixedCode.TableBits(facts.AlphabetSize), "map of symbols in use") with
        {
            LongestCode = FixedCode.Width(facts.SymbolsInUse),
        });
        Huffman.Lengths(facts.Counts, free);
        CodePrice huffman = PriceHuffman(facts, price);
        prices.Add(huffman);
        foreach (int limit in parameters.LengthLimits) AddLimited(facts, price, limit, huffman, prices, notMet);
        foreach (int radix in parameters.Radices) AddRadix(facts, entropyBitsPerSymbol, radix, prices);
        AddTans(facts, price, prices);
        AddRange(facts, price, prices);
    }

    private CodePrice PriceHuffman(ViewFacts facts, PriceMaker price)
    {
        (long tableBits, TableFormat format) = TablePricing.Cheapest(free);
        return price.Make("huffman", Huffman.PayloadDigits(facts.Counts, free), tableBits, format.Name()) with
        {
            LongestCode = Longest(free),
            KraftSum = KraftSum.Of(free, 2),
            RedundancyBoundBitsPerSymbol = facts.SymbolsInUse > 1 ? RedundancyBound.Gallager(facts.Counts) : null,
        };
    }

    private void AddLimited(ViewFacts facts, PriceMaker price, int limit, CodePrice huffman, List<CodePrice> prices, List<LimitNotMet> notMet)
    {
        bool same = huffman.LongestCode <= limit;
        if (!same && !LengthLimited.TryLengths(facts.Counts, limit, other))
        {
            if (parameters.LengthLimitsAsked) notMet.Add(new LimitNotMet(limit, FixedCode.Width(facts.SymbolsInUse)));
            return;
        }
        if (same)
        {
            // A limit that the free code keeps changes nothing; the entry stands all the same.
            prices.Add(huffman with { Code = "huffman-limited", LengthLimit = limit, LimitCostBits = 0, SymbolsAtLimit = AtLength(free, limit), RedundancyBoundBitsPerSymbol = null });
            return;
        }
        (long tableBits, TableFormat format) = TablePricing.Cheapest(other);
        long payload = Huffman.PayloadDigits(facts.Counts, other);
        prices.Add(price.Make("huffman-limited", payload, tableBits, format.Name()) with
        {
            LengthLimit = limit,
            LongestCode = Longest(other),
            KraftSum = KraftSum.Of(other, 2),
            LimitCostBits = payload - huffman.PayloadBits,
            SymbolsAtLimit = AtLength(other, limit),
        });
    }

    private void AddRadix(ViewFacts facts, double entropyBitsPerSymbol, int radix, List<CodePrice> prices)
    {
        if (radix == 2) return;
        Huffman.Lengths(facts.Counts, other, radix);
        long digits = Huffman.PayloadDigits(facts.Counts, other);
        double rate = (double)digits / facts.Symbols, entropy = entropyBitsPerSymbol / Math.Log2(radix);
        prices.Add(new CodePrice
        {
            Code = "huffman",
            Radix = radix,
            BlockLength = 1,
            PayloadDigits = digits,
            DigitsPerSymbol = rate,
            Efficiency = entropy / rate,
            LongestCode = Longest(other),
            KraftSum = KraftSum.Of(other, radix),
            BoundClass = "memoryless",
            Exact = true,
        });
    }

    private static void AddTans(ViewFacts facts, PriceMaker price, List<CodePrice> prices)
    {
        int log = TansTableLog.For(facts.Symbols, facts.SymbolsInUse);
        if (facts.SymbolsInUse > 1 << log) return;
        Span<int> frequencies = facts.AlphabetSize <= 256 ? stackalloc int[facts.AlphabetSize] : new int[facts.AlphabetSize];
        if (!QuantizedFrequencies.TryFit(facts.Counts, log, frequencies)) return;
        prices.Add(price.Make("tans", TansPrice.PayloadBits(facts.Counts, frequencies, log), Rfc8878FseDistribution.Bits(frequencies, log), TableFormat.Rfc8878FseDistribution.Name()) with
        {
            Parameter = log,
            Exact = false,
        });
    }

    private static void AddRange(ViewFacts facts, PriceMaker price, List<CodePrice> prices)
    {
        int log = RangeFrequencyBits.For(facts.Symbols, facts.SymbolsInUse);
        Span<int> frequencies = facts.AlphabetSize <= 256 ? stackalloc int[facts.AlphabetSize] : new int[facts.AlphabetSize];
        if (!QuantizedFrequencies.TryFit(facts.Counts, log, frequencies)) return;
        prices.Add(price.Make("range", RangePrice.PayloadBits(facts.Counts, frequencies, log), Rfc8878FseDistribution.Bits(frequencies, log), TableFormat.Rfc8878FseDistribution.Name()) with
        {
            Parameter = log,
            Exact = false,
        });
    }

    private static int Longest(ReadOnlySpan<byte> lengths)
    {
        byte longest = 0;
        foreach (byte length in lengths) longest = Math.Max(longest, length);
        return Math.Min(longest, (byte)LongestPriced);
    }

    private static int AtLength(ReadOnlySpan<byte> lengths, int limit) => limit > byte.MaxValue ? 0 : lengths.Count((byte)limit);
}
