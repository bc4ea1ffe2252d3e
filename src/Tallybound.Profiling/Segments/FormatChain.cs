using System.Runtime.Intrinsics;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>The blocks so far with their tables in one format: what they cost, and the table sent last.</summary>
internal sealed class FormatChain(TableFormat format, int alphabetSize)
{
    /// <summary>Bits of every block so far.</summary>
    public BlockTotals Totals;

    private readonly byte[] lengths = new byte[alphabetSize];

    public TableFormat Format => format;

    /// <summary>Kind of the block priced last.</summary>
    public BlockKind Kind { get; private set; }

    /// <summary>Number of the block that carried the last table; −1 before the first.</summary>
    public long LastTableBlock { get; private set; } = -1;

    /// <summary>Symbols that have a word in the last table.</summary>
    public Vector256<ulong> LastTableUsed { get; private set; }

    /// <summary>Lengths of the last table, by symbol.</summary>
    public ReadOnlySpan<byte> LastTable => lengths;

    public void Begin()
    {
        Totals = default;
        LastTableBlock = -1;
    }

    public void Add(BlockKind kind, long symbols, long payloadBits, long tableBits)
    {
        Kind = kind;
        Totals.Add(kind, payloadBits, tableBits, Framing.Bits(symbols, tableBits, payloadBits));
    }

    public void KeepTable(ReadOnlySpan<byte> own, long block, Vector256<ulong> used)
    {
        own.CopyTo(lengths);
        LastTableBlock = block;
        LastTableUsed = used;
    }
}
