namespace Tallybound.Coding.Tables;

/// <summary>Code words by (length, symbol) as RFC 1951 §3.2.2 assigns them, for the small inner codes of tables.</summary>
internal static class CanonicalWords
{
    /// <summary>Longest word of an inner code.</summary>
    public const int LongestWord = 15;

    /// <summary>Gives each symbol its word, first bit most significant; 0 to a symbol not in use.</summary>
    public static void Assign(ReadOnlySpan<byte> lengths, Span<ushort> words)
    {
        Span<ushort> next = stackalloc ushort[LongestWord + 2];
        FirstWords(lengths, next);
        for (int symbol = 0; symbol < lengths.Length; symbol++) words[symbol] = lengths[symbol] == 0 ? (ushort)0 : next[lengths[symbol]]++;
    }

    /// <summary>Refuses lengths read from a table that ask for more words than there are.</summary>
    /// <exception cref="InvalidDataException">The Kraft sum is above 1.</exception>
    public static void RequireRoom(ReadOnlySpan<byte> lengths)
    {
        int taken = 0;
        foreach (byte length in lengths) taken += length == 0 ? 0 : 1 << (LongestWord - length);
        if (taken > 1 << LongestWord) throw new InvalidDataException("The table's inner code has more words than its lengths allow.");
    }

    /// <summary>The word with its first bit least significant, as RFC 1951 §3.1.1 packs Huffman codes.</summary>
    public static ulong Reverse(ushort word, int bits)
    {
        uint reversed = 0;
        for (int i = 0; i < bits; i++) reversed |= (uint)((word >> i) & 1) << (bits - 1 - i);
        return reversed;
    }

    /// <summary>The symbol whose word is the <paramref name="bits"/> low bits of <paramref name="word"/>, or −1.</summary>
    public static int Find(ReadOnlySpan<byte> lengths, ReadOnlySpan<ushort> words, ulong word, int bits)
    {
        for (int symbol = 0; symbol < lengths.Length; symbol++)
        {
            if (lengths[symbol] == bits && words[symbol] == word) return symbol;
        }
        return -1;
    }

    private static void FirstWords(ReadOnlySpan<byte> lengths, Span<ushort> next)
    {
        Span<int> histogram = stackalloc int[LongestWord + 1];
        histogram.Clear();
        foreach (byte length in lengths) histogram[length]++;
        histogram[0] = 0;
        int word = 0;
        next[0] = 0;
        for (int length = 1; length <= LongestWord; length++)
        {
            word = (word + histogram[length - 1]) << 1;
            next[length] = (ushort)word;
        }
    }
}
