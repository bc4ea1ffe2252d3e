namespace Tallybound.Profiling.Records;

/// <summary>Symbols coded n at a time, non-overlapping from the start of the source.</summary>
public sealed record SymbolBlockProfile
{
    /// <summary>Symbols in a block, n.</summary>
    public required int BlockLength { get; init; }

    /// <summary>Whole blocks, ⌊N/n⌋.</summary>
    public required long Blocks { get; init; }

    /// <summary>Distinct blocks seen.</summary>
    public required long BlocksInUse { get; init; }

    /// <summary>Entropy of the observed blocks ÷ n, left-over symbols not counted.</summary>
    public required double BlockEntropyBitsPerSymbol { get; init; }

    /// <summary>A code for the product of the order-0 distribution with itself: what blocking alone wins back. Absent where it is not computed.</summary>
    public IndependentExtension? Independent { get; init; }

    /// <summary>A code for the blocks that really stand in the source.</summary>
    public required ObservedBlocks Observed { get; init; }
}

/// <summary>Huffman code of the n-th extension of the order-0 distribution.</summary>
public sealed record IndependentExtension
{
    /// <summary>Expected code length ÷ n, in bit/symbol; an expected rate, not a payload.</summary>
    public required double ExpectedBitsPerSymbol { get; init; }

    /// <summary>Bits of its table; absent where so many different weights occur that its lengths were not found (<see cref="Tallybound.Coding.Codes.HuffmanExtension"/>).</summary>
    public long? TableBits { get; init; }

    /// <summary>Expected payload, left-over symbols, table and framing, rounded to whole bytes; absent with <see cref="TableBits"/>.</summary>
    public long? ExpectedTotalBits { get; init; }
}

/// <summary>Huffman code of the observed blocks: a coded size.</summary>
/// <param name="PayloadBits">Bits of the blocks' code words and of the left-over symbols sent plain.</param>
/// <param name="TableBits">Bits of the table.</param>
/// <param name="FramingBits">Bits of kind, length and padding.</param>
/// <param name="TotalBits">Their sum: whole bytes.</param>
public sealed record ObservedBlocks(long PayloadBits, long TableBits, long FramingBits, long TotalBits);
