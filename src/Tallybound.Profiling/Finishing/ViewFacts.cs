using System.Numerics;

namespace Tallybound.Profiling.Finishing;

/// <summary>What the prices of a view need to know of it.</summary>
/// <param name="Name">Name of the view.</param>
/// <param name="AlphabetSize">A.</param>
/// <param name="Symbols">N.</param>
/// <param name="Counts">n(s) for each symbol of the alphabet.</param>
/// <param name="OutsideBits">Bits of bytes that stand outside the view, charged as framing.</param>
internal sealed record ViewFacts(string Name, int AlphabetSize, long Symbols, long[] Counts, long OutsideBits)
{
    /// <summary>Distinct symbols m.</summary>
    public int SymbolsInUse { get; } = Counts.Length - Counts.AsSpan().Count(0L);

    /// <summary>⌈log2 A⌉: bits of a symbol sent plain.</summary>
    public int PlainBits { get; } = BitOperations.Log2((uint)AlphabetSize - 1) + 1;

    /// <summary>Bits of all symbols sent plain, and of the bytes outside the view.</summary>
    public long RawBits => (Symbols * PlainBits) + OutsideBits;
}
