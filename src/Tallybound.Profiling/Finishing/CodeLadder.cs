using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Finishing;

/// <summary>Prices the single-symbol codes of a view from its order-0 counts, each as one table block with a table of its own.</summary>
/// <remarks>Block and context codes join the list from the tallies that know them.</remarks>
internal sealed class CodeLadder(RunParameters parameters)
{
    private readonly byte[] lengths = new byte[1 << 16];
    private readonly byte[] limitedLengths = new byte[1 << 16];

    /// <summary>Lengths of the free Huffman code of the view priced last, one a symbol of its alphabet.</summary>
    public ReadOnlySpan<byte> HuffmanLengths(ViewFacts facts) => lengths.AsSpan(0, facts.AlphabetSize);

    /// <summary>Adds the prices of a view with at least one symbol.</summary>
    public void Price(ViewFacts facts, double entropyBitsPerSymbol, List<CodePrice> prices, List<LimitNotMet> notMet)
    {
        AddFixed(facts, entropyBitsPerSymbol, prices);
        long freePayload = AddHuffman(facts, entropyBitsPerSymbol, prices);
        foreach (int limit in parameters.LengthLimits) AddLimited(facts, entropyBitsPerSymbol, limit, freePayload, prices, notMet);
        foreach (int radix in parameters.Radices) AddRadix(facts, entropyBitsPerSymbol, radix, prices);
        AddTans(facts, entropyBitsPerSymbol, prices);
        AddRange(facts, entropyBitsPerSymbol, prices);
    }
}
