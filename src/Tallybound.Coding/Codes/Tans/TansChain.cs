using System.Numerics;
using System.Runtime.CompilerServices;
using System.Runtime.InteropServices;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>The Markov chain of an encoder's states under independent symbols, and its steady rate.</summary>
/// <remarks>The states from which symbol s leads to one certain cell are neighbours, so a step of the chain needs prefix sums and no sum over symbols: 2^R operations.
/// The start is the weight 1/X, which a table with ideally spread cells keeps. Where a symbol costs a bit or more, plain steps settle quickly. Where it costs less, the state creeps up through the
/// table and plain steps would follow it round and round; steps that use the weights just set (Gauss–Seidel) take such a round trip at once.
/// Chains of nearly equal powers of two, or of two round trips that seldom meet, forget their state slowly under either kind: from the sixteenth step on the kinds alternate and every
/// eighth step is followed by a leap. After 2^21 cells (512 steps at R = 12) the rate stands as it is.</remarks>
internal sealed class TansChain
{
    private const int MostCells = 1 << 21, MostStepsOfOneKind = 16, StepsOfALeap = 8;

    private const double LeastPlainRate = 0.7, LongestMemory = 0.9999, SameDirection = 0.999, LongestShrinking = 0.98;

    [ThreadStatic]
    private static TansChain? t_chain;

    private int size;
    private int inUse;
    private int[] symbolOfCell = [];
    private uint[] origins = [];
    private double[] chances = [];
    private double[] sums = [];
    private double[] nextSums = [];
    private double[] twoBefore = [];
    private double[] fourBefore = [];
    private Slot[] slots = [];

    /// <summary>One chain a thread: its arrays serve one price after another.</summary>
    public static TansChain OfThisThread => t_chain ??= new TansChain();

    /// <summary>Mean bits given off by a step of the settled chain.</summary>
    /// <param name="counts">n(s), one in use at least.</param>
    /// <param name="frequencies">f(s), in all 2^R.</param>
    /// <param name="tableLog">R.</param>
    /// <param name="settled">The chain is settled when two steps in a row move the rate, with all that would follow if the moves went on shrinking as they did, by no more than this.</param>
    public double SteadyRate(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog, double settled)
    {
        Lay(counts, frequencies, tableLog);
        double rate = Rate(), move = double.NaN;
        bool creeping = rate < LeastPlainRate;
        for (int step = 1, calm = 0; step <= MostCells / size && calm < 2; step++)
        {
            if (creeping || (step > MostStepsOfOneKind && (step & 1) == 0)) StepInPlace();
            else Step();
            double before = rate, moveBefore = move;
            rate = Rate();
            move = Math.Abs(rate - before);
            double shrinking = Math.Min(move / moveBefore, LongestShrinking);
            calm = move == 0 || move * Math.Max(1, shrinking / (1 - shrinking)) <= settled ? calm + 1 : 0;
            if (step < MostStepsOfOneKind || calm == 2) continue;
            int phase = step % StepsOfALeap;
            if (phase == 0 && step >= MostStepsOfOneKind + StepsOfALeap)
            {
                Leap();
                (rate, move, calm) = (Rate(), double.NaN, 0);
            }
            else if (phase == StepsOfALeap - 4)
            {
                sums.AsSpan(0, size + 1).CopyTo(fourBefore);
            }
            else if (phase == StepsOfALeap - 2)
            {
                sums.AsSpan(0, size + 1).CopyTo(twoBefore);
            }
        }
        return rate;
    }

    /// <summary>Goes where the last four steps lead if each pair of steps shrinks the move by the same factor (Aitken's δ² process, on the whole vector).</summary>
    private void Leap()
    {
        Span<double> now = sums.AsSpan(0, size + 1);
        ReadOnlySpan<double> middle = twoBefore.AsSpan(0, size + 1), first = fourBefore.AsSpan(0, size + 1);
        double along = 0, square = 0, lastSquare = 0;
        for (int cell = 0; cell < now.Length; cell++)
        {
            double move = middle[cell] - first[cell], lastMove = now[cell] - middle[cell];
            along += lastMove * move;
            square += move * move;
            lastSquare += lastMove * lastMove;
        }
        double factor = along / square;
        if (!(factor > 0 && factor < LongestMemory && along >= SameDirection * Math.Sqrt(square * lastSquare))) return;
        double further = factor / (1 - factor);
        for (int cell = 0; cell < now.Length; cell++) now[cell] += further * (now[cell] - middle[cell]);
    }

