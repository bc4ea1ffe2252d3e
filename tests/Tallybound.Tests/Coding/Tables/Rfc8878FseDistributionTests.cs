using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes.Tans;
using Tallybound.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Tables;

public sealed class Rfc8878FseDistributionTests
{
    [Fact]
    public void A_distribution_reads_back_and_is_priced_as_written()
    {
        int fitted = 0;
        Gen.Select(CodeLengths.Counts, Gen.Int[5, 16]).Sample((counts, log) =>
        {
            int[] frequencies = new int[counts.Length];
            if (!QuantizedFrequencies.TryFit(counts, log, frequencies)) return;
            RoundTrip(frequencies, log);
            Interlocked.Increment(ref fitted);
        });
        Assert.True(fitted >= 60, $"{fitted} are too few.");
    }

    /// <summary>RFC 8878 §3.1.1.3.2.2: the predefined distributions, which have chances below 1.</summary>
    [Fact]
    public void The_predefined_distributions_read_back()
    {
        RoundTrip([4, 3, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 2, 1, 1, 1, 2, 2, 2, 2, 2, 2, 2, 2, 2, 3, 2, 1, 1, 1, 1, 1, -1, -1, -1, -1], 6);
        RoundTrip([1, 4, 3, .. Enumerable.Repeat(2, 6), .. Enumerable.Repeat(1, 37), .. Enumerable.Repeat(-1, 7)], 6);
        RoundTrip([.. Enumerable.Repeat(1, 6), 2, 2, 2, .. Enumerable.Repeat(1, 15), .. Enumerable.Repeat(-1, 5)], 5);
    }

    /// <summary>RFC 8878 §4.1.1: with 156 of 256 points left, the values 0 to 97 take 7 bits and those from 98 take 8.</summary>
    [Fact]
    public void Low_values_take_one_bit_less_as_in_the_standard()
    {
        System.Text.Json.JsonElement vector = TableVectors.Of("fse-value-range");
        int[] input = vector.Integers("input"), expected = vector.Integers("expected");
        for (int i = 0; i < expected.Length; i++)
        {
            // The first word is the log, the second the frequency that leaves 156 points.
            int frequency = input[i + 1] - 1;
            var sink = new SeenWords();
            Rfc8878FseDistribution.Encode([256 - input[0], frequency, input[0] - frequency], 8, ref sink);
            Assert.Equal(expected[i], sink.Widths[2]);
        }
        Assert.Equal(2, expected.Length);
    }

    /// <summary>By hand: 4 bits of log, then 33 of 0…33, which has 6 bits: 10 bits, 2 bytes.</summary>
    [Fact]
    public void One_symbol_alone_takes_two_bytes() => Assert.Equal(16, Rfc8878FseDistribution.Bits([32], 5));

    [Fact]
    public void What_does_not_add_up_is_refused()
    {
        Assert.Throws<ArgumentException>(() => Rfc8878FseDistribution.Bits([31], 5));
        Assert.Throws<ArgumentOutOfRangeException>(() => Rfc8878FseDistribution.Bits([16], 4));
        Assert.Throws<InvalidDataException>(() =>
        {
            var reader = new LowBitReader([0x10, 0xFC]);
            Rfc8878FseDistribution.Decode(ref reader, new int[3]);
        });
    }

    private static void RoundTrip(int[] frequencies, int log)
    {
        var writer = new LowBitWriter();
        Rfc8878FseDistribution.Encode(frequencies, log, ref writer);
        var reader = new LowBitReader(writer.ToArray());
        int[] read = new int[frequencies.Length];
        Assert.Equal(log, Rfc8878FseDistribution.Decode(ref reader, read));
        Assert.Equal(frequencies, read);
        Assert.Equal(writer.Bits, reader.Position);
        Assert.Equal(writer.Bits, Rfc8878FseDistribution.Bits(frequencies, log));
    }

    /// <summary>Remembers how wide each word was.</summary>
    private sealed class SeenWords : IBitSink
    {
        public List<int> Widths { get; } = [];

        public long Bits => Widths.Sum();

        public void Write(ulong code, int bits) => Widths.Add(bits);
    }
}
