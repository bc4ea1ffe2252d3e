namespace Tallybound.Coding.Tables;

/// <summary>One token of RFC 1951 §3.2.7: a length 0–15, or a run of the last length (16) or of zeros (17, 18).</summary>
internal readonly record struct LengthRun(byte Token, byte Extra)
{
    public const int CopyToken = 16, ShortZeroToken = 17, LongZeroToken = 18;

    private const int ShortestRun = 3, LongestCopy = 6, LongestShortZeros = 10, ShortestLongZeros = 11, LongestZeros = 138;

    /// <summary>Splits one row of lengths greedily: the longest run that a token can say, again and again; what is left below three goes one by one.</summary>
    /// <returns>Tokens made.</returns>
    public static int Split(ReadOnlySpan<byte> lengths, Span<LengthRun> runs)
    {
        int made = 0;
        for (int at = 0; at < lengths.Length;)
        {
            byte length = lengths[at];
            int end = at + 1;
            while (end < lengths.Length && lengths[end] == length) end++;
            int left = end - at;
            at = end;
            if (length != 0)
            {
                runs[made++] = new LengthRun(length, 0);
                left--;
            }
            while (left >= ShortestRun)
            {
                int take = Math.Min(left, length != 0 ? LongestCopy : LongestZeros);
                runs[made++] = OfRun(length, take);
                left -= take;
            }
            for (; left > 0; left--) runs[made++] = new LengthRun(length, 0);
        }
        return made;
    }

    /// <summary>Bits behind a token.</summary>
    public static int ExtraBits(int token) => token switch { CopyToken => 2, ShortZeroToken => 3, LongZeroToken => 7, _ => 0 };

    /// <summary>How many lengths a token stands for.</summary>
    public static int Repeats(int token, int extra) => token switch { < CopyToken => 1, LongZeroToken => ShortestLongZeros + extra, _ => ShortestRun + extra };

    private static LengthRun OfRun(byte length, int take)
    {
        if (length != 0) return new LengthRun(CopyToken, (byte)(take - ShortestRun));
        return take <= LongestShortZeros ? new LengthRun(ShortZeroToken, (byte)(take - ShortestRun)) : new LengthRun(LongZeroToken, (byte)(take - ShortestLongZeros));
    }
}
