using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>The counts of <see cref="ByteTally"/> for small sources, kept as sorted lists of what occurs: nothing large to clear or to look through.</summary>
/// <remarks>Keys are gathered as they come and sorted when they are asked for; time and memory follow the source's size alone.</remarks>
public sealed class SparseByteTally : ISymbolTally
{
    private const int FoldShift = 12;

    // [order − 1]: keys of (context, symbol, fold); [length − 2]: keys of blocks.
    private readonly KeyCounts[] contexts;
    private readonly KeyCounts[] blocks;
    private readonly long[] single = new long[2 * 256];
    private long position;
    private uint before;
    private int beforeBytes;

    /// <summary>An empty tally.</summary>
    /// <param name="highestOrder">0 to 2.</param>
    /// <param name="longestBlock">1 to 3.</param>
    public SparseByteTally(int highestOrder = 2, int longestBlock = 3)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(highestOrder);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(highestOrder, 2);
        ArgumentOutOfRangeException.ThrowIfLessThan(longestBlock, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(longestBlock, 3);
        HighestOrder = highestOrder;
        LongestBlock = longestBlock;
        contexts = [.. Enumerable.Range(1, highestOrder).Select(order => new KeyCounts((8 * (order + 1)) + 1))];
        blocks = [.. Enumerable.Range(2, longestBlock - 1).Select(length => new KeyCounts(8 * length))];
    }

    /// <inheritdoc/>
    public int AlphabetSize => 256;

    /// <inheritdoc/>
    public int HighestOrder { get; }

    /// <inheritdoc/>
    public int LongestBlock { get; }

    /// <inheritdoc/>
    public long Symbols { get; private set; }

    /// <inheritdoc/>
    public int LeftOverBytes => 0;

    /// <inheritdoc/>
    public long MemoryBytes => contexts.Concat(blocks).Sum(keys => keys.MemoryBytes) + (single.Length * sizeof(long));

    /// <inheritdoc/>
    public void Begin(long byteOffset, ReadOnlySpan<byte> before)
    {
        if (byteOffset % (1 << FoldShift) != 0) throw new ArgumentException($"The piece begins at {byteOffset}; pieces begin at multiples of {1 << FoldShift}.", nameof(byteOffset));
        position = byteOffset;
        beforeBytes = (int)Math.Min(2, Math.Min(before.Length, byteOffset));
        this.before = 0;
        foreach (byte symbol in before[^beforeBytes..]) this.before = (this.before << 8) | symbol;
    }

    /// <inheritdoc/>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        foreach (KeyCounts keys in contexts) keys.Reserve(bytes.Length);
        foreach (KeyCounts keys in blocks) keys.Reserve(bytes.Length);
        uint last = before;
        int known = beforeBytes;
        int phase = (int)(position % 3);
        foreach (byte symbol in bytes)
        {
            uint fold = (uint)(position >> FoldShift) & 1;
            single[(fold << 8) | symbol]++;
            last = (last << 8) | symbol;
            if (known > 0 && contexts.Length > 0) contexts[0].Add(((last & 0xFFFF) << 1) | fold);
            if (known > 1 && contexts.Length > 1) contexts[1].Add(((last & 0xFFFFFF) << 1) | fold);
            if (known > 0 && blocks.Length > 0 && (position & 1) == 1) blocks[0].Add(last & 0xFFFF);
            if (known > 1 && blocks.Length > 1 && phase == 2) blocks[1].Add(last & 0xFFFFFF);
            phase = phase == 2 ? 0 : phase + 1;
            known = known < 2 ? known + 1 : 2;
            position++;
        }
        before = last & 0xFFFF;
        beforeBytes = known;
        Symbols += bytes.Length;
    }

    /// <inheritdoc/>
    public void Merge(ISymbolTally other)
    {
        if (other is not SparseByteTally tally || tally.HighestOrder != HighestOrder || tally.LongestBlock != LongestBlock)
            throw new ArgumentException($"A sparse byte tally of order {HighestOrder} and blocks of {LongestBlock} was to be merged with {other}.", nameof(other));
        for (int i = 0; i < contexts.Length; i++) contexts[i].Merge(tally.contexts[i]);
        for (int i = 0; i < blocks.Length; i++) blocks[i].Merge(tally.blocks[i]);
        for (int i = 0; i < single.Length; i++) single[i] += tally.single[i];
        Symbols += tally.Symbols;
    }

    /// <inheritdoc/>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.SparseBytes);
        writer.Write(HighestOrder);
        writer.Write(LongestBlock);
        writer.Write(Symbols);
        foreach (long count in single) writer.Write(count);
        foreach (KeyCounts keys in contexts) writer.WriteSparse(keys.Visit);
        foreach (KeyCounts keys in blocks) writer.WriteSparse(keys.Visit);
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is of another kind.</exception>
    public static SparseByteTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.SparseBytes);
        int order = (int)reader.Read("highest order", 2);
        int block = (int)reader.Read("longest block", 3);
        if (block == 0) throw new InvalidDataException("The tally is damaged: its longest block is 0.");
        var tally = new SparseByteTally(order, block) { Symbols = reader.Read("number of symbols", long.MaxValue) };
        for (int i = 0; i < tally.single.Length; i++) tally.single[i] = reader.Read("single counts", long.MaxValue);
        foreach (KeyCounts keys in tally.contexts) reader.ReadSparse(keys.KeySpace, keys.AddSorted);
        foreach (KeyCounts keys in tally.blocks) reader.ReadSparse(keys.KeySpace, keys.AddSorted);
        reader.Finish();
        return tally;
    }

    /// <inheritdoc/>
    public void VisitContexts(int order, IContextVisitor visitor)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(order);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, HighestOrder);
        var row = new ContextRow(256);
        if (order > 0)
        {
            contexts[order - 1].VisitRows(8, row, visitor);
            return;
        }
        row.Begin();
        for (int symbol = 0; symbol < 256; symbol++) row.Add(symbol, single[symbol], single[256 + symbol]);
        row.Show(0, visitor);
    }

    /// <inheritdoc/>
    public BlockCounts Blocks(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(length, LongestBlock);
        return blocks[length - 2].ToBlockCounts(length);
    }

    /// <inheritdoc/>
    public void ReleaseContexts()
    {
        // What orders above 1 need is no larger than the source.
    }

    /// <inheritdoc/>
    public void Clear()
    {
        foreach (KeyCounts keys in contexts) keys.Clear();
        foreach (KeyCounts keys in blocks) keys.Clear();
        Array.Clear(single);
        (Symbols, position, before, beforeBytes) = (0, 0, 0, 0);
    }
}
