namespace Tallybound.Tallies;

/// <summary>Least-significant-digit sort of short keys, nine bits a pass.</summary>
internal static class KeySort
{
    private const int DigitBits = 9;
    private const int FewKeys = 48;

    /// <summary>Sorts keys of <paramref name="keyBits"/> bits; <paramref name="scratch"/> is at least as long.</summary>
    public static void Sort(Span<uint> keys, Span<uint> scratch, int keyBits)
    {
        if (keys.Length <= FewKeys)
        {
            keys.Sort();
            return;
        }
        Span<uint> from = keys, to = scratch[..keys.Length];
        int passes = (keyBits + DigitBits - 1) / DigitBits;
        Span<int> starts = stackalloc int[1 << DigitBits];
        for (int pass = 0; pass < passes; pass++)
        {
            int shift = pass * DigitBits;
            starts.Clear();
            foreach (uint key in from) starts[(int)(key >> shift) & ((1 << DigitBits) - 1)]++;
            int sum = 0;
            foreach (ref int start in starts) (start, sum) = (sum, sum + start);
            foreach (uint key in from) to[starts[(int)(key >> shift) & ((1 << DigitBits) - 1)]++] = key;
            Span<uint> swap = from;
            from = to;
            to = swap;
        }
        if (passes % 2 == 1) from.CopyTo(keys);
    }
}
