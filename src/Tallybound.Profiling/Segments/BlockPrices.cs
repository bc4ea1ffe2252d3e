using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>What one block costs in the ways that no table format changes.</summary>
internal struct BlockPrices
{
    private readonly long headBits;

    public BlockPrices(BlockStatistics block, int plainBits)
    {
        Block = block;
        headBits = 2 + EliasDelta.Length(block.Symbols + 1);
        PlainKind = BlockKind.Stored;
        PlainPayload = block.Symbols * plainBits;
        PlainBytes = Bytes(PlainPayload);
        if (block.InUse == 1 && Bytes(plainBits) < PlainBytes)
        {
            PlainKind = BlockKind.OneSymbol;
            PlainPayload = plainBits;
            PlainBytes = Bytes(plainBits);
        }
    }

    public BlockStatistics Block { get; }

    /// <summary>The cheaper kind of those that need no code: stored or one symbol.</summary>
    public BlockKind PlainKind { get; }

    public long PlainPayload { get; }

    public long PlainBytes { get; }

    /// <summary>Payload bits under the block's own code; −1 until it is built.</summary>
    public long OwnPayload { get; set; } = -1;

    /// <summary>Whole bytes of the block when table and payload take so many bits.</summary>
    public readonly long Bytes(long bits) => (headBits + bits + 7) >> 3;
}
