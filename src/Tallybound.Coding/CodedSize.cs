namespace Tallybound.Coding;

/// <summary>What a named code really spends on a source: provable by writing the bits.</summary>
/// <param name="Code">The code's name, such as <c>huffman</c>.</param>
/// <param name="PayloadBits">Bits of the coded symbols, at least 0.</param>
/// <param name="TableBits">Bits of the table that a decoder needs, at least 0.</param>
/// <param name="FramingBits">Bits of kind, length and padding, at least 0.</param>
public readonly record struct CodedSize(string Code, long PayloadBits, long TableBits, long FramingBits)
{
    /// <summary>Payload + table + framing.</summary>
    public long TotalBits => PayloadBits + TableBits + FramingBits;
}
