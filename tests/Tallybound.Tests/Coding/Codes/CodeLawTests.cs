using System.Numerics;
using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

public sealed class CodeLawTests
{
    private static readonly Gen<long[]> Counts = Gen.OneOf(
        Gen.Long[0, 5].Array[1, 300], Gen.Long[0, 1_000_000_000].Array[1, 60], Gen.Int[1, 50].Select(n => Enumerable.Range(0, n).Select(i => Fibonacci(i)).ToArray()))
        .Where(counts => counts.Any(count => count > 0));

    private static long Fibonacci(int n)
    {
        (long a, long b) = (1, 1);
        for (int i = 0; i < n; i++) (a, b) = (b, a + b);
        return a;
    }

    private static byte[] Free(long[] counts, int radix = 2)
    {
        var lengths = new byte[counts.Length];
        Huffman.Lengths(counts, lengths, radix);
        return lengths;
    }

    [Fact]
    public void A_huffman_code_lies_between_the_entropy_and_the_entropy_and_one_bit_and_within_gallagers_bound()
    {
        int cases = 0;
        Counts.Where(counts => counts.Count(count => count > 0) > 1).Sample(
            counts =>
            {
                cases++;
                double rate = (double)Huffman.PayloadDigits(counts, Free(counts)) / counts.Sum(), entropy = Entropy.BitsPerSymbol(counts);
                return rate >= entropy - 1e-9 && rate < entropy + 1 && rate - entropy <= RedundancyBound.Gallager(counts) + 1e-9;
            }, iter: 1000, threads: 1);
        Assert.Equal(1000, cases);
    }

    [Fact]
    public void The_kraft_sum_is_one_less_the_dummies_in_every_radix()
    {
        int cases = 0;
        Gen.Select(Counts, Gen.Int[2, 16]).Sample(
            (counts, radix) =>
            {
                cases++;
                byte[] lengths = Free(counts, radix);
                int used = counts.Count(count => count > 0);
                (BigInteger numerator, BigInteger denominator) = KraftSum.Fraction(lengths, radix);
                if (used == 1) return numerator == 1 && denominator == radix;
                int dummies = (radix - 1 - ((used - 1) % (radix - 1))) % (radix - 1);
                BigInteger whole = BigInteger.Pow(radix, lengths.Max());
                return numerator * whole == (whole - dummies) * denominator;
            }, iter: 1000, threads: 1);
        Assert.Equal(1000, cases);
    }

    [Fact]
    public void A_limit_never_gains_and_costs_nothing_when_the_free_code_keeps_it()
    {
        int cases = 0;
        Gen.Select(Counts, Gen.Int[1, 40]).Sample(
            (counts, limit) =>
            {
                cases++;
                byte[] free = Free(counts);
                var limited = new byte[counts.Length];
                if (!LengthLimited.TryLengths(counts, limit, limited)) return Math.Pow(2, limit) < counts.Count(count => count > 0);
                long cost = Huffman.PayloadDigits(counts, limited), least = Huffman.PayloadDigits(counts, free);
                return limited.Max() <= limit && (free.Max() <= limit ? limited.AsSpan().SequenceEqual(free) : cost >= least)
                    && (counts.Count(count => count > 0) == 1 || KraftSum.Of(limited, 2) == "1");
            }, iter: 2000, threads: 1);
        Assert.Equal(2000, cases);
    }

