using System.Buffers;

namespace Tallybound.Coding.Codes.Tans;

/// <summary>Frequencies that add up to a power of two and make the payload Σ n(s)·log2(2^R/f(s)) as small as such frequencies can.</summary>
/// <remarks>The payload is a sum of convex functions, one a symbol, so taking one unit after another where it saves most ends at the minimum; equal savings go to the lower symbol.
/// The first units are not taken one by one: ln(1 + 1/f) lies between 1/(f + 1/2) and 1/(f + 1/ln 2 − 1), which gives a start that no symbol passes at the minimum.</remarks>
public static class QuantizedFrequencies
{
    /// <summary>Largest R.</summary>
    public const int LargestLog = 16;

    private const double UpperOffset = 2 - (1 / 0.69314718055994530942);

    /// <summary>Gives each symbol in use a frequency of at least 1, in all 2^R.</summary>
    /// <param name="counts">n(s), at least 0.</param>
    /// <param name="log">R, 1 to 16.</param>
    /// <param name="frequencies">Takes one frequency a symbol, 0 for one not in use.</param>
    /// <returns>False, and frequencies of 0, where no symbol or more than 2^R symbols are in use.</returns>
    public static bool TryFit(ReadOnlySpan<long> counts, int log, Span<int> frequencies)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(log, 1);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(log, LargestLog);
        if (frequencies.Length != counts.Length) throw new ArgumentException($"There are {counts.Length} counts and room for {frequencies.Length} frequencies.", nameof(frequencies));
        int inUse = counts.Length - counts.Count(0L), total = 1 << log;
        if (inUse == 0 || inUse > total)
        {
            frequencies.Clear();
            return false;
        }
        int missing = total - Start(counts, total, frequencies);
        if (missing > 0) Raise(counts, frequencies, inUse, missing);
        return true;
    }

    /// <summary>Sets frequencies that are nowhere above the minimum's and returns their sum.</summary>
    private static int Start(ReadOnlySpan<long> counts, int total, Span<int> frequencies)
    {
        double counted = 0;
        foreach (long count in counts) counted += count;
        double perCount = total / counted;
        while (true)
        {
            double scaled = 0;
            long bound = 0;
            foreach (long count in counts)
            {
                if (count == 0) continue;
                long units = (long)((count * perCount) + UpperOffset);
                if (units > 1) scaled += count;
                bound += Math.Max(1, units);
            }
            if (bound <= total || scaled == 0) break;
            perCount = Math.Max(0, perCount - ((bound - total) / scaled));
        }
        int sum = 0;
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            frequencies[symbol] = counts[symbol] == 0 ? 0 : Math.Max(1, (int)((counts[symbol] * perCount) + 0.5));
            sum += frequencies[symbol];
        }
        return sum;
    }

    /// <summary>Takes the missing units one by one from a heap of savings.</summary>
    private static void Raise(ReadOnlySpan<long> counts, Span<int> frequencies, int inUse, int missing)
    {
        int[] symbols = ArrayPool<int>.Shared.Rent(inUse);
        double[] savings = ArrayPool<double>.Shared.Rent(inUse);
        int at = 0;
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            if (counts[symbol] == 0) continue;
            symbols[at] = symbol;
            savings[at++] = Saving(counts[symbol], frequencies[symbol]);
        }
        Span<int> heapSymbols = symbols.AsSpan(0, inUse);
        Span<double> heapSavings = savings.AsSpan(0, inUse);
        for (int parent = (inUse / 2) - 1; parent >= 0; parent--) SiftDown(heapSymbols, heapSavings, parent);
        for (; missing > 0; missing--)
        {
            int symbol = heapSymbols[0];
            frequencies[symbol]++;
            heapSavings[0] = Saving(counts[symbol], frequencies[symbol]);
            SiftDown(heapSymbols, heapSavings, 0);
        }
        ArrayPool<int>.Shared.Return(symbols);
        ArrayPool<double>.Shared.Return(savings);
    }

    /// <summary>Bits saved by one unit more.</summary>
    private static double Saving(long count, int frequency) => count * UnitSaving.Of(frequency);

    private static void SiftDown(Span<int> symbols, Span<double> savings, int at)
    {
        int symbol = symbols[at];
        double saving = savings[at];
        while (true)
        {
            int child = (2 * at) + 1;
            if (child >= symbols.Length) break;
            if (child + 1 < symbols.Length && Precedes(savings[child + 1], symbols[child + 1], savings[child], symbols[child])) child++;
            if (!Precedes(savings[child], symbols[child], saving, symbol)) break;
            symbols[at] = symbols[child];
            savings[at] = savings[child];
            at = child;
        }
        symbols[at] = symbol;
        savings[at] = saving;
    }

    private static bool Precedes(double saving, int symbol, double otherSaving, int otherSymbol) => saving > otherSaving || (saving == otherSaving && symbol < otherSymbol);

    /// <summary>log2(1 + 1/f), kept for the frequencies that tables of up to 12 bits have.</summary>
    private static class UnitSaving
    {
        private static readonly double[] s_kept = Build();

        public static double Of(int frequency) => (uint)frequency < (uint)s_kept.Length ? s_kept[frequency] : Compute(frequency);

        private static double[] Build()
        {
            double[] kept = new double[4097];
            kept[0] = double.PositiveInfinity;
            for (int frequency = 1; frequency < kept.Length; frequency++) kept[frequency] = Compute(frequency);
            return kept;
        }

        private static double Compute(int frequency) => Math.Log2((frequency + 1.0) / frequency);
    }
}