    /// <summary>Finds for every cell the states from which it is reached, and sets the starting weights.</summary>
    private void Lay(ReadOnlySpan<long> counts, ReadOnlySpan<int> frequencies, int tableLog)
    {
        size = 1 << tableLog;
        if (origins.Length < size)
        {
            (symbolOfCell, origins, chances) = (new int[size], new uint[size], new double[size]);
            (sums, nextSums, twoBefore, fourBefore) = (new double[size + 1], new double[size + 1], new double[size + 1], new double[size + 1]);
        }
        if (slots.Length < counts.Length) slots = new Slot[counts.Length];
        TansSpread.Fill(frequencies, tableLog, symbolOfCell.AsSpan(0, size));
        double total = 0;
        foreach (long count in counts) total += count;
        inUse = counts.Length;
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            int frequency = frequencies[symbol];
            if (counts[symbol] > 0 && frequency == 0) throw new ArgumentException($"Symbol {symbol} is in use and has no cell.", nameof(frequencies));
            int mostBits = tableLog - BitOperations.Log2((uint)frequency | 1);
            slots[symbol] = new Slot(counts[symbol] / total, frequency, mostBits, frequency == 0 ? 0 : (frequency << mostBits) - size);
        }
        Span<Slot> ofSymbol = slots.AsSpan(0, counts.Length);
        ReadOnlySpan<int> ofCell = symbolOfCell.AsSpan(0, size);
        Span<uint> from = origins.AsSpan(0, size);
        Span<double> chance = chances.AsSpan(0, size);
        for (int cell = 0; cell < ofCell.Length; cell++)
        {
            ref Slot slot = ref ofSymbol[ofCell[cell]];
            int rank = slot.NextRank++, bits = tableLog - BitOperations.Log2((uint)rank), first = (rank << bits) - size;
            from[cell] = ((uint)(first + (1 << bits) - 1) << 16) | (uint)first;
            chance[cell] = slot.Chance;
        }
        StartWeights.Of(tableLog).CopyTo(sums.AsSpan(0, size + 1));
    }

    /// <summary>A symbol gives off its most bits from the states at and above f shifted by them, and one less below.</summary>
    private double Rate()
    {
        double rate = 0;
        foreach (ref readonly Slot slot in slots.AsSpan(0, inUse)) rate += slot.Chance * (slot.MostBits - sums[slot.MostBitsFrom]);
        return rate;
    }

    /// <summary>Four quarters of the cells are summed side by side, for an addition waits on the one before it.</summary>
    private void Step()
    {
        int quarter = size / 4;
        ref double before = ref MemoryMarshal.GetArrayDataReference(sums), after = ref MemoryMarshal.GetArrayDataReference(nextSums), chance = ref MemoryMarshal.GetArrayDataReference(chances);
        ref uint origin = ref MemoryMarshal.GetArrayDataReference(origins);
        double sum1 = 0, sum2 = 0, sum3 = 0, sum4 = 0;
        for (int cell1 = 0, cell2 = quarter, cell3 = 2 * quarter, cell4 = 3 * quarter; cell1 < quarter; cell1++, cell2++, cell3++, cell4++)
        {
            sum1 += Unsafe.Add(ref chance, cell1) * Between(ref before, Unsafe.Add(ref origin, cell1));
            sum2 += Unsafe.Add(ref chance, cell2) * Between(ref before, Unsafe.Add(ref origin, cell2));
            sum3 += Unsafe.Add(ref chance, cell3) * Between(ref before, Unsafe.Add(ref origin, cell3));
            sum4 += Unsafe.Add(ref chance, cell4) * Between(ref before, Unsafe.Add(ref origin, cell4));
            Unsafe.Add(ref after, cell1 + 1) = sum1;
            Unsafe.Add(ref after, cell2 + 1) = sum2;
            Unsafe.Add(ref after, cell3 + 1) = sum3;
            Unsafe.Add(ref after, cell4 + 1) = sum4;
        }
        Raise(nextSums.AsSpan(1 + quarter, quarter), sum1);
        Raise(nextSums.AsSpan(1 + (2 * quarter), quarter), sum1 + sum2);
        Raise(nextSums.AsSpan(1 + (3 * quarter), quarter), sum1 + sum2 + sum3);
        (sums, nextSums) = (nextSums, sums);
    }

    /// <summary>Both ends of an origin are below 2^R, and the sums have one entry more.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    private static double Between(ref double before, uint origin) => Unsafe.Add(ref before, (nint)(origin >> 16) + 1) - Unsafe.Add(ref before, (nint)(origin & 0xFFFF));

    private static void Raise(Span<double> sums, double by)
    {
        foreach (ref double sum in sums) sum += by;
    }

    /// <summary>Sums up to the cell at hand are new ones; beyond it they are old ones, which count from the old sum at the cell.</summary>
    private void StepInPlace()
    {
        double total = 0, oldAtCell = 0;
        Span<double> running = sums.AsSpan(0, size + 1);
        ReadOnlySpan<uint> from = origins.AsSpan(0, size);
        ReadOnlySpan<double> chance = chances.AsSpan(0, size);
        for (int cell = 0; cell < from.Length; cell++)
        {
            int first = (int)(from[cell] & 0xFFFF), end = (int)(from[cell] >> 16) + 1;
            double weight = running[end] - running[first];
            if (first <= cell && end > cell) weight += total - oldAtCell;
            total += chance[cell] * weight;
            oldAtCell = running[cell + 1];
            running[cell + 1] = total;
        }
        double scale = 1 / total;
        foreach (ref double sum in running) sum *= scale;
    }

    /// <summary>A symbol's chance, the rank of its next cell, and the most bits it gives off, from which cell on.</summary>
    private record struct Slot(double Chance, int NextRank, int MostBits, int MostBitsFrom);

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
