using System.Numerics;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>The Markov chain of an encoder's states under independent symbols, and its steady rate.</summary>
/// <remarks>The states from which symbol s leads to one certain cell are neighbours, so a step of the chain needs prefix sums and no sum over symbols: 2^R operations.
/// The start is the weight 1/X, which a table with ideally spread cells keeps. Where a symbol costs a bit or more, plain steps settle quickly. Where it costs less, the state creeps up through the
/// table and plain steps would follow it round and round; steps that use the weights just set (Gauss–Seidel) take such a round trip at once.</remarks>
internal sealed class TansChain
{
    private const int MostSteps = 2000, MostPlainSteps = 100;

    [ThreadStatic]
    private static TansChain? t_chain;

    private int size;
    private int inUse;
    private int[] symbolOfCell = [];
    private int[] cellsBySymbol = [];
    private double[] weights = [];
    private double[] sums = [];
    private int[] slots = [];
    private Symbol[] symbols = [];
    private Origin[] origins = [];

    /// <summary>One chain a thread: its arrays serve one price after another.</summary>
    public static TansChain OfThisThread => t_chain ??= new TansChain();

    /// <summary>Mean bits given off by a step of the settled chain.</summary>
    /// <param name="counts">n(s), one in use at least.</param>
    /// <param name="frequencies">f(s), in all 2^R.</param>
    /// <param name="tableLog">R.</param>
    /// <param name="settled">The chain is settled when two steps in a row move the rate by no more than this.</param>
    public double SteadyRate(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog, double settled)
    {
        Lay(counts, frequencies, tableLog);
        double rate = Rate();
        bool creeping = false;
        for (int step = 0, calm = 0; step < MostSteps && calm < 2; step++)
        {
            double before = rate;
            if (!creeping && (before < 1 || step == MostPlainSteps))
            {
                FindOrigins();
                creeping = true;
            }
            if (creeping) StepInPlace();
            else Step();
            rate = Rate();
            calm = Math.Abs(rate - before) <= settled ? calm + 1 : 0;
        }
        return rate;
    }

    /// <summary>Lays out the cells by symbol, in ascending order, and the starting weights.</summary>
    private void Lay(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        size = 1 << tableLog;
        if (sums.Length <= size)
        {
            (symbolOfCell, cellsBySymbol, weights, sums) = (new int[size], new int[size], new double[size], new double[size + 1]);
            (symbols, origins) = (new Symbol[size], new Origin[size]);
        }
        if (slots.Length < counts.Length) slots = new int[counts.Length];
        TansSpread.Fill(frequencies, tableLog, symbolOfCell.AsSpan(0, size));
        double total = 0;
        foreach (long count in counts) total += count;
        inUse = 0;
        for (int symbol = 0, cells = 0; symbol < counts.Length; symbol++)
        {
            int frequency = frequencies[symbol];
            if (counts[symbol] > 0 && frequency == 0) throw new ArgumentException($"Symbol {symbol} is in use and has no cell.", nameof(frequencies));
            if (frequency == 0) continue;
            symbols[inUse++] = new Symbol(counts[symbol] / total, frequency, cells, tableLog - BitOperations.Log2((uint)frequency));
            slots[symbol] = cells;
            cells += frequency;
        }
        Span<int> next = slots, bySymbol = cellsBySymbol;
        ReadOnlySpan<int> ofCell = symbolOfCell.AsSpan(0, size);
        for (int cell = 0; cell < ofCell.Length; cell++) bySymbol[next[ofCell[cell]]++] = cell;
        StartWeights.Of(tableLog).CopyTo(sums.AsSpan(0, size + 1));
    }

    /// <summary>A symbol gives off its most bits from the states at and above f shifted by them, and one less below.</summary>
    private double Rate()
    {
        double rate = 0;
        foreach (ref readonly Symbol symbol in symbols.AsSpan(0, inUse)) rate += symbol.Chance * (symbol.MostBits - sums[(symbol.Frequency << symbol.MostBits) - size]);
        return rate;
    }

