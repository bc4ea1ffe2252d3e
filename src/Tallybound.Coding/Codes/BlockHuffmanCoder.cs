using System.Numerics;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Tables;

namespace Tallybound.Coding.Codes;

/// <summary>Writes and reads a source n symbols at a time: the sparse table of its blocks, their words, and the left-over symbols plain.</summary>
public static class BlockHuffmanCoder
{
    /// <summary>Writes the table of the blocks in use.</summary>
    /// <param name="blocks">Blocks in use, ascending.</param>
    /// <param name="lengths">Their code lengths, aligned.</param>
    /// <param name="sink">Takes the bits.</param>
    public static void EncodeTable<TSink>(ReadOnlySpan<int> blocks, ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink => SparseTable.Encode(blocks, lengths, ref sink);

    /// <summary>Writes the payload: a word for each whole block, then ⌈log2 A⌉ bits for each symbol left over.</summary>
    /// <param name="symbols">The source.</param>
    /// <param name="alphabetSize">A; A^n fits 2^31.</param>
    /// <param name="blockLength">n, at least 1.</param>
    /// <param name="blocks">Blocks in use, ascending, first symbol most significant in base A.</param>
    /// <param name="lengths">Their code lengths, aligned.</param>
    /// <param name="sink">Takes the bits.</param>
    /// <exception cref="ArgumentException">A block of the source has no word.</exception>
    public static void EncodePayload<TSink>(ReadOnlySpan<int> symbols, int alphabetSize, int blockLength, ReadOnlySpan<int> blocks, ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        var code = new CanonicalCode(lengths);
        int whole = symbols.Length / blockLength * blockLength;
        for (int at = 0; at < whole; at += blockLength)
        {
            int block = 0;
            foreach (int symbol in symbols.Slice(at, blockLength)) block = (block * alphabetSize) + symbol;
            int place = blocks.BinarySearch(block);
            if (place < 0) throw new ArgumentException($"Block {block} has no word in this code.", nameof(symbols));
            sink.Write(code.Word(place), code.Length(place));
        }
        int plain = PlainBits(alphabetSize);
        foreach (int symbol in symbols[whole..]) sink.Write((ulong)symbol, plain);
    }

    /// <summary>Reads table and payload.</summary>
    /// <param name="reader">At the table.</param>
    /// <param name="alphabetSize">A.</param>
    /// <param name="blockLength">n.</param>
    /// <param name="symbols">Takes the source; its length is known from the framing.</param>
    /// <exception cref="InvalidDataException">The bits end early or make no such source.</exception>
    public static void Decode(ref BitReader reader, int alphabetSize, int blockLength, Span<int> symbols)
    {
        (int[] blocks, byte[] lengths) = SparseTable.Decode(ref reader);
        var code = new CanonicalCode(lengths);
        int whole = symbols.Length / blockLength * blockLength;
        Span<int> one = stackalloc int[1];
        for (int at = 0; at < whole; at += blockLength)
        {
            code.Decode(ref reader, one);
            int block = blocks[one[0]];
            for (int place = at + blockLength - 1; place >= at; place--) (block, symbols[place]) = Math.DivRem(block, alphabetSize);
        }
        int plain = PlainBits(alphabetSize);
        foreach (ref int symbol in symbols[whole..]) symbol = (int)reader.Read(plain);
    }

    private static int PlainBits(int alphabetSize) => alphabetSize <= 1 ? 0 : BitOperations.Log2((uint)alphabetSize - 1) + 1;
}
