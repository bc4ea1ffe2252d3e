using Tallybound.Tallies.Files;

namespace Tallybound.Tallies;

/// <summary>The one place that says which tally counts a view.</summary>
public static class TallyChoice
{
    /// <summary>Sources of at most this many bytes are counted in sorted lists, larger ones in dense tables.</summary>
    public const long SparseAtMostBytes = 1 << 18;

    /// <summary>Memory of dense tables to order 2 or blocks of 3.</summary>
    public const long DenseBytes = 256L << 20;

    /// <summary>Whether a view of a source needs the large tables.</summary>
    /// <param name="view">The view's name.</param>
    /// <param name="highestOrder">Orders asked for.</param>
    /// <param name="longestBlock">Blocks asked for.</param>
    /// <param name="sourceBytes">Size of the source; null: unknown.</param>
    public static bool NeedsDense(string view, int highestOrder, int longestBlock, long? sourceBytes) =>
        view == "bytes" && (highestOrder > 1 || longestBlock > 2) && sourceBytes is null or > SparseAtMostBytes;

    /// <summary>An empty tally for a view.</summary>
    /// <param name="view">The view's name.</param>
    /// <param name="highestOrder">Orders asked for; those that cannot be counted exactly are left out.</param>
    /// <param name="longestBlock">Blocks asked for; lengths that do not fit are left out.</param>
    /// <param name="sourceBytes">Size of the source; null: unknown.</param>
    /// <exception cref="ArgumentException">There is no such view.</exception>
    public static ISymbolTally Create(string view, int highestOrder, int longestBlock, long? sourceBytes)
    {
        ArgumentOutOfRangeException.ThrowIfNegative(highestOrder);
        ArgumentOutOfRangeException.ThrowIfLessThan(longestBlock, 1);
        return view switch
        {
            "bytes" when sourceBytes is <= SparseAtMostBytes => new SparseByteTally(Math.Min(highestOrder, 2), Math.Min(longestBlock, 3)),
            "bytes" => new ByteTally(Math.Min(highestOrder, 2), Math.Min(longestBlock, 3)),
            "nibbles" => new SmallAlphabetTally(4, highestOrder, longestBlock),
            "bits" => new SmallAlphabetTally(1, highestOrder, longestBlock),
            "words-le" => new WordTally(highByteFirst: false),
            "words-be" => new WordTally(highByteFirst: true),
            _ => throw new ArgumentException($"There is no view called {view}.", nameof(view)),
        };
    }

    /// <summary>Reads a tally that any <see cref="ISymbolTally.WriteTo"/> wrote.</summary>
    /// <param name="stream">A stream that can go back to its start.</param>
    /// <exception cref="InvalidDataException">It is damaged, ends early, or holds no symbol tally.</exception>
    public static ISymbolTally ReadFrom(Stream stream)
    {
        long start = stream.Position;
        TallyKind kind = TallyReader.KindOf(stream);
        stream.Position = start;
        return kind switch
        {
            TallyKind.Bytes => ByteTally.ReadFrom(stream),
            TallyKind.SparseBytes => SparseByteTally.ReadFrom(stream),
            TallyKind.SmallAlphabet => SmallAlphabetTally.ReadFrom(stream),
            TallyKind.Words => WordTally.ReadFrom(stream),
            _ => throw new InvalidDataException($"The tally is of kind {(long)kind}; that is no tally of symbols."),
        };
    }
}
