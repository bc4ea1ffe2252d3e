namespace Tallybound.Coding.Codes;

/// <summary>Which Golomb parameter suits given numbers: by the rule for geometric ones, or by trying.</summary>
public static class GolombParameter
{
    private const long TriedOneByOne = 64;
    private const int StepsPerDoubling = 8;
    private const long Around = 8;

    /// <summary>The rule of <see cref="GolombCode.ParameterFor"/> for the geometric distribution of the same mean, θ = mean/(1 + mean).</summary>
    /// <param name="values">Numbers from 0.</param>
    /// <param name="counts">How often each comes, aligned; nothing counted: 1.</param>
    /// <returns>m, at least 1.</returns>
    public static long ByRule(ReadOnlySpan<long> values, ReadOnlySpan<long> counts)
    {
        double total = 0, sum = 0;
        for (int i = 0; i < values.Length; i++)
        {
            total += counts[i];
            sum += (double)values[i] * counts[i];
        }
        if (sum == 0) return 1;
        double mean = sum / total;
        double theta = mean / (1 + mean);
        // Above 2^52 the mean is all that θ, so near 1, still tells: m is mean · ln 2 there.
        return theta < 1 - Math.ScaleB(1, -40) ? GolombCode.ParameterFor(theta) : (long)Math.Min(GolombCode.LargestParameter, mean * Math.Log(2));
    }

    /// <summary>The cheapest parameter found: every m to 64, eight a doubling above, the powers of two, the rule's, and then the neighbours of the best.</summary>
    /// <param name="values">Numbers from 0.</param>
    /// <param name="counts">How often each comes, aligned; nothing counted: m = 1 at 0 bits.</param>
    /// <returns>m, the lowest of equally cheap ones that were tried, and Σ count × length in bits. Never dearer than the rule's m or the best Rice parameter.</returns>
    /// <exception cref="OverflowException">Every m tried costs more bits than a long holds.</exception>
    public static (long M, long PayloadBits) BySearch(ReadOnlySpan<long> values, ReadOnlySpan<long> counts)
    {
        long largest = Largest(values, counts);
        (long M, UInt128 Bits) best = (1, PayloadBits(values, counts, 1));
        Try(ByRule(values, counts), values, counts, ref best);
        for (long m = 2; m <= Math.Min(TriedOneByOne, largest + 1); m++) Try(m, values, counts, ref best);
        // Above the largest number a word only grows with m.
        for (int doubling = 6; doubling < 62 && 1L << doubling <= 2 * largest; doubling++)
            for (int step = 0; step < StepsPerDoubling; step++) Try((1L << doubling) + ((1L << doubling) / StepsPerDoubling * step), values, counts, ref best);
        long middle = best.M;
        for (long m = Math.Max(1, middle - Around); m <= Math.Min(GolombCode.LargestParameter, middle + Around); m++) Try(m, values, counts, ref best);
        return (best.M, checked((long)best.Bits));
    }

    /// <summary>The cheapest k of Rice codes, that is of m = 2^k, and its Σ count × length in bits; parameters and errors as for <see cref="BySearch"/>.</summary>
    public static (int K, long PayloadBits) Rice(ReadOnlySpan<long> values, ReadOnlySpan<long> counts)
    {
        long largest = Largest(values, counts);
        (long M, UInt128 Bits) best = (1, PayloadBits(values, counts, 1));
        for (int k = 1; k < 63 && 1L << (k - 1) <= largest; k++) Try(1L << k, values, counts, ref best);
        return ((int)long.Log2(best.M), checked((long)best.Bits));
    }

    private static void Try(long m, ReadOnlySpan<long> values, ReadOnlySpan<long> counts, ref (long M, UInt128 Bits) best)
    {
        UInt128 bits = PayloadBits(values, counts, m);
        if (bits < best.Bits || (bits == best.Bits && m < best.M)) best = (m, bits);
    }

    /// <summary>In 128 bits: a parameter far too small must lose, not overflow.</summary>
    private static UInt128 PayloadBits(ReadOnlySpan<long> values, ReadOnlySpan<long> counts, long m)
    {
        UInt128 bits = 0;
        for (int i = 0; i < values.Length; i++) bits += (UInt128)counts[i] * (UInt128)GolombCode.Length(values[i], m);
        return bits;
    }

    private static long Largest(ReadOnlySpan<long> values, ReadOnlySpan<long> counts)
    {
        long largest = 0;
        for (int i = 0; i < values.Length; i++)
            if (counts[i] > 0) largest = Math.Max(largest, values[i]);
        return largest;
    }
}
