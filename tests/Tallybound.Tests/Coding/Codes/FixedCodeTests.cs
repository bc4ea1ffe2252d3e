using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Tests.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

public sealed class FixedCodeTests
{
    [Fact]
    public void The_map_reads_back_and_costs_a_bit_a_symbol() =>
        CodeLengths.Counts.Sample(counts =>
        {
            var writer = new BitWriter();
            FixedCode.EncodeTable(counts, ref writer);
            var reader = new BitReader(writer.ToArray());
            int[] inUse = FixedCode.DecodeTable(ref reader, counts.Length);
            long width = (long)Math.Ceiling(Math.Log2(inUse.Length));
            return writer.Bits == FixedCode.TableBits(counts.Length)
                && inUse.SequenceEqual(Enumerable.Range(0, counts.Length).Where(symbol => counts[symbol] > 0))
                && FixedCode.PayloadBits(counts) == counts.Sum() * width;
        });

    [Fact]
    public void One_symbol_and_none_need_no_bits()
    {
        Assert.Equal(0, FixedCode.PayloadBits([0, 9]));
        Assert.Equal(0, FixedCode.PayloadBits([]));
        Assert.Equal(1, FixedCode.Width(2));
        Assert.Equal(8, FixedCode.Width(256));
        Assert.Equal(9, FixedCode.Width(257));
    }
}
