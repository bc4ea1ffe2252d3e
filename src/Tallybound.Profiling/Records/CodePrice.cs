using System.Text.Json.Serialization;

namespace Tallybound.Profiling.Records;

/// <summary>What one named code costs on a view, taken as one table block with a table of its own.</summary>
/// <remarks>(Code, Radix, LengthLimit, BlockLength, Parameter) identify an entry. For radix 2 the sizes are in bits;
/// for another radix <see cref="PayloadDigits"/> and <see cref="DigitsPerSymbol"/> stand instead and no total is given.</remarks>
public sealed record CodePrice
{
    /// <summary>The code's name, such as <c>huffman</c>.</summary>
    public required string Code { get; init; }

    /// <summary>Digits of the channel alphabet, 2 to 16.</summary>
    public required int Radix { get; init; }

    /// <summary>Greatest code length allowed, in bits; null: none.</summary>
    [JsonIgnore(Condition = JsonIgnoreCondition.Never)]
    public int? LengthLimit { get; init; }

    /// <summary>Symbols coded as one; 1 for single symbols.</summary>
    public required int BlockLength { get; init; }

    /// <summary>The code's parameter (log2 of the table's states for <c>tans</c>, bits of a frequency for <c>range</c>); null: none.</summary>
    [JsonIgnore(Condition = JsonIgnoreCondition.Never)]
    public int? Parameter { get; init; }

    /// <summary>Bits of the coded symbols, left-over symbols included, table excluded.</summary>
    public long? PayloadBits { get; init; }

    /// <summary>Bits of the table in <see cref="TableFormat"/>.</summary>
    public long? TableBits { get; init; }

    /// <summary>Bits of kind, length and padding, and of bytes outside the view.</summary>
    public long? FramingBits { get; init; }

    /// <summary>Payload + table + framing: whole bytes.</summary>
    public long? TotalBits { get; init; }

    /// <summary>Payload ÷ symbols.</summary>
    public double? BitsPerSymbol { get; init; }

    /// <summary>Digits of the coded symbols in a radix other than 2.</summary>
    public long? PayloadDigits { get; init; }

    /// <summary>Digits a symbol in a radix other than 2.</summary>
    public double? DigitsPerSymbol { get; init; }

    /// <summary>Entropy of the bound's class ÷ rate, both in the code's radix; 0 when the entropy is 0 and the rate is not; absent when the rate is 0.</summary>
    public double? Efficiency { get; init; }

    /// <summary>Rate − entropy of the bound's class, in bit/symbol.</summary>
    public double? RedundancyBitsPerSymbol { get; init; }

    /// <summary>Gallager's bound on the redundancy of a free Huffman code, p1 + 0.0861 bit/symbol (1978); for <c>huffman</c> only.</summary>
    public double? RedundancyBoundBitsPerSymbol { get; init; }

    /// <summary>Exact Kraft sum Σ D^−length as a reduced fraction, <c>1</c> when it is one.</summary>
    public string? KraftSum { get; init; }

    /// <summary>Greatest code length in use, in digits of the radix.</summary>
    public int? LongestCode { get; init; }

    /// <summary>Bits of payload that the limit costs over the free code; for limited codes.</summary>
    public long? LimitCostBits { get; init; }

    /// <summary>Symbols whose code has the limit's length; for limited codes.</summary>
    public int? SymbolsAtLimit { get; init; }

    /// <summary>Symbols from which table and framing are won back against stored symbols; absent when the code never wins.</summary>
    public long? BreakEvenSymbols { get; init; }

    /// <summary>The serialisation that the table was priced in; absent when the code has no table.</summary>
    public string? TableFormat { get; init; }

    /// <summary>The class of coder whose entropy the efficiency is taken against: <c>memoryless</c>, <c>block</c> or <c>context</c>.</summary>
    public required string BoundClass { get; init; }

    /// <summary>True when the size is that of bits a coder writes; false when it is priced from counts.</summary>
    public required bool Exact { get; init; }
}
