using Tallybound.Tallies.Files;
using Tallybound.Tallies.Kernels;

namespace Tallybound.Tallies;

// How two tallies become one, and how one lies down on a disk.
public sealed unsafe partial class ByteTally
{
    /// <inheritdoc/>
    public void Merge(ISymbolTally other)
    {
        if (other is not ByteTally tally || tally.HighestOrder != HighestOrder || tally.LongestBlock != LongestBlock)
            throw new ArgumentException($"A byte tally of order {HighestOrder} and blocks of {LongestBlock} was to be merged with {other}.", nameof(other));
        pairMatrix = null;
        // A counter that the last spill left alone may be just below 2^31, whatever was counted since: two of those still fit 32 bits, a third would not.
        bool mayBeLarge = Symbols + tally.Symbols >= spillAfter;
        if (mayBeLarge)
        {
            Spill();
            tally.Spill();
        }
        for (int fold = 0; fold < 2; fold++)
        {
            AddTable(blocks[fold]!, tally.blocks[fold]!, tally.rowsInUse);
            AddTable(rest[fold]!, tally.rest[fold]!, tally.rowsInUse);
        }
        AddTable(evenPairs, tally.evenPairs, tally.rowsInUse);
        for (int row = 0; row < rowsInUse.Length; row++) rowsInUse[row] |= tally.rowsInUse[row];
        allRowsInUse |= tally.allRowsInUse;
        markedBytes += tally.markedBytes;
        for (int symbol = 0; symbol < 256; symbol++) firstSymbols[symbol] += tally.firstSymbols[symbol];
        foreach ((int pair, long count) in tally.firstPairs) firstPairs[pair] = firstPairs.GetValueOrDefault(pair) + count;
        foreach ((long key, long count) in tally.carry) carry[key] = carry.GetValueOrDefault(key) + count;
        Symbols += tally.Symbols;
        sinceSpill += tally.sinceSpill;
        if (mayBeLarge) Spill();
    }

    /// <inheritdoc/>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.Bytes);
        writer.Write(HighestOrder);
        writer.Write(LongestBlock);
        writer.Write(Symbols);
        for (int symbol = 0; symbol < 256; symbol++) writer.Write(firstSymbols[symbol]);
        writer.WriteSparse(entry =>
        {
            foreach ((int pair, long count) in firstPairs.OrderBy(item => item.Key)) entry(pair, count);
        });
        writer.WriteSparse(entry => EachEntry(Pairs, key => EvenPair(key), entry));
        for (int fold = 0; fold < 2; fold++)
        {
            int of = fold;
            writer.WriteSparse(entry => EachEntry(blocks[of]!.Length, key => Count(of, false, key), entry));
            writer.WriteSparse(entry => EachEntry(rest[of]!.Length, key => Count(of, true, key), entry));
        }
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is no byte tally.</exception>
    public static ByteTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.Bytes);
        int order = (int)reader.Read("highest order", 2);
        int block = (int)reader.Read("longest block", 3);
        if (block == 0) throw new InvalidDataException("The tally is damaged: its longest block is 0.");
        var tally = new ByteTally(order, block);
        try
        {
            tally.Symbols = reader.Read("number of symbols", long.MaxValue);
            for (int symbol = 0; symbol < 256; symbol++) tally.firstSymbols[symbol] = reader.Read("first symbols", long.MaxValue);
            reader.ReadSparse(Pairs, (key, count) => tally.firstPairs[(int)key] = count);
            reader.ReadSparse(Pairs, (key, count) => tally.Put(tally.evenPairs, PairBit, key, count));
            for (int fold = 0; fold < 2; fold++)
            {
                int of = fold;
                reader.ReadSparse(tally.blocks[of]!.Length, (key, count) => tally.Put(tally.blocks[of]!, of * FoldBit, key, count));
                reader.ReadSparse(tally.rest[of]!.Length, (key, count) => tally.Put(tally.rest[of]!, (of * FoldBit) | RestBit, key, count));
            }
            reader.Finish();
            tally.sinceSpill = Math.Min(tally.Symbols, Large - 1);
            return tally;
        }
        catch
        {
            tally.Dispose();
            throw;
        }
    }

    private void Put(CounterTable table, long tag, long key, long count)
    {
        if (table.Length == Triples) rowsInUse[key >> 8] = true;
        if (count < Large) table.Pointer[key] = (uint)count;
        else carry[tag | key] = count;
    }

    private void EachEntry(int keys, Func<int, long> countOf, Action<long, long> entry)
    {
        for (int start = 0; start < keys; start += 256)
        {
            if (keys == Triples && !rowsInUse[start >> 8]) continue;
            for (int key = start; key < start + 256; key++)
                if (countOf(key) is var count and > 0) entry(key, count);
        }
    }

    private static void AddTable(CounterTable to, CounterTable from, bool[] rows)
    {
        for (int start = 0; start < to.Length; start += 256)
        {
            if (to.Length == Triples && !rows[start >> 8]) continue;
            Span<uint> sum = to.Slice(start, 256), part = from.Slice(start, 256);
            for (int i = 0; i < sum.Length; i++) sum[i] += part[i];
        }
    }
}
