using System.Numerics;
using CsCheck;
using Tallybound.Coding.Bits;
using Xunit;

namespace Tallybound.Tests.Coding.Bits;

public sealed class BitOrderTests
{
    private static readonly Gen<(ulong Word, int Bits)[]> Words =
        Gen.Select(Gen.ULong, Gen.Int[0, 64]).Select((word, bits) => (bits == 64 ? word : word & ((1UL << bits) - 1), bits)).Array[0, 60];

    [Fact]
    public void Words_read_back_in_either_order_and_are_counted_alike()
    {
        int cases = 0;
        Words.Sample(
            words =>
            {
                cases++;
                var counter = default(BitCounter);
                var high = new BitWriter();
                var low = new LowBitWriter();
                foreach ((ulong word, int bits) in words)
                {
                    counter.Write(word, bits);
                    high.Write(word, bits);
                    low.Write(word, bits);
                }
                byte[] highBytes = high.ToArray(), lowBytes = low.ToArray();
                var highReader = new BitReader(highBytes);
                var lowReader = new LowBitReader(lowBytes);
                foreach ((ulong word, int bits) in words)
                    if (highReader.Read(bits) != word || lowReader.Read(bits) != word) return false;
                long total = words.Sum(word => (long)word.Bits);
                return counter.Bits == total && high.Bits == total && low.Bits == total && highReader.Position == total && lowReader.Position == total
                    && highBytes.Length == (total + 7) / 8 && lowBytes.Length == (total + 7) / 8;
            }, iter: 1000, threads: 1);
        Assert.Equal(1000, cases);
    }

    /// <summary>The whole stream as one number: the first bit most significant, or least.</summary>
    [Fact]
    public void Bytes_hold_the_bits_in_the_order_that_is_named()
    {
        int cases = 0;
        Words.Sample(
            words =>
            {
                cases++;
                var high = new BitWriter();
                var low = new LowBitWriter();
                BigInteger asHigh = 0, asLow = 0;
                int at = 0;
                foreach ((ulong word, int bits) in words)
                {
                    high.Write(word, bits);
                    low.Write(word, bits);
                    asHigh = (asHigh << bits) | word;
                    asLow |= (BigInteger)word << at;
                    at += bits;
                }
                asHigh <<= (8 - (at % 8)) % 8;
                return new BigInteger(high.ToArray(), isUnsigned: true, isBigEndian: true) == asHigh && new BigInteger(low.ToArray(), isUnsigned: true) == asLow;
            }, iter: 500, threads: 1);
        Assert.Equal(500, cases);
    }

    /// <summary>RFC 1951 §3.1.1: elements are packed from the least significant bit; by hand, 3 bits 101 and 5 bits 00011.</summary>
    [Fact]
    public void A_byte_made_by_hand_is_the_same()
    {
        var high = new BitWriter();
        var low = new LowBitWriter();
        high.Write(0b101, 3);
        high.Write(0b00011, 5);
        low.Write(0b101, 3);
        low.Write(0b00011, 5);
        Assert.Equal([0b10100011], high.ToArray());
        Assert.Equal([0b00011101], low.ToArray());
    }

    [Fact]
    public void Reading_past_the_end_is_refused_and_moves_nothing()
    {
        int refused = 0;
        for (int length = 0; length < 4; length++)
        {
            for (int first = 0; first <= length * 8; first++)
            {
                var high = new BitReader(new byte[length]);
                var low = new LowBitReader(new byte[length]);
                high.Read(first);
                low.Read(first);
                int beyond = (length * 8) - first + 1;
                try
                {
                    high.Read(beyond);
                    Assert.Fail("Bits that are not there were read.");
                }
                catch (InvalidDataException)
                {
                    refused++;
                }
                try
                {
                    low.Read(beyond);
                    Assert.Fail("Bits that are not there were read.");
                }
                catch (InvalidDataException)
                {
                    refused++;
                }
                Assert.Equal(first, high.Position);
                Assert.Equal(first, low.Position);
            }
        }
        Assert.Equal(2 * (1 + 9 + 17 + 25), refused);
    }
}
