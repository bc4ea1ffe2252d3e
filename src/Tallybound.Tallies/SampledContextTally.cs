using System.Runtime.InteropServices;
using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>Counts of a sample of byte contexts of orders above 2, in bounded memory: a context is kept when its hash is small enough.</summary>
/// <remarks>When more contexts are kept than there is room for, the threshold is halved and what lies above it is dropped. Which contexts are kept depends only on which ones
/// occurred, and a kept one was counted from its first symbol on, so neither cuts nor order of merging change anything.
/// Contexts are sampled, symbols are not: figures of kept contexts are exact, figures of the whole are estimates from them.</remarks>
public sealed class SampledContextTally
{
    private const int FoldShift = 12;
    private const int HighestPossible = 7;
    private readonly Dictionary<ulong, SortedDictionary<byte, (long Fold0, long Fold1)>> kept = [];
    private readonly int capacity;
    private readonly ulong mask;
    private long position;
    private ulong before;
    private int known;

    /// <summary>An empty tally.</summary>
    /// <param name="order">Bytes of context, 1 to 7.</param>
    /// <param name="capacity">Contexts kept at most, at least 1.</param>
    public SampledContextTally(int order, int capacity)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(order, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(order, HighestPossible);
        ArgumentOutOfRangeException.ThrowIfLessThan(capacity, 1);
        Order = order;
        this.capacity = capacity;
        mask = (1UL << (8 * order)) - 1;
    }

    /// <summary>Bytes of context.</summary>
    public int Order { get; }

    /// <summary>Symbols predicted, kept or not.</summary>
    public long Predicted { get; private set; }

    /// <summary>Contexts are kept up to this hash; the largest value means all of them.</summary>
    public ulong Threshold { get; private set; } = ulong.MaxValue;

    /// <summary>Contexts kept.</summary>
    public int ContextsKept => kept.Count;

    /// <summary>Begins a piece, as <see cref="ISymbolTally.Begin"/> does.</summary>
    public void Begin(long byteOffset, ReadOnlySpan<byte> before)
    {
        if (byteOffset % (1 << FoldShift) != 0) throw new ArgumentException($"The piece begins at {byteOffset}; pieces begin at multiples of {1 << FoldShift}.", nameof(byteOffset));
        position = byteOffset;
        known = (int)Math.Min(Order, Math.Min(before.Length, byteOffset));
        this.before = 0;
        foreach (byte each in before[^known..]) this.before = (this.before << 8) | each;
    }

    /// <summary>Counts the next bytes of the piece.</summary>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        foreach (byte symbol in bytes)
        {
            if (known == Order)
            {
                Predicted++;
                if (Hash(before) <= Threshold) Count(before, symbol, (position >> FoldShift) & 1);
            }
            else
            {
                known++;
            }
            before = ((before << 8) | symbol) & mask;
            position++;
        }
    }

    /// <summary>Adds the counts of another tally of the same order and capacity.</summary>
    /// <exception cref="ArgumentException">It is of another order or capacity.</exception>
    public void Merge(SampledContextTally other)
    {
        if (other.Order != Order || other.capacity != capacity)
            throw new ArgumentException($"A sampled tally of order {Order} with room for {capacity} contexts was to be merged with one of order {other.Order} and {other.capacity}.", nameof(other));
        Predicted += other.Predicted;
        if (other.Threshold < Threshold) LowerTo(other.Threshold);
        foreach ((ulong context, SortedDictionary<byte, (long Fold0, long Fold1)> row) in other.kept)
        {
            if (Hash(context) > Threshold) continue;
            foreach ((byte symbol, (long fold0, long fold1)) in row) Add(context, symbol, fold0, fold1);
        }
        while (kept.Count > capacity) LowerTo(Threshold >> 1);
    }

    /// <summary>Shows every kept context, ascending.</summary>
    public void VisitContexts(IContextVisitor visitor)
    {
        var row = new ContextRow(256);
        foreach (ulong context in kept.Keys.Order())
        {
            row.Begin();
            foreach ((byte symbol, (long fold0, long fold1)) in kept[context]) row.Add(symbol, fold0, fold1);
            row.Show((long)context, visitor);
        }
    }

    /// <summary>Writes the counts, versioned and with a checksum.</summary>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.SampledContexts);
        writer.Write(Order);
        writer.Write(capacity);
        writer.Write(Predicted);
        writer.Write(HalvingsOf(Threshold));
        writer.Write(kept.Count);
        foreach (ulong context in kept.Keys.Order())
        {
            writer.Write((long)context);
            writer.Write(kept[context].Count);
            foreach ((byte symbol, (long fold0, long fold1)) in kept[context])
            {
                writer.Write(symbol);
                writer.Write(fold0);
                writer.Write(fold1);
            }
        }
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is of another kind.</exception>
    public static SampledContextTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.SampledContexts);
        int order = (int)reader.Read("order", HighestPossible);
        int capacity = (int)reader.Read("capacity", int.MaxValue);
        if (order == 0 || capacity == 0) throw new InvalidDataException("The tally is damaged: its order or capacity is 0.");
        var tally = new SampledContextTally(order, capacity) { Predicted = reader.Read("number of symbols", long.MaxValue) };
        tally.Threshold = ulong.MaxValue >> (int)reader.Read("threshold", 63);
        long contexts = reader.Read("number of contexts", capacity);
        for (long i = 0; i < contexts; i++)
        {
            ulong context = (ulong)reader.Read("context", (long)tally.mask);
            long symbols = reader.Read("number of symbols in a context", 256);
            for (long s = 0; s < symbols; s++)
                tally.Add(context, (byte)reader.Read("symbol", 255), reader.Read("count", long.MaxValue), reader.Read("count", long.MaxValue));
        }
        reader.Finish();
        return tally;
    }

    private void Count(ulong context, byte symbol, long fold)
    {
        Add(context, symbol, fold == 0 ? 1 : 0, fold);
        while (kept.Count > capacity) LowerTo(Threshold >> 1);
    }

    private void Add(ulong context, byte symbol, long fold0, long fold1)
    {
        ref SortedDictionary<byte, (long Fold0, long Fold1)>? row = ref CollectionsMarshal.GetValueRefOrAddDefault(kept, context, out _);
        row ??= [];
        row.TryGetValue(symbol, out (long Fold0, long Fold1) sum);
        row[symbol] = (sum.Fold0 + fold0, sum.Fold1 + fold1);
    }

    private void LowerTo(ulong threshold)
    {
        Threshold = threshold;
        foreach (ulong context in kept.Keys.Where(context => Hash(context) > threshold).ToList()) kept.Remove(context);
    }

    private static int HalvingsOf(ulong threshold) => System.Numerics.BitOperations.LeadingZeroCount(threshold);

    /// <summary>A 64-bit finaliser (Steele, Lea &amp; Flood 2014, SplitMix).</summary>
    private static ulong Hash(ulong context)
    {
        ulong z = unchecked(context + 0x9E3779B97F4A7C15UL);
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9UL;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EBUL;
        return z ^ (z >> 31);
    }
}
