using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>Exact counts of symbols of 1 or 4 bits: contexts of every order and blocks of every length that fit tables of 2^24 counters.</summary>
/// <remarks>Symbols come most significant first: nibbles high then low, bits from the top of the byte. Pieces begin at byte boundaries.</remarks>
public sealed class SmallAlphabetTally : ISymbolTally
{
    private const int MostKeyBits = 24;
    private const int FoldShift = 12;
    private readonly int symbolBits;

    // [order][fold, context, symbol] and [length − 2][block].
    private readonly long[][] contexts;
    private readonly long[][] blocks;
    private long position;
    private ulong before;
    private int known;

    /// <summary>An empty tally.</summary>
    /// <param name="symbolBits">1 for bits, 4 for nibbles.</param>
    /// <param name="highestOrder">Orders above what fits are left out.</param>
    /// <param name="longestBlock">Lengths above what fits are left out.</param>
    public SmallAlphabetTally(int symbolBits, int highestOrder, int longestBlock)
    {
        if (symbolBits is not 1 and not 4) throw new ArgumentOutOfRangeException(nameof(symbolBits), symbolBits, "Symbols of 1 or 4 bits.");
        ArgumentOutOfRangeException.ThrowIfNegative(highestOrder);
        ArgumentOutOfRangeException.ThrowIfLessThan(longestBlock, 1);
        this.symbolBits = symbolBits;
        HighestOrder = Math.Min(highestOrder, (MostKeyBits / symbolBits) - 1);
        LongestBlock = Math.Min(longestBlock, MostKeyBits / symbolBits);
        contexts = [.. Enumerable.Range(0, HighestOrder + 1).Select(order => new long[2 << (symbolBits * (order + 1))])];
        blocks = [.. Enumerable.Range(2, LongestBlock - 1).Select(length => new long[1 << (symbolBits * length)])];
    }

    /// <inheritdoc/>
    public int AlphabetSize => 1 << symbolBits;

    /// <inheritdoc/>
    public int HighestOrder { get; }

    /// <inheritdoc/>
    public int LongestBlock { get; }

    /// <inheritdoc/>
    public long Symbols { get; private set; }

    /// <inheritdoc/>
    public int LeftOverBytes => 0;

    /// <inheritdoc/>
    public long MemoryBytes => contexts.Concat(blocks).Sum(table => (long)table.Length * sizeof(long));

    private int SymbolsInByte => 8 / symbolBits;

    /// <inheritdoc/>
    public void Begin(long byteOffset, ReadOnlySpan<byte> before)
    {
        if (byteOffset % (1 << FoldShift) != 0) throw new ArgumentException($"The piece begins at {byteOffset}; pieces begin at multiples of {1 << FoldShift}.", nameof(byteOffset));
        position = byteOffset * SymbolsInByte;
        int bytes = (int)Math.Min(8, Math.Min(before.Length, byteOffset));
        this.before = 0;
        foreach (byte each in before[^bytes..]) this.before = (this.before << 8) | each;
        known = bytes * SymbolsInByte;
    }

    /// <inheritdoc/>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        int inByte = SymbolsInByte;
        foreach (byte each in bytes)
        {
            int fold = (int)(position / inByte >> FoldShift) & 1;
            for (int shift = 8 - symbolBits; shift >= 0; shift -= symbolBits) Count((uint)(each >> shift) & ((1u << symbolBits) - 1), fold);
        }
        Symbols += (long)bytes.Length * inByte;
    }

    /// <inheritdoc/>
    public void Merge(ISymbolTally other)
    {
        if (other is not SmallAlphabetTally tally || tally.symbolBits != symbolBits || tally.HighestOrder != HighestOrder || tally.LongestBlock != LongestBlock)
            throw new ArgumentException($"A tally of {symbolBits}-bit symbols, order {HighestOrder}, blocks of {LongestBlock}, was to be merged with {other}.", nameof(other));
        for (int i = 0; i < contexts.Length; i++) Add(contexts[i], tally.contexts[i]);
        for (int i = 0; i < blocks.Length; i++) Add(blocks[i], tally.blocks[i]);
        Symbols += tally.Symbols;
    }

    /// <inheritdoc/>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.SmallAlphabet);
        writer.Write(symbolBits);
        writer.Write(HighestOrder);
        writer.Write(LongestBlock);
        writer.Write(Symbols);
        foreach (long[] table in contexts.Concat(blocks))
        {
            writer.WriteSparse(entry =>
            {
                for (int key = 0; key < table.Length; key++)
                    if (table[key] > 0) entry(key, table[key]);
            });
        }
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is of another kind.</exception>
    public static SmallAlphabetTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.SmallAlphabet);
        long bits = reader.Read("symbol bits", 4);
        if (bits is not 1 and not 4) throw new InvalidDataException($"The tally is damaged: it has symbols of {bits} bits.");
        int order = (int)reader.Read("highest order", MostKeyBits);
        int block = (int)reader.Read("longest block", MostKeyBits);
        if (block == 0) throw new InvalidDataException("The tally is damaged: its longest block is 0.");
        var tally = new SmallAlphabetTally((int)bits, order, block) { Symbols = reader.Read("number of symbols", long.MaxValue) };
        foreach (long[] table in tally.contexts.Concat(tally.blocks)) reader.ReadSparse(table.Length, (key, count) => table[key] = count);
        reader.Finish();
        return tally;
    }

    /// <inheritdoc/>
    public void VisitContexts(int order, IContextVisitor visitor)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(order);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, HighestOrder);
        long[] table = contexts[order];
        int half = table.Length / 2;
        var row = new ContextRow(AlphabetSize);
        for (int context = 0; context < half; context += AlphabetSize)
        {
            row.Begin();
            for (int symbol = 0; symbol < AlphabetSize; symbol++) row.Add(symbol, table[context + symbol], table[half + context + symbol]);
            row.Show(context >> symbolBits, visitor);
        }
    }

    /// <inheritdoc/>
    public BlockCounts Blocks(int length)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(length, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(length, LongestBlock);
        var counts = new SparseCountsBuilder(length, 0);
        long[] table = blocks[length - 2];
        for (int block = 0; block < table.Length; block++) counts.Add(block, table[block]);
        return counts.ToBlockCounts();
    }

    /// <inheritdoc/>
    public void ReleaseContexts()
    {
        // The tables of an order are no larger than those of the blocks.
    }

    /// <inheritdoc/>
    public void Clear()
    {
        foreach (long[] table in contexts) Array.Clear(table);
        foreach (long[] table in blocks) Array.Clear(table);
        (Symbols, position, before, known) = (0, 0, 0, 0);
    }

    private void Count(uint symbol, int fold)
    {
        before = (before << symbolBits) | symbol;
        int orders = Math.Min(known, HighestOrder);
        for (int order = 0; order <= orders; order++)
        {
            long[] table = contexts[order];
            int half = table.Length / 2;
            table[(fold * half) + (int)(before & (ulong)(half - 1))]++;
        }
        position++;
        for (int length = 2; length <= LongestBlock; length++)
            if (position % length == 0) blocks[length - 2][(int)(before & ((1UL << (symbolBits * length)) - 1))]++;
        if (known < 64) known++;
    }

    private static void Add(long[] sum, long[] part)
    {
        for (int i = 0; i < sum.Length; i++) sum[i] += part[i];
    }
}
