using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>Exact order-0 counts of 16-bit words, non-overlapping from the start of the source; an odd last byte stands outside.</summary>
/// <remarks>Order 1 of 65,536 symbols would need 2^32 counters, so there are none above order 0 and no blocks.</remarks>
public sealed class WordTally : ISymbolTally
{
    private const int Words = 1 << 16;
    private const int FoldShift = 12;
    private readonly bool highByteFirst;
    private readonly long[] counts = new long[2 * Words];
    private long position;
    private int half = -1;

    /// <summary>An empty tally.</summary>
    /// <param name="highByteFirst">The byte order: true for <c>words-be</c>.</param>
    public WordTally(bool highByteFirst) => this.highByteFirst = highByteFirst;

    /// <inheritdoc/>
    public int AlphabetSize => Words;

    /// <inheritdoc/>
    public int HighestOrder => 0;

    /// <inheritdoc/>
    public int LongestBlock => 1;

    /// <inheritdoc/>
    public long Symbols { get; private set; }

    /// <inheritdoc/>
    public int LeftOverBytes { get; private set; }

    /// <inheritdoc/>
    public long MemoryBytes => (long)counts.Length * sizeof(long);

    /// <inheritdoc/>
    public void Begin(long byteOffset, ReadOnlySpan<byte> before)
    {
        if (byteOffset % (1 << FoldShift) != 0) throw new ArgumentException($"The piece begins at {byteOffset}; pieces begin at multiples of {1 << FoldShift}.", nameof(byteOffset));
        position = byteOffset;
        half = -1;
    }

    /// <inheritdoc/>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        foreach (byte each in bytes)
        {
            if (half < 0)
            {
                half = each;
                LeftOverBytes++;
            }
            else
            {
                int word = highByteFirst ? (half << 8) | each : (each << 8) | half;
                // The fold is that of the word's first byte; both bytes share it, since a fold begins at an even offset.
                counts[((int)(position >> FoldShift) & 1) == 0 ? word : Words + word]++;
                Symbols++;
                LeftOverBytes--;
                half = -1;
            }
            position++;
        }
    }

    /// <inheritdoc/>
    public void Merge(ISymbolTally other)
    {
        if (other is not WordTally tally || tally.highByteFirst != highByteFirst) throw new ArgumentException($"A word tally was to be merged with {other}.", nameof(other));
        for (int i = 0; i < counts.Length; i++) counts[i] += tally.counts[i];
        Symbols += tally.Symbols;
        LeftOverBytes += tally.LeftOverBytes;
    }

    /// <inheritdoc/>
    public void WriteTo(Stream stream)
    {
        using var writer = new TallyWriter(stream, TallyKind.Words);
        writer.Write(highByteFirst ? 1 : 0);
        writer.Write(Symbols);
        writer.Write(LeftOverBytes);
        writer.WriteSparse(entry =>
        {
            for (int key = 0; key < counts.Length; key++)
                if (counts[key] > 0) entry(key, counts[key]);
        });
    }

    /// <summary>Reads what <see cref="WriteTo"/> wrote.</summary>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or is of another kind.</exception>
    public static WordTally ReadFrom(Stream stream)
    {
        using var reader = new TallyReader(stream, TallyKind.Words);
        var tally = new WordTally(reader.Read("byte order", 1) == 1) { Symbols = reader.Read("number of symbols", long.MaxValue), LeftOverBytes = (int)reader.Read("left-over bytes", int.MaxValue) };
        reader.ReadSparse(2 * Words, (key, count) => tally.counts[key] = count);
        reader.Finish();
        return tally;
    }

    /// <inheritdoc/>
    public void VisitContexts(int order, IContextVisitor visitor)
    {
        ArgumentOutOfRangeException.ThrowIfNotEqual(order, 0);
        var row = new ContextRow(256);
        row.Begin();
        for (int word = 0; word < Words; word++) row.Add(word, counts[word], counts[Words + word]);
        row.Show(0, visitor);
    }

    /// <inheritdoc/>
    public BlockCounts Blocks(int length) => throw new ArgumentOutOfRangeException(nameof(length), length, "Words are not counted in blocks.");

    /// <inheritdoc/>
    public void ReleaseContexts()
    {
        // There are no contexts.
    }

    /// <inheritdoc/>
    public void Clear()
    {
        Array.Clear(counts);
        (Symbols, LeftOverBytes, position, half) = (0, 0, 0, -1);
    }
}
