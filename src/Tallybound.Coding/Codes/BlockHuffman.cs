namespace Tallybound.Coding.Codes;

/// <summary>Huffman codes over symbol blocks that really stand in a source: up to 2^24 of them.</summary>
public static class BlockHuffman
{
    /// <summary>Payload of the code, and how many blocks get each length.</summary>
    /// <param name="counts">Counts of the blocks in use, in any order, each above 0; empty: a payload of 0.</param>
    /// <param name="lengthHistogram">Takes the number of blocks of each length, 256 entries.</param>
    /// <returns>Σ count × length in bits; one block in use costs 1 bit each.</returns>
    /// <exception cref="OverflowException">The payload does not fit a long.</exception>
    public static long PayloadBits(ReadOnlySpan<long> counts, Span<long> lengthHistogram)
    {
        lengthHistogram.Clear();
        CountGroups groups = CountGroups.Of(counts);
        ExactCost cost = default;
        WeightRuns.Build<long, ExactCost>(groups.Counts, groups.Times, lengthHistogram, ref cost);
        return cost.Total;
    }

    /// <summary>Lengths of the code, aligned with the counts: those that <see cref="Huffman.Lengths"/> gives.</summary>
    /// <param name="counts">Counts of the blocks in use, blocks ascending.</param>
    /// <param name="lengths">Takes the lengths.</param>
    public static void Lengths(ReadOnlySpan<long> counts, Span<byte> lengths)
    {
        Span<long> histogram = stackalloc long[256];
        PayloadBits(counts, histogram);
        CountGroups groups = CountGroups.Of(counts);
        var next = new Dictionary<long, (int Length, long Left)[]>(groups.Counts.Length);
        int length = histogram.LastIndexOfAnyExcept(0L);
        long leftOfLength = length > 0 ? histogram[length] : 0;
        for (int group = 0; group < groups.Counts.Length; group++)
        {
            // Within a group the longest lengths go to the lowest symbols.
            var runs = new List<(int, long)>(1);
            for (long left = groups.Times[group]; left > 0;)
            {
                long take = Math.Min(left, leftOfLength);
                runs.Add((length, take));
                left -= take;
                leftOfLength -= take;
                while (leftOfLength == 0 && length > 1) leftOfLength = histogram[--length];
            }
            next.Add(groups.Counts[group], [.. runs]);
        }
        for (int i = 0; i < counts.Length; i++)
        {
            (int Length, long Left)[] runs = next[counts[i]];
            int run = 0;
            while (runs[run].Left == 0) run++;
            runs[run].Left--;
            lengths[i] = (byte)runs[run].Length;
        }
    }
}
