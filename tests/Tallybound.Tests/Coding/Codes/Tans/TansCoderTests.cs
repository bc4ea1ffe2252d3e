using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes.Tans;
using Xunit;

namespace Tallybound.Tests.Coding.Codes.Tans;

public sealed class TansCoderTests
{
    [Fact]
    public void Symbols_come_back_and_bits_counted_are_bits_written() =>
        Gen.Select(Gen.Int[0, 19].Array[1, 400], Gen.Int[5, 14]).Sample((symbols, log) =>
        {
            long[] counts = new long[20];
            foreach (int symbol in symbols) counts[symbol]++;
            int[] frequencies = new int[20];
            Assert.True(QuantizedFrequencies.TryFit(counts, log, frequencies));
            var table = new TansTable(frequencies, log);
            var writer = new BitWriter();
            var counter = default(BitCounter);
            TansCoder.Encode(symbols, table, ref writer);
            TansCoder.Encode(symbols, table, ref counter);
            var reader = new BitReader(writer.ToArray());
            int[] read = new int[symbols.Length];
            TansCoder.Decode(ref reader, table, read);
            return read.SequenceEqual(symbols) && counter.Bits == writer.Bits && reader.Position == writer.Bits;
        });

    [Fact]
    public void A_symbol_without_a_cell_and_a_table_that_does_not_add_up_are_refused()
    {
        Assert.Throws<ArgumentException>(() => new TansTable([31], 5));
        var table = new TansTable([32, 0], 5);
        Assert.Throws<ArgumentException>(() => table.Step(0, 1));
    }

    [Fact]
    public void Damage_is_refused() => Assert.Throws<InvalidDataException>(() =>
    {
        var reader = new BitReader([0xFF, 0xFF]);
        TansCoder.Decode(ref reader, new TansTable([16, 16], 5), new int[3]);
    });
}
