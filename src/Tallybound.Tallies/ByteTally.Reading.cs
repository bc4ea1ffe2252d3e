using Tallybound.Tallies.Kernels;

namespace Tallybound.Tallies;

// How the counts are read, moved and given back.
public sealed unsafe partial class ByteTally
{
    /// <inheritdoc/>
    public void VisitContexts(int order, IContextVisitor visitor)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(order);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, HighestOrder);
        var row = new ContextRow(256);
        switch (order)
        {
            case 0:
                VisitOrder0(visitor, row);
                break;
            case 1:
                VisitOrder1(visitor, row);
                break;
            default:
                VisitOrder2(visitor, row);
                break;
        }
    }

    /// <inheritdoc/>
    public BlockCounts Blocks(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(length, LongestBlock);
        return length == 2 ? BlocksOf2() : BlocksOf3();
    }

    /// <inheritdoc/>
    public void ReleaseContexts()
    {
        if (!triplesWanted) return;
        _ = PairMatrix();
        for (int fold = 0; fold < 2; fold++)
        {
            rest[fold]?.Dispose();
            rest[fold] = null;
        }
    }

    /// <inheritdoc/>
    public void Clear()
    {
        if (triplesWanted)
        {
            MakeTables();
            for (int context = 0; context < Pairs; context++)
            {
                if (!rowsInUse[context]) continue;
                foreach (CounterTable? table in blocks) table!.Slice(context << 8, 256).Clear();
                foreach (CounterTable? table in rest) table!.Slice(context << 8, 256).Clear();
            }
        }
        else
        {
            foreach (CounterTable? table in blocks) table!.Slice(0, Pairs).Clear();
            foreach (CounterTable? table in rest) table!.Slice(0, Pairs).Clear();
        }
        evenPairs.Slice(0, Pairs).Clear();
        Array.Clear(rowsInUse);
        Array.Clear(firstSymbols);
        firstPairs.Clear();
        carry.Clear();
        pairMatrix = null;
        (markedBytes, allRowsInUse) = (0, false);
        (Symbols, sinceSpill, position, before, beforeBytes) = (0, 0, 0, 0, 0);
    }

    /// <summary>Gives the tables back.</summary>
    public void Dispose()
    {
        evenPairs.Dispose();
        foreach (CounterTable? table in blocks) table?.Dispose();
        foreach (CounterTable? table in rest) table?.Dispose();
    }

    private void VisitOrder0(IContextVisitor visitor, ContextRow row)
    {
        long[] pairs = PairMatrix();
        row.Begin();
        for (int symbol = 0; symbol < 256; symbol++)
        {
            long fold0 = firstSymbols[symbol], fold1 = 0;
            for (int context = 0; context < 256; context++)
            {
                fold0 += pairs[(context << 8) | symbol];
                fold1 += pairs[Pairs + ((context << 8) | symbol)];
            }
            row.Add(symbol, fold0, fold1);
        }
        row.Show(0, visitor);
    }

    private void VisitOrder1(IContextVisitor visitor, ContextRow row)
    {
        long[] pairs = PairMatrix();
        for (int context = 0; context < 256; context++)
        {
            row.Begin();
            for (int symbol = 0; symbol < 256; symbol++) row.Add(symbol, pairs[(context << 8) | symbol], pairs[Pairs + ((context << 8) | symbol)]);
            row.Show(context, visitor);
        }
    }

    private void VisitOrder2(IContextVisitor visitor, ContextRow row)
    {
        if (rest[0] is null) throw new InvalidOperationException("The counts of order 2 were given back.");
        for (int context = 0; context < Pairs; context++)
        {
            if (!rowsInUse[context]) continue;
            row.Begin();
            int start = context << 8;
            Span<uint> b0 = blocks[0]!.Slice(start, 256), r0 = rest[0]!.Slice(start, 256), b1 = blocks[1]!.Slice(start, 256), r1 = rest[1]!.Slice(start, 256);
            if (carry.Count == 0)
            {
                for (int symbol = 0; symbol < 256; symbol++) row.Add(symbol, (long)b0[symbol] + r0[symbol], (long)b1[symbol] + r1[symbol]);
            }
            else
            {
                for (int symbol = 0; symbol < 256; symbol++)
                    row.Add(symbol, Count(0, false, start + symbol) + Count(0, true, start + symbol), Count(1, false, start + symbol) + Count(1, true, start + symbol));
            }
            row.Show(context, visitor);
        }
    }

    /// <summary>Pairs of neighbours by fold: fold 0 first, 65,536 counts each.</summary>
    private long[] PairMatrix()
    {
        if (pairMatrix is not null) return pairMatrix;
        var pairs = new long[2 * Pairs];
        if (!triplesWanted)
        {
            for (int fold = 0; fold < 2; fold++)
                for (int pair = 0; pair < Pairs; pair++) pairs[(fold * Pairs) + Swapped(pair)] = Count(fold, false, pair) + Count(fold, true, pair);
            return pairMatrix = pairs;
        }
        foreach ((int pair, long count) in firstPairs) pairs[pair] += count;
        for (int context = 0; context < Pairs; context++)
        {
            if (!rowsInUse[context]) continue;
            for (int fold = 0; fold < 2; fold++)
            {
                Span<long> sums = pairs.AsSpan((fold * Pairs) + ((context & 255) << 8), 256);
                Span<uint> b = blocks[fold]!.Slice(context << 8, 256), r = rest[fold]!.Slice(context << 8, 256);
                for (int symbol = 0; symbol < 256; symbol++) sums[symbol] += (long)b[symbol] + r[symbol];
            }
        }
        foreach ((long key, long count) in carry)
        {
            if (IsPairKey(key)) continue;
            (int fold, _, int triple) = Unpack(key);
            pairs[(fold * Pairs) + (triple & 0xFFFF)] += count;
        }
        return pairMatrix = pairs;
    }

    private BlockCounts BlocksOf2()
    {
        var counts = new SparseCountsBuilder(2, 0);
        for (int pair = 0; pair < Pairs; pair++) counts.Add(pair, EvenPair(Swapped(pair)));
        return counts.ToBlockCounts();
    }

    private BlockCounts BlocksOf3()
    {
        int used = 0;
        for (int context = 0; context < Pairs; context++)
        {
            if (!rowsInUse[context]) continue;
            Span<uint> b0 = blocks[0]!.Slice(context << 8, 256), b1 = blocks[1]!.Slice(context << 8, 256);
            for (int symbol = 0; symbol < 256; symbol++) used += (b0[symbol] | b1[symbol]) != 0 ? 1 : 0;
        }
        var counts = new SparseCountsBuilder(3, used + carry.Count);
        for (int context = 0; context < Pairs; context++)
        {
            if (!rowsInUse[context]) continue;
            int start = context << 8;
            Span<uint> b0 = blocks[0]!.Slice(start, 256), b1 = blocks[1]!.Slice(start, 256);
            for (int symbol = 0; symbol < 256; symbol++)
            {
                long count = carry.Count == 0 ? (long)b0[symbol] + b1[symbol] : Count(0, false, start + symbol) + Count(1, false, start + symbol);
                counts.Add(start + symbol, count);
            }
        }
        return counts.ToBlockCounts();
    }

    private static int Swapped(int pair) => ((pair & 255) << 8) | (pair >> 8);
}
