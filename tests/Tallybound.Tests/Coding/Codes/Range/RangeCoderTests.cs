using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes.Range;
using Tallybound.Coding.Codes.Tans;
using Xunit;

namespace Tallybound.Tests.Coding.Codes.Range;

public sealed class RangeCoderTests
{
    [Fact]
    public void Symbols_come_back_and_written_bits_follow_the_price() =>
        Gen.Select(Gen.Int[0, 60].SelectMany(most => Gen.Int[0, most].Array[1, 2000]), Gen.Int[12, 16]).Sample((symbols, frequencyBits) =>
        {
            long[] counts = new long[61];
            foreach (int symbol in symbols) counts[symbol]++;
            int[] frequencies = new int[61];
            Assert.True(QuantizedFrequencies.TryFit(counts, frequencyBits, frequencies));
            var coder = new RangeCoder(frequencies, frequencyBits);
            var writer = new BitWriter();
            coder.Encode(symbols, ref writer);
            int[] read = new int[symbols.Length];
            coder.Decode(writer.ToArray(), read);
            Assert.Equal(symbols, read);
            Assert.True(RangePrice.TryPrice(counts, frequencyBits, out long priced));
            // A step keeps at least 1 − 2^(R − 30) of its interval; the flush names it within two bits.
            double loss = symbols.Length * Math.ScaleB(1.45, frequencyBits - 30);
            Assert.InRange(writer.Bits, priced - 2, priced + 2 + loss);
        });

    /// <summary>Many owed bits: symbols that keep the interval around the middle.</summary>
    [Fact]
    public void A_long_stay_around_the_middle_is_paid_when_it_ends()
    {
        var coder = new RangeCoder([2047, 2, 2047], 12);
        int[] symbols = [.. Enumerable.Repeat(1, 500), 0, .. Enumerable.Repeat(1, 500)];
        var writer = new BitWriter();
        coder.Encode(symbols, ref writer);
        int[] read = new int[symbols.Length];
        coder.Decode(writer.ToArray(), read);
        Assert.Equal(symbols, read);
    }

    /// <summary>By hand: 4,096 symbols at 1 bit, and the flush.</summary>
    [Fact]
    public void Equal_halves_cost_one_bit_each()
    {
        Assert.True(RangePrice.TryPrice([2048, 0, 2048], 12, out long bits));
        Assert.Equal(4096 + 2, bits);
        Assert.True(RangePrice.TryPrice([0, 99], 12, out bits));
        Assert.Equal(2, bits);
        Assert.False(RangePrice.TryPrice([0, 0], 12, out _));
        Assert.False(RangePrice.TryPrice([.. Enumerable.Repeat(1L, 4097)], 12, out _));
    }

    /// <summary>By hand: 2^16 symbols have 17 bits, two less is 15.</summary>
    [Fact]
    public void Frequencies_get_finer_with_the_source()
    {
        Assert.Equal(12, RangeFrequencyBits.For(1, 1));
        Assert.Equal(15, RangeFrequencyBits.For(65_536, 256));
        Assert.Equal(16, RangeFrequencyBits.For(1L << 40, 256));
        Assert.Equal(14, RangeFrequencyBits.For(9_000, 8_000));
        Assert.Equal(16, RangeFrequencyBits.For(70_000, 65_536));
    }

    [Fact]
    public void What_does_not_add_up_is_refused()
    {
        Assert.Throws<ArgumentException>(() => new RangeCoder([4095], 12));
        Assert.Throws<ArgumentOutOfRangeException>(() => new RangeCoder([2048], 11));
        Assert.Throws<ArgumentException>(() =>
        {
            var counter = default(BitCounter);
            new RangeCoder([4096, 0], 12).Encode([1], ref counter);
        });
    }
}
