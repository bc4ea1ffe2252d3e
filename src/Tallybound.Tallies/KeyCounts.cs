namespace Tallybound.Tallies;

/// <summary>How often each key came, as a sorted list; keys wait unsorted until the list is asked for.</summary>
internal sealed class KeyCounts(int keyBits)
{
    private const int SettleAt = 1 << 20;
    private const int KeepAtMost = 1 << 18;
    private uint[] waiting = [];
    private uint[] scratch = [];
    private int waitingCount;
    private uint[] keys = [];
    private long[] counts = [];
    private int used;

    /// <summary>Number of possible keys.</summary>
    public long KeySpace => 1L << keyBits;

    /// <summary>Memory of the lists.</summary>
    public long MemoryBytes => ((long)waiting.Length * 4) + ((long)scratch.Length * 4) + ((long)keys.Length * 4) + ((long)counts.Length * 8);

    /// <summary>Makes room for further keys.</summary>
    public void Reserve(int more)
    {
        if (waitingCount > SettleAt) Settle();
        if (waiting.Length - waitingCount >= more) return;
        Array.Resize(ref waiting, Math.Max(waitingCount + more, Math.Min(2 * waiting.Length, SettleAt)));
    }

    /// <summary>Adds a key for which room was made.</summary>
    public void Add(uint key) => waiting[waitingCount++] = key;

    /// <summary>Adds a key above all others, with its count.</summary>
    public void AddSorted(long key, long count)
    {
        if (used == keys.Length) Grow(Math.Max(16, 2 * used));
        keys[used] = (uint)key;
        counts[used++] = count;
    }

    /// <summary>Adds another list.</summary>
    public void Merge(KeyCounts other)
    {
        Settle();
        other.Settle();
        MergeSorted(other.keys.AsSpan(0, other.used), other.counts.AsSpan(0, other.used));
    }

    /// <summary>Shows every key and count, ascending.</summary>
    public void Visit(Action<long, long> entry)
    {
        Settle();
        for (int i = 0; i < used; i++) entry(keys[i], counts[i]);
    }

    /// <summary>Shows contexts: a key is (context, symbol, fold).</summary>
    public void VisitRows(int symbolBits, ContextRow row, IContextVisitor visitor)
    {
        Settle();
        for (int at = 0; at < used;)
        {
            uint context = keys[at] >> (symbolBits + 1);
            row.Begin();
            while (at < used && keys[at] >> (symbolBits + 1) == context)
            {
                uint symbol = keys[at] >> 1;
                long fold0 = 0, fold1 = 0;
                if ((keys[at] & 1) == 0) fold0 = counts[at++];
                if (at < used && keys[at] == ((symbol << 1) | 1)) fold1 = counts[at++];
                row.Add((int)(symbol & ((1u << symbolBits) - 1)), fold0, fold1);
            }
            row.Show(context, visitor);
        }
    }

    /// <summary>The list as block counts.</summary>
    public BlockCounts ToBlockCounts(int length)
    {
        Settle();
        var symbols = new int[used];
        for (int i = 0; i < used; i++) symbols[i] = (int)keys[i];
        return new BlockCounts(length, symbols, counts.AsSpan(0, used).ToArray());
    }

    /// <summary>Empties the list; large memory is given back.</summary>
    public void Clear()
    {
        (waitingCount, used) = (0, 0);
        if (waiting.Length > KeepAtMost) waiting = [];
        if (scratch.Length > KeepAtMost) scratch = [];
        if (keys.Length > KeepAtMost) (keys, counts) = ([], []);
    }

    private void Settle()
    {
        if (waitingCount == 0) return;
        if (scratch.Length < waitingCount) scratch = new uint[waiting.Length];
        KeySort.Sort(waiting.AsSpan(0, waitingCount), scratch, keyBits);
        int distinct = 0;
        Span<uint> sorted = waiting.AsSpan(0, waitingCount);
        for (int i = 0; i < sorted.Length; i++) distinct += i == 0 || sorted[i] != sorted[i - 1] ? 1 : 0;
        if (used == 0)
        {
            if (keys.Length < distinct) Grow(distinct);
            used = Compress(sorted, keys, counts);
        }
        else
        {
            var newKeys = new uint[distinct];
            var newCounts = new long[distinct];
            Compress(sorted, newKeys, newCounts);
            MergeSorted(newKeys, newCounts);
        }
        waitingCount = 0;
    }

    private static int Compress(ReadOnlySpan<uint> sorted, Span<uint> toKeys, Span<long> toCounts)
    {
        int at = 0;
        for (int i = 0; i < sorted.Length;)
        {
            int next = i + 1;
            while (next < sorted.Length && sorted[next] == sorted[i]) next++;
            toKeys[at] = sorted[i];
            toCounts[at++] = next - i;
            i = next;
        }
        return at;
    }

    private void MergeSorted(ReadOnlySpan<uint> otherKeys, ReadOnlySpan<long> otherCounts)
    {
        var mergedKeys = new uint[used + otherKeys.Length];
        var mergedCounts = new long[used + otherKeys.Length];
        int a = 0, b = 0, at = 0;
        while (a < used || b < otherKeys.Length)
        {
            bool takeA = b >= otherKeys.Length || (a < used && keys[a] <= otherKeys[b]);
            bool takeB = a >= used || (b < otherKeys.Length && otherKeys[b] <= keys[a]);
            mergedKeys[at] = takeA ? keys[a] : otherKeys[b];
            mergedCounts[at++] = (takeA ? counts[a++] : 0) + (takeB ? otherCounts[b++] : 0);
        }
        (keys, counts, used) = (mergedKeys, mergedCounts, at);
    }

    private void Grow(int to)
    {
        Array.Resize(ref keys, to);
        Array.Resize(ref counts, to);
    }
}
