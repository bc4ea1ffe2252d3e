namespace Tallybound.Tallies;

/// <summary>Counts of one view of a source: contexts of every order up to the highest, and non-overlapping symbol blocks.</summary>
/// <remarks>A tally is a commutative monoid: merging equals counting both inputs, in any order and however they were cut.
/// Bytes come in pieces; a piece says where it stands in its source and which bytes stand before it, so that no cut loses a context.
/// A symbol's fold is (byte offset of its first byte >> 12) &amp; 1. Not for two threads at once.</remarks>
public interface ISymbolTally
{
    /// <summary>Nominal alphabet size A.</summary>
    int AlphabetSize { get; }

    /// <summary>Highest context order counted.</summary>
    int HighestOrder { get; }

    /// <summary>Longest symbol block counted; 1: none.</summary>
    int LongestBlock { get; }

    /// <summary>Symbols counted, N.</summary>
    long Symbols { get; }

    /// <summary>Bytes that do not make a whole symbol at the end of the source.</summary>
    int LeftOverBytes { get; }

    /// <summary>Memory the counters take, in bytes.</summary>
    long MemoryBytes { get; }

    /// <summary>Begins a piece.</summary>
    /// <param name="byteOffset">Where it stands in its source: 0, or a multiple of 4 KiB.</param>
    /// <param name="before">The bytes just before it: at least as many as the contexts and blocks reach back, or all there are.</param>
    void Begin(long byteOffset, ReadOnlySpan<byte> before);

    /// <summary>Counts the next bytes of the piece; any length.</summary>
    void Append(ReadOnlySpan<byte> bytes);

    /// <summary>Adds the counts of another tally of the same view, orders and blocks.</summary>
    /// <exception cref="ArgumentException">It is of another kind.</exception>
    void Merge(ISymbolTally other);

    /// <summary>Writes the counts, versioned and with a checksum.</summary>
    void WriteTo(Stream stream);

    /// <summary>Shows every context in use of one order in ascending order.</summary>
    /// <param name="order">0 to <see cref="HighestOrder"/>.</param>
    /// <param name="visitor">Sees each.</param>
    void VisitContexts(int order, IContextVisitor visitor);

    /// <summary>The symbol blocks of one length, non-overlapping from the start of the source.</summary>
    /// <param name="length">2 to <see cref="LongestBlock"/>.</param>
    BlockCounts Blocks(int length);

    /// <summary>Gives back what only contexts above order 1 need; such orders cannot be visited afterwards, blocks can be taken.</summary>
    void ReleaseContexts();

    /// <summary>Empties the tally for the next source.</summary>
    void Clear();
}

/// <summary>Sees the contexts of a tally one by one.</summary>
public interface IContextVisitor
{
    /// <summary>Takes one context in use.</summary>
    /// <param name="context">Its symbols packed, the earliest one most significant; 0 for order 0.</param>
    /// <param name="symbols">The symbols that came after it, ascending.</param>
    /// <param name="fold0">How often each came in fold 0, aligned with <paramref name="symbols"/>.</param>
    /// <param name="fold1">The same in fold 1.</param>
    void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1);
}

/// <summary>Counts of symbol blocks in use.</summary>
/// <param name="Length">Symbols in a block, n.</param>
/// <param name="Symbols">Blocks in use, ascending; the first symbol is most significant.</param>
/// <param name="Counts">How often each came, aligned.</param>
public sealed record BlockCounts(int Length, int[] Symbols, long[] Counts);
