using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>Order 0: what the counts of single symbols say. C. Shannon, A Mathematical Theory of Communication (1948), section 6.</summary>
/// <remarks>The order of a span is the order of the symbols; sums are taken in it, over the symbols in use, so equal counts give equal bits everywhere.
/// A count below 0 is the caller's defect and is not looked for.</remarks>
public static class Entropy
{
    /// <summary>-log2(count/total): the information of one symbol, in bits.</summary>
    /// <param name="count">1 to <paramref name="total"/>; equal to it gives exactly 0.</param>
    /// <param name="total">1 or more.</param>
    /// <remarks>Relative error below 8·2^-53. Near 1 the logarithm of the quotient loses its digits, so the other side's share is taken.</remarks>
    public static double SelfInformation(long count, long total) => count > total - count
        ? Logarithm.Log1p((double)(total - count) / count) / Logarithm.Ln2
        : Math.Log2((double)total / count);

    /// <summary>H0 = Σ (n/N) log2(N/n), in bits a symbol: the static order-0 bound, for one fixed table without memory.</summary>
    /// <returns>0 to log2 of the symbols in use. Nothing counted, or one symbol in use: 0.</returns>
    /// <remarks>Relative error below (m + 16)·2^-53, with m the symbols in use.</remarks>
    public static double BitsPerSymbol(ReadOnlySpan<long> counts)
    {
        long total = Total(counts);
        return total == 0 ? 0 : InformationBits(counts, total) / total;
    }

    /// <summary>N·H0, in bits over the whole source: what no memoryless code with one fixed table can beat on these counts, its table left out.</summary>
    /// <returns>Nothing counted, or one symbol in use: 0 bits.</returns>
    public static EntropyBound Bound(ReadOnlySpan<long> counts) => new(InformationBits(counts, Total(counts)), BoundClass.Memoryless);

    /// <summary>H0 + (m - 1)/(2N ln 2), in bits a symbol: H0 with its first-order bias taken away. Not clamped: it may pass log2 of the alphabet.</summary>
    /// <param name="bitsPerSymbol">H0 of the same counts.</param>
    /// <param name="symbolsInUse">m. 1 adds nothing.</param>
    /// <param name="total">N. 0 gives <paramref name="bitsPerSymbol"/> back.</param>
    /// <remarks>G. Miller, Note on the bias of information estimates (1955), due to Miller and W. Madow.</remarks>
    public static double Corrected(double bitsPerSymbol, long symbolsInUse, long total) =>
        total == 0 ? bitsPerSymbol : bitsPerSymbol + (symbolsInUse - 1) / (2.0 * total * Logarithm.Ln2);

    /// <summary>sqrt(Var(log2 1/p)/N), in bits a symbol: the standard error of H0 if the symbols were independent.</summary>
    /// <returns>Exactly 0 on uniform counts (the first-order term vanishes there, the error does not), for one symbol in use and for none.</returns>
    /// <remarks>G. Basharin, On a statistical estimate for the entropy of a sequence of independent random variables, Theory of Probability and its Applications 4 (1959).</remarks>
    public static double StandardErrorBits(ReadOnlySpan<long> counts)
    {
        long total = Total(counts), largest = 0;
        if (total == 0) return 0;
        foreach (long count in counts) largest = Math.Max(largest, count);
        return Math.Sqrt(SquaresBits(counts, total, largest)) / total;
    }

    /// <summary>Σ n·(log2(N/n) - H0)², in squared bits; exactly 0 on uniform counts.</summary>
    internal static double SquaresBits(ReadOnlySpan<long> counts, long total, long largest)
    {
        // Measured from the commonest symbol, so that equal counts differ by exactly 0 and nothing cancels when one symbol rules.
        double first = 0, second = 0, most = Math.Log2(largest);
        foreach (long count in counts)
        {
            if (count == 0) continue;
            double above = most - Log2Table.Of(count);
            first += count * above;
            second += count * above * above;
        }
        return Math.Max(0, second - first * first / total);
    }

    /// <summary>Σ n·log2(N/n) over symbols in use, in bits; 0 for none.</summary>
    internal static double InformationBits(ReadOnlySpan<long> counts, long total)
    {
        double bits = 0;
        foreach (long count in counts)
        {
            if (count != 0) bits += count * SelfInformation(count, total);
        }
        return bits;
    }

    private static long Total(ReadOnlySpan<long> counts)
    {
        long total = 0;
        foreach (long count in counts) total += count;
        return total;
    }
}
