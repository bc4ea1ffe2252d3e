using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>How far two sets of counts over the same symbols lie apart, in bits a symbol.</summary>
/// <remarks>Shares are compared exactly, as integer cross products, so proportional counts differ by exactly 0. Aligned spans of unequal length are refused by every member.</remarks>
public static class Divergence
{
    /// <summary>The Jensen-Shannon divergence with weights ½ and ½, base 2.</summary>
    /// <returns>0 for proportional counts, up to 1 for counts without a common symbol; symmetric. When either side is empty: 0, for nothing is known.</returns>
    /// <exception cref="ArgumentException">The spans differ in length.</exception>
    /// <remarks>J. Lin, Divergence measures based on the Shannon entropy, IEEE Transactions on Information Theory 37 (1991), equation 4.1.</remarks>
    public static double JensenShannonBits(ReadOnlySpan<long> first, ReadOnlySpan<long> second)
    {
        (long firstTotal, long secondTotal) = Totals(first, second);
        if (firstTotal == 0 || secondTotal == 0) return 0;
        double nats = 0;
        for (int i = 0; i < first.Length; i++)
        {
            if ((first[i] | second[i]) == 0) continue;
            double lean = Lean(first[i], firstTotal, second[i], secondTotal);
            if (lean != 0) nats += ((double)first[i] / firstTotal + (double)second[i] / secondTotal) * Balance(lean);
        }
        return Math.Min(1, nats / (4 * Logarithm.Ln2));
    }

    /// <summary>Bits a symbol that data with the counts <paramref name="data"/> costs under the ideal code of <paramref name="model"/>.</summary>
    /// <returns>At least the entropy of the data, equal to it for proportional counts; positive infinity when the model lacks a symbol of the data; 0 for no data.</returns>
    /// <exception cref="ArgumentException">The spans differ in length.</exception>
    /// <remarks>The entropy plus <see cref="KullbackLeiblerBits"/>: T. Cover and J. Thomas, Elements of Information Theory, theorem 5.4.3.</remarks>
    public static double CrossEntropyBits(ReadOnlySpan<long> data, ReadOnlySpan<long> model) =>
        Entropy.BitsPerSymbol(data) + KullbackLeiblerBits(data, model);

    /// <summary>The Kullback-Leibler divergence D(data‖model): what the wrong code costs beyond the entropy.</summary>
    /// <returns>0 for proportional counts and for no data; positive infinity when the model lacks a symbol of the data. Not symmetric.</returns>
    /// <exception cref="ArgumentException">The spans differ in length.</exception>
    /// <remarks>S. Kullback and R. Leibler, On information and sufficiency, Annals of Mathematical Statistics 22 (1951).</remarks>
    public static double KullbackLeiblerBits(ReadOnlySpan<long> data, ReadOnlySpan<long> model)
    {
        (long dataTotal, long modelTotal) = Totals(data, model);
        if (dataTotal == 0) return 0;
        double nats = 0;
        for (int i = 0; i < data.Length; i++)
        {
            if ((data[i] | model[i]) == 0) continue;
            if (model[i] == 0) return double.PositiveInfinity;
            double p = (double)data[i] / dataTotal, q = (double)model[i] / modelTotal;
            double lean = Lean(data[i], dataTotal, model[i], modelTotal);
            if (lean == 0) continue;
            // p ln(p/q) - p + q is never below 0, and the added parts sum to 0.
            double logRatio = Math.Abs(lean) < 0.5 ? Logarithm.Log1p(lean) - Logarithm.Log1p(-lean)
                : data[i] == 0 ? 0 : Math.Log(p / q);
            nats += p * logRatio - lean * (p + q);
        }
        return Math.Max(0, nats) / Logarithm.Ln2;
    }

    /// <summary>(p - q)/(p + q) of two shares, from exact integers: -1 to 1, and exactly 0 for equal shares.</summary>
    private static double Lean(long first, long firstTotal, long second, long secondTotal)
    {
        if ((firstTotal | secondTotal) < 1L << 31)
        {
            long left = first * secondTotal, right = second * firstTotal;
            return (double)(left - right) / (left + right);
        }
        Int128 wideLeft = (Int128)first * secondTotal, wideRight = (Int128)second * firstTotal;
        return (double)(wideLeft - wideRight) / (double)(wideLeft + wideRight);
    }

    /// <summary>(1+x) ln(1+x) + (1-x) ln(1-x), at least 0: near 0 by its series Σ x^2k/(k(2k-1)), where the two logarithms would cancel.</summary>
    private static double Balance(double x)
    {
        double y = x * x;
        if (y < 0.0025) return y * (1 + y * (1.0 / 6 + y * (1.0 / 15 + y * (1.0 / 28 + y * (1.0 / 45 + y / 66)))));
        return Side(x) + Side(-x);

        static double Side(double x) => x == -1 ? 0 : (1 + x) * Logarithm.Log1p(x);
    }

    private static (long First, long Second) Totals(ReadOnlySpan<long> first, ReadOnlySpan<long> second)
    {
        if (first.Length != second.Length) throw new ArgumentException($"One side has {first.Length} symbols, the other {second.Length}; they must be aligned.", nameof(second));
        long firstTotal = 0, secondTotal = 0;
        foreach (long count in first) firstTotal += count;
        foreach (long count in second) secondTotal += count;
        return (firstTotal, secondTotal);
    }
}
