using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>Bits and kinds of table blocks, summed.</summary>
internal struct BlockTotals
{
    public long PayloadBits;
    public long TableBits;
    public long FramingBits;
    public long Stored;
    public long OneSymbol;
    public long LastTable;
    public long OwnTable;

    public readonly long TotalBits => PayloadBits + TableBits + FramingBits;

    public void Add(BlockKind kind, long payloadBits, long tableBits, long framingBits)
    {
        PayloadBits += payloadBits;
        TableBits += tableBits;
        FramingBits += framingBits;
        switch (kind)
        {
            case BlockKind.Stored: Stored++; break;
            case BlockKind.OneSymbol: OneSymbol++; break;
            case BlockKind.LastTable: LastTable++; break;
            default: OwnTable++; break;
        }
    }

    public void Add(BlockTotals other)
    {
        PayloadBits += other.PayloadBits;
        TableBits += other.TableBits;
        FramingBits += other.FramingBits;
        Stored += other.Stored;
        OneSymbol += other.OneSymbol;
        LastTable += other.LastTable;
        OwnTable += other.OwnTable;
    }
}