    [Fact]
    public void No_code_of_a_small_alphabet_is_cheaper()
    {
        int cases = 0;
        Gen.Select(Gen.Long[1, 30].Array[2, 6], Gen.Int[2, 6]).Sample(
            (counts, limit) =>
            {
                cases++;
                long least = Cheapest(counts, limit, new byte[counts.Length], 0);
                var limited = new byte[counts.Length];
                bool possible = LengthLimited.TryLengths(counts, limit, limited);
                return possible ? Huffman.PayloadDigits(counts, limited) == least : least == long.MaxValue;
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
    }

    /// <summary>Tries every choice of lengths up to the limit whose Kraft sum is at most 1.</summary>
    private static long Cheapest(long[] counts, int limit, byte[] lengths, int at)
    {
        if (at == counts.Length)
        {
            (BigInteger numerator, BigInteger denominator) = KraftSum.Fraction(lengths, 2);
            return numerator <= denominator ? Huffman.PayloadDigits(counts, lengths) : long.MaxValue;
        }
        long least = long.MaxValue;
        for (byte length = 1; length <= limit; length++)
        {
            lengths[at] = length;
            least = Math.Min(least, Cheapest(counts, limit, lengths, at + 1));
        }
        return least;
    }

    [Fact]
    public void What_is_counted_is_written_and_what_is_written_decodes()
    {
        int cases = 0;
        Gen.Int[0, 40].Array[1, 500].Sample(
            symbols =>
            {
                cases++;
                var counts = new long[41];
                foreach (int symbol in symbols) counts[symbol]++;
                var code = new CanonicalCode(Free(counts));
                var counter = default(BitCounter);
                code.Encode<BitCounter>(symbols, ref counter);
                var writer = new BitWriter();
                code.Encode<BitWriter>(symbols, ref writer);
                var back = new int[symbols.Length];
                var reader = new BitReader(writer.ToArray());
                code.Decode(ref reader, back);
                return counter.Bits == Huffman.PayloadDigits(counts, Free(counts)) && writer.Bits == counter.Bits && reader.Position == writer.Bits && back.AsSpan().SequenceEqual(symbols);
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    [Fact]
    public void Digits_counted_are_digits_written_in_every_radix()
    {
        int cases = 0;
        Gen.Select(Gen.Int[0, 25].Array[1, 200], Gen.Int[2, 16]).Sample(
            (symbols, radix) =>
            {
                cases++;
                var counts = new long[26];
                foreach (int symbol in symbols) counts[symbol]++;
                byte[] lengths = Free(counts, radix);
                var code = new CanonicalDigits(lengths, radix);
                byte[] digits = code.Encode(symbols);
                return digits.Length == Huffman.PayloadDigits(counts, lengths) && digits.All(digit => digit < radix) && code.Decode(digits).AsSpan().SequenceEqual(symbols);
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    [Fact]
    public void No_word_begins_another()
    {
        int cases = 0;
        Counts.Sample(
            counts =>
            {
                cases++;
                var code = new CanonicalCode(Free(counts));
                string[] words = [.. Enumerable.Range(0, counts.Length).Where(symbol => code.Length(symbol) > 0).Select(symbol => Text(code, symbol)).Order(StringComparer.Ordinal)];
                return words.Zip(words.Skip(1)).All(pair => !pair.Second.StartsWith(pair.First, StringComparison.Ordinal));
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    private static string Text(CanonicalCode code, int symbol) => Convert.ToString((long)code.Word(symbol), 2).PadLeft(code.Length(symbol), '0')[^code.Length(symbol)..];

    /// <summary>Common practice, no source: in what order equal counts are paired changes lengths and never the cost.</summary>
    [Fact]
    public void The_order_of_symbols_never_changes_the_cost()
    {
        int cases = 0;
        Gen.Select(Counts, Gen.Int).Sample(
            (counts, seed) =>
            {
                cases++;
                long[] shuffled = [.. counts];
                new Random(seed).Shuffle(shuffled);
                return Huffman.PayloadDigits(counts, Free(counts)) == Huffman.PayloadDigits(shuffled, Free(shuffled));
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    /// <summary>Common practice, no source.</summary>
    [Fact]
    public void Four_equally_likely_symbols_need_two_bits_at_full_efficiency()
    {
        long[] counts = [7, 7, 7, 7];
        Assert.Equal(new byte[] { 2, 2, 2, 2 }, Free(counts));
        Assert.Equal(1.0, Entropy.BitsPerSymbol(counts) / 2, 1e-15);
    }

    /// <summary>Common practice, no source: powers of two reach the entropy in binary, powers of three do not, and do in radix 3.</summary>
    [Fact]
    public void Powers_of_the_radix_reach_the_entropy_and_others_do_not()
    {
        long[] halves = [8, 4, 2, 1, 1], thirds = [9, 3, 3, 3, 3, 1, 1, 1, 1, 1, 1];
        Assert.Equal(Entropy.BitsPerSymbol(halves), Huffman.PayloadDigits(halves, Free(halves)) / 16.0, 1e-12);
        Assert.Equal(Entropy.BitsPerSymbol(thirds) / Math.Log2(3), Huffman.PayloadDigits(thirds, Free(thirds, 3)) / 27.0, 1e-12);
        Assert.True(Huffman.PayloadDigits(thirds, Free(thirds)) / 27.0 > Entropy.BitsPerSymbol(thirds) + 0.01);
    }

    [Fact]
    public void Lengths_that_make_no_code_are_refused()
    {
        Assert.Throws<ArgumentException>(() => new CanonicalCode([1, 1, 1]));
        Assert.Throws<ArgumentException>(() => new CanonicalCode([64]));
        Assert.Throws<ArgumentException>(() => new CanonicalDigits([1, 1, 1, 1], 3));
        // 1·3 + 5 is 22 in radix 3, but 5 is no digit.
        Assert.Throws<InvalidDataException>(() => new CanonicalDigits([1, 2, 2, 2, 2, 2, 2], 3).Decode([1, 5]));
        Assert.Throws<InvalidDataException>(() =>
        {
            var reader = new BitReader([0xFF]);
            new CanonicalCode([1]).Decode(ref reader, new int[1]);
        });
    }
}
