using CsCheck;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;
using Xunit;

namespace Tallybound.Tests.Coding.Tables;

public sealed class FramingTests
{
    [Fact]
    public void Table_payload_and_framing_are_whole_bytes() =>
        Gen.Select(Gen.Long[0, 1L << 40], Gen.Long[0, 1L << 20], Gen.Long[0, 1L << 50]).Sample((symbols, table, payload) =>
        {
            long framing = Framing.Bits(symbols, table, payload);
            long least = 2 + EliasDelta.Length(symbols + 1);
            return (framing + table + payload) % 8 == 0 && framing >= least && framing < least + 8;
        });

    [Fact]
    public void Framing_is_priced_as_it_is_written() =>
        Gen.Select(Gen.Int[0, 3], Gen.Long[0, long.MaxValue - 1], Gen.Int[0, 40]).Sample((kind, symbols, payload) =>
        {
            var writer = new BitWriter();
            Framing.Encode((BlockKind)kind, symbols, ref writer);
            writer.Write(0, payload);
            Framing.Pad(ref writer);
            var reader = new BitReader(writer.ToArray());
            return Framing.Decode(ref reader) == ((BlockKind)kind, symbols) && writer.Bits == Framing.Bits(symbols, 0, payload) + payload;
        });

    /// <summary>The words of Elias 1975, table: 1 → 1, 2 → 0100, 3 → 0101, 4 → 01100, 8 → 00100000, 16 → 001010000; from memory.</summary>
    [Theory]
    [InlineData(1, "1")]
    [InlineData(2, "0100")]
    [InlineData(3, "0101")]
    [InlineData(4, "01100")]
    [InlineData(8, "00100000")]
    [InlineData(16, "001010000")]
    public void Delta_words_are_those_of_the_paper(long value, string word)
    {
        var writer = new BitWriter();
        EliasDelta.Encode(value, ref writer);
        var reader = new BitReader(writer.ToArray());
        Assert.Equal(word.Length, writer.Bits);
        Assert.Equal(Convert.ToUInt64(word, 2), reader.Read(word.Length));
        Assert.Equal(word.Length, EliasDelta.Length(value));
    }

    [Fact]
    public void An_empty_block_of_nothing_is_one_byte() => Assert.Equal(8, Framing.Bits(0, 0, 0));
}
