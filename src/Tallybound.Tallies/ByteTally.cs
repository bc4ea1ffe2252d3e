using Tallybound.Tallies.Kernels;

namespace Tallybound.Tallies;

/// <summary>Exact counts of bytes: orders 0 to 2 and symbol blocks of 2 and 3, in one pass, in dense tables.</summary>
/// <remarks>Order 2 is kept apart by the place of a triple's first byte modulo 3 and by the fold of its last byte: phase 0 of both folds is the count of
/// blocks of 3, all four tables are order 2, and orders 1 and 0 are its marginals together with the first symbols of a source, which have no full context.</remarks>
public sealed unsafe partial class ByteTally : ISymbolTally, IDisposable
{
    internal const int Triples = 1 << 24;
    internal const int Pairs = 1 << 16;
    private const int FoldShift = 12;
    private const int FoldBytes = 1 << FoldShift;

    /// <summary>Symbols after which counters may have reached 2^31 and large ones are moved out.</summary>
    private readonly long spillAfter;
    private readonly bool triplesWanted;

    // Triples: [fold] of phase 0 and of the rest. Without triples: pairs of neighbours [fold], in two tables a fold.
    private readonly CounterTable?[] blocks = new CounterTable?[2];
    private readonly CounterTable?[] rest = new CounterTable?[2];
    private readonly CounterTable evenPairs = new(Pairs);
    private readonly Dictionary<long, long> carry = [];
    private readonly bool[] rowsInUse = new bool[Pairs];
    private readonly long[] firstSymbols = new long[256];
    private readonly Dictionary<int, long> firstPairs = [];
    private long[]? pairMatrix;
    private long sinceSpill;
    private long position;
    private int before;
    private int beforeBytes;

    /// <summary>An empty tally.</summary>
    /// <param name="highestOrder">0 to 2.</param>
    /// <param name="longestBlock">1 to 3.</param>
    public ByteTally(int highestOrder = 2, int longestBlock = 3) : this(highestOrder, longestBlock, spillAfter: 1L << 31)
    {
    }

    internal ByteTally(int highestOrder, int longestBlock, long spillAfter)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(highestOrder);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(highestOrder, 2);
        ArgumentOutOfRangeException.ThrowIfLessThan(longestBlock, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(longestBlock, 3);
        HighestOrder = highestOrder;
        LongestBlock = longestBlock;
        this.spillAfter = spillAfter;
        triplesWanted = highestOrder > 1 || longestBlock > 2;
        MakeTables();
    }

    /// <summary>True where the tally holds the tables of 2^24 counters.</summary>
    public bool IsLarge => triplesWanted;

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
    public long MemoryBytes => evenPairs.Bytes + blocks.Concat(rest).Sum(table => table?.Bytes ?? 0) + Pairs;

    /// <inheritdoc/>
    public void Begin(long byteOffset, ReadOnlySpan<byte> before)
    {
        if (byteOffset % FoldBytes != 0) throw new ArgumentException($"The piece begins at {byteOffset}; pieces begin at multiples of {FoldBytes}.", nameof(byteOffset));
        position = byteOffset;
        beforeBytes = (int)Math.Min(2, Math.Min(before.Length, byteOffset));
        this.before = 0;
        foreach (byte symbol in before[^beforeBytes..]) this.before = (this.before << 8) | symbol;
    }

