using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Finishing;

/// <summary>Completes a code's price with framing, rate, efficiency and break-even.</summary>
/// <param name="facts">The view, with at least one symbol.</param>
/// <param name="entropyBitsPerSymbol">The bound of the code's class, in bit/symbol of all N symbols.</param>
/// <param name="boundClass">The class: <c>memoryless</c>, <c>block</c> or <c>context</c>.</param>
internal readonly struct PriceMaker(ViewFacts facts, double entropyBitsPerSymbol, string boundClass)
{
    /// <summary>A price of radix 2 for single symbols; others change what differs.</summary>
    public CodePrice Make(string code, long payloadBits, long tableBits, string? tableFormat)
    {
        long framing = Framing.Bits(facts.Symbols, tableBits, payloadBits) + facts.OutsideBits;
        double rate = (double)payloadBits / facts.Symbols;
        return new CodePrice
        {
            Code = code,
            Radix = 2,
            BlockLength = 1,
            PayloadBits = payloadBits,
            TableBits = tableBits,
            FramingBits = framing,
            TotalBits = payloadBits + tableBits + framing,
            BitsPerSymbol = rate,
            Efficiency = payloadBits == 0 ? null : entropyBitsPerSymbol / rate,
            RedundancyBitsPerSymbol = rate - entropyBitsPerSymbol,
            BreakEvenSymbols = rate < facts.PlainBits ? (long)Math.Ceiling((tableBits + framing) / (facts.PlainBits - rate)) : null,
            TableFormat = tableFormat,
            BoundClass = boundClass,
            Exact = true,
        };
    }
}
