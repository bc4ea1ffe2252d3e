using System.Numerics;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Tables;

namespace Tallybound.Coding.Codes;

/// <summary>Writes and reads a source with one Huffman table a previous symbol: a map of the contexts in use, a sparse table for each, the first symbol plain, then a word a symbol.</summary>
public static class ContextHuffmanCoder
{
    /// <summary>Writes map and tables.</summary>
    /// <param name="lengths">For each context of the alphabet the lengths of its symbols, or null where it is not in use.</param>
    /// <param name="sink">Takes the bits.</param>
    public static void EncodeTables<TSink>(ReadOnlySpan<byte[]?> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        foreach (byte[]? context in lengths) sink.Write(context is null ? 0UL : 1UL, 1);
        foreach (byte[]? context in lengths)
        {
            if (context is null) continue;
            int[] symbols = [.. Enumerable.Range(0, context.Length).Where(symbol => context[symbol] > 0)];
            byte[] inUse = Array.ConvertAll(symbols, symbol => context[symbol]);
            SparseTable.Encode(symbols, inUse, ref sink);
        }
    }

    /// <summary>Writes the payload.</summary>
    /// <exception cref="ArgumentException">A symbol has no word after its context.</exception>
    public static void EncodePayload<TSink>(ReadOnlySpan<int> symbols, ReadOnlySpan<byte[]?> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        if (symbols.IsEmpty) return;
        CanonicalCode?[] codes = Codes(lengths);
        sink.Write((ulong)symbols[0], PlainBits(lengths.Length));
        for (int at = 1; at < symbols.Length; at++)
        {
            CanonicalCode code = codes[symbols[at - 1]] ?? throw new ArgumentException($"Context {symbols[at - 1]} has no table.", nameof(symbols));
            code.Encode(symbols.Slice(at, 1), ref sink);
        }
    }

    /// <summary>Reads tables and payload.</summary>
    /// <param name="reader">At the map.</param>
    /// <param name="alphabetSize">A.</param>
    /// <param name="symbols">Takes the source; its length is known from the framing.</param>
    /// <exception cref="InvalidDataException">The bits end early or make no such source.</exception>
    public static void Decode(ref BitReader reader, int alphabetSize, Span<int> symbols)
    {
        var inUse = new bool[alphabetSize];
        foreach (ref bool used in inUse.AsSpan()) used = reader.Read(1) == 1;
        var lengths = new byte[]?[alphabetSize];
        for (int context = 0; context < alphabetSize; context++)
        {
            if (!inUse[context]) continue;
            (int[] present, byte[] words) = SparseTable.Decode(ref reader);
            lengths[context] = new byte[alphabetSize];
            for (int i = 0; i < present.Length; i++)
                lengths[context]![present[i] < alphabetSize ? present[i] : throw new InvalidDataException($"Symbol {present[i]} is outside the alphabet of {alphabetSize}.")] = words[i];
        }
        if (symbols.IsEmpty) return;
        CanonicalCode?[] codes = Codes(lengths);
        symbols[0] = (int)reader.Read(PlainBits(alphabetSize));
        for (int at = 1; at < symbols.Length; at++)
            (codes[symbols[at - 1]] ?? throw new InvalidDataException($"Context {symbols[at - 1]} has no table.")).Decode(ref reader, symbols.Slice(at, 1));
    }

    private static CanonicalCode?[] Codes(ReadOnlySpan<byte[]?> lengths)
    {
        var codes = new CanonicalCode?[lengths.Length];
        for (int context = 0; context < codes.Length; context++)
            if (lengths[context] is { } of) codes[context] = new CanonicalCode(of);
        return codes;
    }

    private static int PlainBits(int alphabetSize) => alphabetSize <= 1 ? 0 : BitOperations.Log2((uint)alphabetSize - 1) + 1;
}
