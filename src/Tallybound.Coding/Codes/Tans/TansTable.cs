using System.Numerics;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>The states of a tANS machine: 2^R cells, each with its symbol, and what coding into a cell or out of it does (J. Duda, Asymmetric numeral systems, 2013; spread of RFC 8878 §4.1.1).</summary>
/// <remarks>The encoder's state X lies in [2^R, 2^(R+1)). To code symbol s of frequency f it gives off its low bits until f ≤ X &lt; 2f and takes the (X − f)-th cell of s, in ascending order, as its next state.</remarks>
public sealed class TansTable
{
    private readonly int[] symbolOfCell;
    private readonly int[] rankInFrequency;
    private readonly int[] firstCell;
    private readonly int[] cellsBySymbol;
    private readonly int[] frequencies;

    /// <summary>Builds the table.</summary>
    /// <param name="frequencies">One a symbol; 0 for a symbol not in use; −1 for one of RFC 8878's "less than 1" symbols, which take one cell each at the end of the table. In all 2^R cells.</param>
    /// <param name="tableLog">R, 5 to 16.</param>
    /// <exception cref="ArgumentException">The frequencies do not take 2^R cells.</exception>
    public TansTable(ReadOnlySpan<int> frequencies, int tableLog)
    {
        TableLog = tableLog;
        int size = 1 << tableLog;
        symbolOfCell = new int[size];
        rankInFrequency = new int[size];
        cellsBySymbol = new int[size];
        firstCell = new int[frequencies.Length];
        this.frequencies = new int[frequencies.Length];
        TansSpread.Fill(frequencies, tableLog, symbolOfCell);
        int cells = 0;
        for (int symbol = 0; symbol < frequencies.Length; symbol++)
        {
            firstCell[symbol] = cells;
            cells += this.frequencies[symbol] = Math.Abs(frequencies[symbol]);
        }
        int[] next = [.. firstCell];
        for (int cell = 0; cell < size; cell++)
        {
            int symbol = symbolOfCell[cell];
            rankInFrequency[cell] = this.frequencies[symbol] + next[symbol] - firstCell[symbol];
            cellsBySymbol[next[symbol]++] = cell;
        }
    }

    /// <summary>R.</summary>
    public int TableLog { get; }

    /// <summary>The symbol of a cell, 0 ≤ cell &lt; 2^R.</summary>
    public int SymbolOf(int cell) => symbolOfCell[cell];

    /// <summary>Bits that a decoder in this cell reads to move on.</summary>
    public int BitsOf(int cell) => TableLog - BitOperations.Log2((uint)rankInFrequency[cell]);

    /// <summary>The cell that a decoder in this cell moves to when the bits it reads are all 0.</summary>
    public int BaselineOf(int cell) => (rankInFrequency[cell] << BitsOf(cell)) - (1 << TableLog);

    /// <summary>Codes one symbol from one cell.</summary>
    /// <returns>The next cell, and the bits given off.</returns>
    /// <exception cref="ArgumentException">The symbol is not in use.</exception>
    public (int Cell, int Word, int Bits) Step(int cell, int symbol)
    {
        int frequency = frequencies[symbol];
        if (frequency == 0) throw new ArgumentException($"Symbol {symbol} has no cell.", nameof(symbol));
        int state = cell + (1 << TableLog), bits = TableLog - BitOperations.Log2((uint)frequency);
        if (state >> bits < frequency) bits--;
        return (cellsBySymbol[firstCell[symbol] + (state >> bits) - frequency], state & ((1 << bits) - 1), bits);
    }
}
