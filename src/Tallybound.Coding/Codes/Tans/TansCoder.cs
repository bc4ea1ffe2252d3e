using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>Codes and decodes with one tANS state. The payload is the encoder's last cell in R bits, then the words it gave off, the last one first.</summary>
public static class TansCoder
{
    /// <summary>Codes the symbols from the last to the first, from state 2^R on.</summary>
    /// <param name="symbols">Symbols in use in the table.</param>
    /// <param name="table">The machine.</param>
    /// <param name="sink">Takes the payload; one that packs the most significant bit first can be read back by <see cref="Decode"/>.</param>
    /// <exception cref="ArgumentException">A symbol is not in use.</exception>
    public static void Encode<TSink>(ReadOnlySpan<int> symbols, TansTable table, ref TSink sink)
        where TSink : IBitSink
    {
        int[] words = new int[symbols.Length];
        byte[] bits = new byte[symbols.Length];
        int cell = 0;
        for (int i = symbols.Length - 1; i >= 0; i--)
        {
            (cell, words[i], int given) = table.Step(cell, symbols[i]);
            bits[i] = (byte)given;
        }
        sink.Write((ulong)cell, table.TableLog);
        for (int i = 0; i < words.Length; i++) sink.Write((ulong)words[i], bits[i]);
    }

    /// <summary>Reads as many symbols as <paramref name="symbols"/> has room for.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or the machine does not come back to state 2^R.</exception>
    public static void Decode(ref BitReader reader, TansTable table, Span<int> symbols)
    {
        int cell = (int)reader.Read(table.TableLog);
        for (int i = 0; i < symbols.Length; i++)
        {
            symbols[i] = table.SymbolOf(cell);
            cell = table.BaselineOf(cell) + (int)reader.Read(table.BitsOf(cell));
        }
        if (cell != 0) throw new InvalidDataException($"The machine ends in cell {cell}, not in the encoder's first.");
    }
}
