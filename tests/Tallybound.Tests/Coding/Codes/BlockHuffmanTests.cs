using CsCheck;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

public sealed class BlockHuffmanTests
{
    private static readonly Gen<long[]> Counts = Gen.OneOf(
        Gen.Long[1, 4].Array[1, 400],
        Gen.Long[1, 40].Array[1, 60],
        Gen.Long[1, 1_000_000_000_000].Array[1, 40],
        Gen.Int[1, 40].Select(n => Enumerable.Range(0, n).Select(i => 1L << Math.Min(i, 40)).ToArray()));

    [Fact]
    public void Building_by_runs_of_equal_weights_gives_the_code_of_the_plain_construction()
    {
        int cases = 0;
        Counts.Sample(
            counts =>
            {
                cases++;
                var plain = new byte[counts.Length];
                var byRuns = new byte[counts.Length];
                Huffman.Lengths(counts, plain);
                BlockHuffman.Lengths(counts, byRuns);
                var histogram = new long[256];
                return plain.AsSpan().SequenceEqual(byRuns) && BlockHuffman.PayloadBits(counts, histogram) == Huffman.PayloadDigits(counts, plain);
            }, iter: 2000, threads: 1);
        Assert.Equal(2000, cases);
    }

    /// <summary>Bernoulli(1/10): the rate does not fall with every n. Values recomputed in exact fractions by independent code.</summary>
    [Theory]
    [InlineData(1, 1.0)]
    [InlineData(2, 1.29 / 2)]
    [InlineData(3, 1.598 / 3)]
    [InlineData(4, 1.9702 / 4)]
    [InlineData(5, 2.40097 / 5)]
    [InlineData(6, 2.820941 / 6)]
    public void The_extension_of_a_coin_of_one_in_ten_costs_the_published_rate(int blockLength, double expected) =>
        Assert.Equal(expected, HuffmanExtension.Of([9, 1], blockLength).ExpectedBitsPerSymbol, 1e-12);

    /// <summary>Sayood, Introduction to Data Compression, extended Huffman codes (from memory, recomputed): probabilities 0.8, 0.02, 0.18.</summary>
    [Theory]
    [InlineData(1, 1.2)]
    [InlineData(2, 0.8614)]
    [InlineData(3, 0.82092)]
    public void The_textbook_extension_costs_what_the_textbook_says(int blockLength, double expected) =>
        Assert.Equal(expected, HuffmanExtension.Of([80, 2, 18], blockLength).ExpectedBitsPerSymbol, 1e-9);

    [Fact]
    public void An_extension_lies_between_the_entropy_and_the_entropy_and_one_nth()
    {
        int cases = 0;
        Gen.Select(Gen.Long[1, 1000].Array[2, 30], Gen.Int[1, 3]).Sample(
            (counts, n) =>
            {
                cases++;
                HuffmanExtension extension = HuffmanExtension.Of(counts, n);
                double entropy = Entropy.BitsPerSymbol(counts);
                return extension.ExpectedBitsPerSymbol >= entropy - 1e-9 && extension.ExpectedBitsPerSymbol < entropy + (1.0 / n) + 1e-9
                    && extension.LengthHistogram!.Sum() == (long)Math.Pow(counts.Length, n);
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
    }

    [Fact]
    public void An_extension_is_the_code_of_its_listed_products()
    {
        int cases = 0;
        Gen.Select(Gen.Long[1, 50].Array[1, 12], Gen.Int[1, 3]).Sample(
            (counts, n) =>
            {
                cases++;
                long[] products = [1];
                for (int i = 0; i < n; i++) products = [.. products.SelectMany(product => counts.Select(count => product * count))];
                var histogram = new long[256];
                long payload = BlockHuffman.PayloadBits(products, histogram);
                HuffmanExtension extension = HuffmanExtension.Of(counts, n);
                return Math.Abs(extension.ExpectedBitsPerSymbol - (payload / Math.Pow(counts.Sum(), n) / n)) < 1e-12 && extension.LengthHistogram!.AsSpan().SequenceEqual(histogram);
            }, iter: 300, threads: 1);
        Assert.Equal(300, cases);
    }
}
