namespace Tallybound.Coding.Tables;

/// <summary>How a table block is sent; 2 bits of its framing.</summary>
public enum BlockKind
{
    /// <summary>Every symbol plain, in ⌈log2 A⌉ bits; no table.</summary>
    Stored,

    /// <summary>Coded with the table that the block carries.</summary>
    OwnTable,

    /// <summary>Coded with the table of the last block that carried one.</summary>
    LastTable,

    /// <summary>One symbol throughout, sent once in ⌈log2 A⌉ bits.</summary>
    OneSymbol,
}
