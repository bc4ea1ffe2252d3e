namespace Tallybound.Tallies;

/// <summary>The symbols in use of one context while they are gathered.</summary>
internal sealed class ContextRow(int capacity)
{
    private int[] symbols = new int[capacity];
    private long[] fold0 = new long[capacity];
    private long[] fold1 = new long[capacity];
    private int used;

    public void Begin() => used = 0;

    /// <summary>Adds a symbol above the last one; one that never came is passed over.</summary>
    public void Add(int symbol, long inFold0, long inFold1)
    {
        if ((inFold0 | inFold1) == 0) return;
        if (used == symbols.Length) Grow();
        symbols[used] = symbol;
        fold0[used] = inFold0;
        fold1[used++] = inFold1;
    }

    /// <summary>Shows the context unless it is empty.</summary>
    public void Show(long context, IContextVisitor visitor)
    {
        if (used > 0) visitor.Visit(context, symbols.AsSpan(0, used), fold0.AsSpan(0, used), fold1.AsSpan(0, used));
    }

    private void Grow()
    {
        Array.Resize(ref symbols, 2 * used);
        Array.Resize(ref fold0, 2 * used);
        Array.Resize(ref fold1, 2 * used);
    }
}

/// <summary>Block counts while they are gathered in ascending order.</summary>
internal sealed class SparseCountsBuilder(int blockLength, int capacity)
{
    private int[] symbols = new int[Math.Max(capacity, 16)];
    private long[] counts = new long[Math.Max(capacity, 16)];
    private int used;

    public void Add(int symbol, long count)
    {
        if (count == 0) return;
        if (used == symbols.Length)
        {
            Array.Resize(ref symbols, 2 * used);
            Array.Resize(ref counts, 2 * used);
        }
        symbols[used] = symbol;
        counts[used++] = count;
    }

    public BlockCounts ToBlockCounts()
    {
        if (used != symbols.Length)
        {
            Array.Resize(ref symbols, used);
            Array.Resize(ref counts, used);
        }
        return new BlockCounts(blockLength, symbols, counts);
    }
}
