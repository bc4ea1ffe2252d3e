using System.Buffers;

namespace Tallybound.Coding.Codes;

/// <summary>Different counts, ascending, and how many symbols have each.</summary>
internal sealed class CountGroups
{
    private const int TableSize = 1 << 14;

    private CountGroups(long[] counts, long[] times) => (Counts, Times) = (counts, times);

    /// <summary>The different counts above 0, ascending.</summary>
    public long[] Counts { get; }

    /// <summary>How many symbols have each.</summary>
    public long[] Times { get; }

    /// <summary>Groups the counts; zeros are passed over.</summary>
    public static CountGroups Of(ReadOnlySpan<long> counts)
    {
        if (counts.Length <= 512) return OfFew(counts);
        // Small counts by a table, the rare large ones by a dictionary.
        long[] table = ArrayPool<long>.Shared.Rent(TableSize);
        table.AsSpan(0, TableSize).Clear();
        var large = new Dictionary<long, long>();
        foreach (long count in counts)
        {
            if (count < TableSize) table[count]++;
            else large[count] = large.GetValueOrDefault(count) + 1;
        }
        var different = new List<long>();
        var times = new List<long>();
        for (int count = 1; count < TableSize; count++)
        {
            if (table[count] == 0) continue;
            different.Add(count);
            times.Add(table[count]);
        }
        ArrayPool<long>.Shared.Return(table);
        foreach (long count in large.Keys.Order())
        {
            different.Add(count);
            times.Add(large[count]);
        }
        return new CountGroups([.. different], [.. times]);
    }

    private static CountGroups OfFew(ReadOnlySpan<long> counts)
    {
        Span<long> sorted = stackalloc long[counts.Length];
        int used = 0;
        foreach (long count in counts)
            if (count > 0) sorted[used++] = count;
        sorted = sorted[..used];
        sorted.Sort();
        int groups = 0;
        for (int i = 0; i < used; i++) groups += i == 0 || sorted[i] != sorted[i - 1] ? 1 : 0;
        var different = new long[groups];
        var times = new long[groups];
        int at = -1;
        for (int i = 0; i < used; i++)
        {
            if (i == 0 || sorted[i] != sorted[i - 1]) different[++at] = sorted[i];
            times[at]++;
        }
        return new CountGroups(different, times);
    }
}