    /// <inheritdoc/>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        pairMatrix = null;
        while (!bytes.IsEmpty)
        {
            // A piece of one fold at a time, so that its tables stay the same.
            int length = (int)Math.Min(bytes.Length, FoldBytes - (position & (FoldBytes - 1)));
            AppendOfOneFold(bytes[..length]);
            bytes = bytes[length..];
        }
    }

    private void AppendOfOneFold(ReadOnlySpan<byte> bytes)
    {
        int fold = (int)(position >> FoldShift) & 1;
        // The bytes just before, then these: a context reaches back over the seam.
        Span<byte> joined = stackalloc byte[4];
        int head = Math.Min(bytes.Length, 2);
        int carried = beforeBytes;
        if (carried == 2) joined[0] = (byte)(before >> 8);
        if (carried >= 1) joined[carried - 1] = (byte)before;
        bytes[..head].CopyTo(joined[carried..]);
        int joinedLength = carried + head;
        CountSeam(joined[..joinedLength], carried, fold);
        CountInside(bytes, fold);
        Symbols += bytes.Length;
        position += bytes.Length;
        before = 0;
        ReadOnlySpan<byte> last = bytes.Length >= 2 ? bytes[^2..] : joined[Math.Max(0, joinedLength - 2)..joinedLength];
        foreach (byte symbol in last) before = (before << 8) | symbol;
        beforeBytes = last.Length;
        sinceSpill += bytes.Length;
        if (sinceSpill >= spillAfter) Spill();
    }

    /// <summary>Counts what ends in the first two bytes of a stretch and begins before it, and the symbols that nothing stands before.</summary>
    private void CountSeam(ReadOnlySpan<byte> joined, int carried, int fold)
    {
        long start = position - carried;
        for (int at = carried; at < joined.Length; at++)
        {
            if (start + at == 0) firstSymbols[joined[at]]++;
            if (at < 1) continue;
            int pair = (joined[at - 1] << 8) | joined[at];
            bool inside = at - 1 >= carried;
            if (!inside && ((start + at) & 1) == 1) evenPairs.Pointer[(ushort)((joined[at] << 8) | joined[at - 1])]++;
            if (!triplesWanted)
            {
                if (!inside) blocks[fold]!.Pointer[(ushort)((joined[at] << 8) | joined[at - 1])]++;
                continue;
            }
            if (start + at == 1)
            {
                firstPairs.TryGetValue(pair, out long count);
                firstPairs[pair] = count + 1;
            }
            if (at < 2 || at - 2 >= carried) continue;
            int key = (joined[at - 2] << 16) | pair;
            rowsInUse[key >> 8] = true;
            ((start + at - 2) % 3 == 0 ? blocks[fold] : rest[fold])!.Pointer[key]++;
        }
    }

    private void CountInside(ReadOnlySpan<byte> bytes, int fold)
    {
        fixed (byte* first = bytes)
        {
            int skip = (int)(position & 1);
            PairKernel.CountApart(first + skip, (bytes.Length - skip) / 2, evenPairs.Pointer);
            if (triplesWanted)
            {
                if (bytes.Length < 3) return;
                MarkRows(bytes[..^1]);
                TripleKernel.CountInSixes(first, bytes.Length - 2, (int)(position % 3), blocks[fold]!.Pointer, rest[fold]!.Pointer);
            }
            else if (bytes.Length >= 2)
            {
                PairKernel.CountNeighbours(first, bytes.Length - 1, blocks[fold]!.Pointer, rest[fold]!.Pointer);
            }
        }
    }

    /// <summary>Notes which contexts of two occur, so that reading and emptying the tables can pass over the rest.</summary>
    private void MarkRows(ReadOnlySpan<byte> bytes)
    {
        if (allRowsInUse) return;
        fixed (byte* first = bytes)
        fixed (bool* rows = rowsInUse)
        {
            byte* end = first + bytes.Length - 1;
            for (byte* at = first; at < end; at++) rows[(*at << 8) | at[1]] = true;
        }
        markedBytes += bytes.Length;
        if (markedBytes < MarkedAtMost) return;
        // A source this long uses most of what it will use; looking at every row costs less than going on.
        allRowsInUse = true;
        Array.Fill(rowsInUse, true);
    }

    private const long MarkedAtMost = 24L << 20;
    private long markedBytes;
    private bool allRowsInUse;

    private void MakeTables()
    {
        int counters = triplesWanted ? Triples : Pairs;
        for (int fold = 0; fold < 2; fold++)
        {
            blocks[fold] ??= new CounterTable(counters);
            rest[fold] ??= new CounterTable(counters);
        }
    }
}