    private void Step()
    {
        ReadOnlySpan<double> before = sums.AsSpan(0, size + 1);
        Span<double> after = weights.AsSpan(0, size);
        foreach (ref readonly Symbol symbol in symbols.AsSpan(0, inUse))
        {
            int bits = symbol.MostBits, rank = symbol.Frequency, ranksOfMostBits = Math.Min(2 * rank, 1 << (BitOperations.Log2((uint)rank) + 1));
            ReadOnlySpan<int> cells = cellsBySymbol.AsSpan(symbol.FirstCell, rank);
            double chance = symbol.Chance, low = before[(rank << bits) - size];
            int at = 0;
            for (int end = ((rank + 1) << bits) - size; rank < ranksOfMostBits; rank++, end += 1 << bits)
            {
                double high = before[end];
                after[cells[at++]] = chance * (high - low);
                low = high;
            }
            if (at == cells.Length) continue;
            bits--;
            low = before[0];
            for (int end = ((rank + 1) << bits) - size; at < cells.Length; end += 1 << bits)
            {
                double high = before[end];
                after[cells[at++]] = chance * (high - low);
                low = high;
            }
        }
        Accumulate();
    }

    /// <summary>Four quarters are summed side by side, for an addition waits on the one before it.</summary>
    private void Accumulate()
    {
        int quarter = size / 4;
        Span<double> first = sums.AsSpan(1, quarter), second = sums.AsSpan(1 + quarter, quarter), third = sums.AsSpan(1 + (2 * quarter), quarter), fourth = sums.AsSpan(1 + (3 * quarter), quarter);
        ReadOnlySpan<double> weight1 = weights.AsSpan(0, quarter), weight2 = weights.AsSpan(quarter, quarter), weight3 = weights.AsSpan(2 * quarter, quarter), weight4 = weights.AsSpan(3 * quarter, quarter);
        double sum1 = 0, sum2 = 0, sum3 = 0, sum4 = 0;
        for (int i = 0; i < quarter; i++)
        {
            first[i] = sum1 += weight1[i];
            second[i] = sum2 += weight2[i];
            third[i] = sum3 += weight3[i];
            fourth[i] = sum4 += weight4[i];
        }
        sum2 += sum1;
        sum3 += sum2;
        for (int i = 0; i < quarter; i++)
        {
            second[i] += sum1;
            third[i] += sum2;
            fourth[i] += sum3;
        }
    }

    private void FindOrigins()
    {
        foreach (ref readonly Symbol symbol in symbols.AsSpan(0, inUse))
        {
            for (int i = 0; i < symbol.Frequency; i++)
            {
                int rank = symbol.Frequency + i, bits = symbol.MostBits;
                if (rank << bits >= 2 * size) bits--;
                int first = (rank << bits) - size;
                origins[cellsBySymbol[symbol.FirstCell + i]] = new Origin(symbol.Chance, first, first + (1 << bits));
            }
        }
    }

    /// <summary>Sums up to the cell at hand are new ones; beyond it they are old ones, which count from the old sum at the cell.</summary>
    private void StepInPlace()
    {
        double total = 0, oldAtCell = 0;
        Span<double> running = sums.AsSpan(0, size + 1);
        ReadOnlySpan<Origin> from = origins.AsSpan(0, size);
        for (int cell = 0; cell < from.Length; cell++)
        {
            ref readonly Origin origin = ref from[cell];
            double weight = running[origin.End] - running[origin.First];
            if (origin.First <= cell && origin.End > cell) weight += total - oldAtCell;
            total += origin.Chance * weight;
            oldAtCell = running[cell + 1];
            running[cell + 1] = total;
        }
        double scale = 1 / total;
        foreach (ref double sum in running) sum *= scale;
    }

    private readonly record struct Symbol(double Chance, int Frequency, int FirstCell, int MostBits);

    /// <summary>The states [First, End), as cells, from which a cell is reached by its symbol.</summary>
    private readonly record struct Origin(double Chance, int First, int End);

    /// <summary>Sums of the weights log2((X + 1)/X) from state 2^R on, one table for every R.</summary>
    private static class StartWeights
    {
        private static readonly double[]?[] s_byLog = new double[TansTableLog.Largest + 1][];

        public static ReadOnlySpan<double> Of(int tableLog) => Volatile.Read(ref s_byLog[tableLog]) ?? Build(tableLog);

        private static double[] Build(int tableLog)
        {
            double[] built = new double[(1 << tableLog) + 1];
            for (int cell = 0; cell < built.Length; cell++) built[cell] = Math.Log2(1 + ((double)cell / (1 << tableLog)));
            Volatile.Write(ref s_byLog[tableLog], built);
            return built;
        }
    }
}
