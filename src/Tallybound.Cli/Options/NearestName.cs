namespace Tallybound.Cli.Options;

/// <summary>The name that someone most likely meant.</summary>
internal static class NearestName
{
    /// <summary>The candidate with the fewest edits from <paramref name="typed"/>; the earlier one of equals; null when none is near.</summary>
    /// <remarks>An edit inserts, deletes or replaces a character or swaps two neighbours. Near is at most a third of the longer length.
    /// Edit distance with swaps: Lowrance and Wagner, "An extension of the string-to-string correction problem", J. ACM 22 (1975), restricted form.</remarks>
    public static string? Of(string typed, IEnumerable<string> candidates)
    {
        string? nearest = null;
        int fewest = int.MaxValue;
        foreach (string candidate in candidates)
        {
            int edits = Edits(typed.ToLowerInvariant(), candidate);
            if (edits >= fewest || edits * 3 > Math.Max(typed.Length, candidate.Length)) continue;
            nearest = candidate;
            fewest = edits;
        }
        return nearest;
    }

    /// <summary>The suggestion as the end of a sentence: <c>; did you mean X?</c>, empty when none is near.</summary>
    public static string Suggestion(string typed, IEnumerable<string> candidates) =>
        Of(typed, candidates) is { } nearest ? $"; did you mean {nearest}?" : "";

    /// <summary>Edits that turn one text into the other.</summary>
    public static int Edits(string from, string to)
    {
        int[] beforeLast = new int[to.Length + 1];
        int[] last = new int[to.Length + 1];
        int[] row = new int[to.Length + 1];
        for (int j = 0; j <= to.Length; j++) last[j] = j;
        for (int i = 1; i <= from.Length; i++)
        {
            row[0] = i;
            for (int j = 1; j <= to.Length; j++)
            {
                int replaced = last[j - 1] + (from[i - 1] == to[j - 1] ? 0 : 1);
                row[j] = Math.Min(replaced, Math.Min(last[j], row[j - 1]) + 1);
                if (i > 1 && j > 1 && from[i - 1] == to[j - 2] && from[i - 2] == to[j - 1]) row[j] = Math.Min(row[j], beforeLast[j - 2] + 1);
            }
            (beforeLast, last, row) = (last, row, beforeLast);
        }
        return last[to.Length];
    }
}
