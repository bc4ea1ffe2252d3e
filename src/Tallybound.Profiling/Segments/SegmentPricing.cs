using System.Buffers;
using Tallybound.Coding;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Segments;

/// <summary>What each segment costs under its own, the source's and the previous segment's Huffman code, and how far it lies from the source.</summary>
public static class SegmentPricing
{
    /// <summary>The figures of every segment; tables are left out of all of them.</summary>
    /// <returns>Null for a source without symbols. One segment: its three payloads are equal and its divergence is 0.</returns>
    public static SegmentSeries? Series(SegmentCounts source)
    {
        int segments = source.Segments, alphabetSize = source.AlphabetSize;
        if (segments == 0) return null;
        long[] ownBits = new long[segments], sourceBits = new long[segments], previousBits = new long[segments];
        double[] divergence = new double[segments];
        long[] whole = ArrayPool<long>.Shared.Rent(alphabetSize);
        try
        {
            source.Sum(whole.AsSpan(0, alphabetSize));
            FillSeries(source, whole.AsSpan(0, alphabetSize), ownBits, sourceBits, previousBits, divergence);
        }
        finally
        {
            ArrayPool<long>.Shared.Return(whole);
        }
        return new SegmentSeries
        {
            SegmentBytes = source.SegmentBytes,
            OwnTableBits = ownBits,
            SourceTableBits = sourceBits,
            PreviousTableBits = previousBits,
            DivergenceBits = divergence,
        };
    }

    /// <summary>Payload bits of a block under a code trained on others' counts: the escape is a symbol after all others, with count 1 in training, and ⌈log2 A⌉ plain bits follow it.</summary>
    /// <param name="counts">n(s) of what is coded.</param>
    /// <param name="training">Counts that the code is made of, aligned; at most 256.</param>
    /// <returns>0 for nothing to code. Without training the escape is the only word, of 1 bit.</returns>
    public static long BitsWithEscape(ReadOnlySpan<long> counts, ReadOnlySpan<long> training)
    {
        int alphabetSize = training.Length;
        Span<long> withEscape = stackalloc long[SegmentCounts.LargestAlphabet + 1];
        Span<byte> lengths = stackalloc byte[SegmentCounts.LargestAlphabet + 1];
        training.CopyTo(withEscape);
        withEscape[alphabetSize] = 1;
        Huffman.Lengths(withEscape[..(alphabetSize + 1)], lengths[..(alphabetSize + 1)]);
        int escapeBits = lengths[alphabetSize] + TableBlockPricer.PlainBits(alphabetSize);
        long bits = 0;
        for (int symbol = 0; symbol < counts.Length; symbol++) bits += counts[symbol] * (lengths[symbol] == 0 ? escapeBits : lengths[symbol]);
        return bits;
    }

    /// <summary>H0 of the source with its 95 % interval by moving blocks of neighbouring segments.</summary>
    /// <param name="source">The segments.</param>
    /// <param name="seed">Recorded beside the figure.</param>
    /// <returns>Bits a symbol; null below 16 segments.</returns>
    public static Estimate? EntropyInterval(SegmentCounts source, ulong seed)
    {
        if (MovingBlockBootstrap.OfCounts(source.All, source.AlphabetSize, WeightedLogarithm.BitsPerSymbol, seed) is not { } interval) return null;
        Span<long> whole = stackalloc long[source.AlphabetSize];
        source.Sum(whole);
        return interval with { Value = Entropy.BitsPerSymbol(whole) };
    }

    private static void FillSeries(SegmentCounts source, ReadOnlySpan<long> whole, long[] ownBits, long[] sourceBits, long[] previousBits, double[] divergence)
    {
        Span<byte> sourceLengths = stackalloc byte[whole.Length], own = stackalloc byte[whole.Length];
        Huffman.Lengths(whole, sourceLengths);
        for (int segment = 0; segment < source.Segments; segment++)
        {
            ReadOnlySpan<long> counts = source[segment];
            sourceBits[segment] = Huffman.PayloadDigits(counts, sourceLengths);
            if (source.Segments == 1)
            {
                ownBits[0] = previousBits[0] = sourceBits[0];
                return;
            }
            Huffman.Lengths(counts, own);
            ownBits[segment] = Huffman.PayloadDigits(counts, own);
            previousBits[segment] = segment == 0 ? ownBits[0] : BitsWithEscape(counts, source[segment - 1]);
            divergence[segment] = Divergence.JensenShannonBits(counts, whole);
        }
    }
}
