using System.Globalization;
using System.Numerics;
using System.Text.Json.Nodes;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Tests.Repository;
using Xunit;

namespace Tallybound.Tests.Coding.Codes;

/// <summary>Values of <c>tests/vectors/codes/codes.json</c>, each with its source and status there.</summary>
public sealed class PublishedCodeTests
{
    private static readonly Dictionary<string, JsonNode> Values = JsonNode.Parse(File.ReadAllText(Checkout.PathOf("tests", "vectors", "codes", "codes.json")))!
        .AsArray().ToDictionary(entry => (string)entry!["id"]!, entry => entry!, StringComparer.Ordinal);

    private static long[] Counts(string id) => [.. Values[id]["input"]!.AsArray().Select(count => (long)count!)];

    private static double Number(string id, int at = -1) => (double)(at < 0 ? Values[id]["expected"]! : Values[id]["expected"]![at]!);

    private static double Rate(long[] counts, int radix = 2)
    {
        var lengths = new byte[counts.Length];
        Huffman.Lengths(counts, lengths, radix);
        return (double)Huffman.PayloadDigits(counts, lengths) / counts.Sum();
    }

    [Fact]
    public void Every_value_names_its_source_and_status()
    {
        Assert.Equal(39, Values.Count);
        Assert.All(Values.Values, value => Assert.True(((string)value["source"]!).Length > 2 && value["status"]!.AsArray().Count > 0));
    }

    [Theory]
    [InlineData("huff52-t1", 2)]
    [InlineData("huff52-d4", 4)]
    [InlineData("ct-5.6.1", 2)]
    [InlineData("ct-5.6.2", 3)]
    [InlineData("ct-horse", 2)]
    [InlineData("shannon48-4", 2)]
    public void An_average_length_is_the_published_one(string id, int radix) => Assert.Equal(Number(id), Rate(Counts(id), radix), 1e-12);

    [Theory]
    [InlineData("mackay-eng")]
    [InlineData("sayood-3.2.1")]
    [InlineData("sayood-ext")]
    public void Entropy_and_average_length_are_the_published_ones(string id)
    {
        Assert.Equal(Number(id, 0), Entropy.BitsPerSymbol(Counts(id)), 1e-9);
        Assert.Equal(Number(id, 1), Rate(Counts(id)), 1e-9);
    }

    [Fact]
    public void Gallagers_constant_is_the_published_one() => Assert.Equal(Number("gallager-sigma"), RedundancyBound.Sigma, 1e-12);

    [Theory]
    [InlineData("pm-fib6-L3", 3)]
    [InlineData("pm-fib6-L4", 4)]
    [InlineData("pm-fib8-L4", 4)]
    [InlineData("pm-fib8-L5", 5)]
    [InlineData("pm-fib12-L7", 7)]
    public void A_limited_code_costs_what_is_published(string id, int limit)
    {
        long[] counts = Counts(id);
        var lengths = new byte[counts.Length];
        Assert.True(LengthLimited.TryLengths(counts, limit, lengths));
        Assert.Equal((long)Number(id), Huffman.PayloadDigits(counts, lengths));
    }

    [Fact]
    public void The_example_of_rfc_1951_gets_its_words()
    {
        var code = new CanonicalCode([.. Counts("rfc1951-322").Select(length => (byte)length)]);
        string[] words = [.. Enumerable.Range(0, 8).Select(symbol => Convert.ToString((long)code.Word(symbol), 2).PadLeft(code.Length(symbol), '0'))];
        Assert.Equal(Values["rfc1951-322"]["expected"]!.AsArray().Select(word => (string)word!), words);
    }

    [Fact]
    public void The_lengths_of_hpack_give_the_words_of_hpack()
    {
        JsonNode hpack = Values["hpack"];
        byte[] lengths = [.. hpack["input"]!["lengths"]!.AsArray().Select(length => (byte)(int)length!)];
        var code = new CanonicalCode(lengths);
        Assert.Equal(257, lengths.Length);
        Assert.Equal((int)hpack["expected"]!["sum"]!, lengths.Sum(length => length));
        Assert.Equal((string)hpack["expected"]!["kraft"]!, KraftSum.Of(lengths, 2));
        foreach ((string length, JsonNode? count) in hpack["expected"]!["hist"]!.AsObject())
            Assert.Equal((int)count!, lengths.Count(each => each == int.Parse(length)));
        for (int symbol = 0; symbol < 257; symbol++)
            Assert.Equal(Convert.ToUInt64((string)hpack["input"]!["words"]![symbol]!, 16), code.Word(symbol));
        foreach (string id in Values.Keys.Where(id => id.StartsWith("hpack-", StringComparison.Ordinal)))
        {
            var writer = new BitWriter();
            code.Encode([.. ((string)Values[id]["input"]!).Select(letter => (int)letter)], ref writer);
            Assert.Equal((long)Number(id, 0), writer.Bits);
            while (writer.Bits % 8 != 0) writer.Write(1, 1);
            Assert.Equal((string)Values[id]["expected"]![1]!, Convert.ToHexStringLower(writer.ToArray()));
        }
    }

    [Fact]
    public void The_tables_of_jpeg_keep_a_word_back()
    {
        JsonNode t81 = Values["t81-kraft"];
        string[] sums = [.. t81["input"]!.AsObject().Select(table => KraftSum.Of([.. table.Value!.AsArray().SelectMany((count, at) => Enumerable.Repeat((byte)(at + 1), (int)count!))], 2))];
        Assert.Equal(t81["expected"]!.AsArray().Select(sum => (string)sum!), sums);
    }

    [Fact]
    public void The_tables_of_fax_leave_room_for_the_end_of_line()
    {
        JsonNode t4 = Values["t4-kraft"];
        byte[] Of(params string[] tables) => [.. tables.SelectMany(table => t4["input"]![table]!.AsArray()).Select(length => (byte)(int)length!)];
        string[] expected = [.. t4["expected"]!.AsArray().Select(sum => (string)sum!)];
        Assert.Equal(128 + 54 + 13, Of("terminating-white", "terminating-black", "make-up-white", "make-up-black", "extended").Length);
        Assert.Equal(expected[0], KraftSum.Of(Of("terminating-white"), 2));
        Assert.Equal(expected[1], KraftSum.Of(Of("terminating-black"), 2));
        foreach (string colour in new[] { "white", "black" })
        {
            Assert.Equal(expected[2], KraftSum.Of(Of("terminating-" + colour, "make-up-" + colour), 2));
            Assert.Equal(expected[3], KraftSum.Of(Of("terminating-" + colour, "make-up-" + colour, "extended"), 2));
        }
    }

    [Fact]
    public void Powers_of_three_reach_the_entropy_in_radix_3_at_the_published_rates()
    {
        long[] counts = [9, 3, 3, 3, 3, 1, 1, 1, 1, 1, 1];
        string[] rates = [.. Values["pow3"]["expected"]!.AsArray().Select(rate => (string)rate!)];
        Assert.Equal(["17/9", "binary 82/27"], rates);
        var lengths = new byte[counts.Length];
        Huffman.Lengths(counts, lengths, 3);
        Assert.Equal(17 * 3, Huffman.PayloadDigits(counts, lengths));
        Huffman.Lengths(counts, lengths);
        Assert.Equal(82, Huffman.PayloadDigits(counts, lengths));
        Assert.Equal(17.0 / 9, Entropy.BitsPerSymbol(counts) / Math.Log2(3), 1e-12);
    }

    /// <summary>A coin of one in ten: blocks of each length counted in proportion, so that expected and counted bits are one.</summary>
    [Theory]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(3)]
    [InlineData(4)]
    [InlineData(5)]
    [InlineData(6)]
    public void Blocks_of_a_coin_of_one_in_ten_cost_the_published_bits_a_block(int blockLength)
    {
        string[] fraction = ((string)Values[$"block-b10-n{blockLength}"]["expected"]!).Split('/');
        double bitsPerBlock = double.Parse(fraction[0], CultureInfo.InvariantCulture) / (fraction.Length > 1 ? double.Parse(fraction[1], CultureInfo.InvariantCulture) : 1);
        long[] blocks = [.. Enumerable.Range(0, 1 << blockLength).Select(block => (long)Math.Pow(9, blockLength - BitOperations.PopCount((uint)block)))];
        long payload = BlockHuffman.PayloadBits(blocks, new long[256]);
        Assert.Equal(bitsPerBlock, payload / Math.Pow(10, blockLength), 1e-12);
        Assert.Equal(bitsPerBlock, HuffmanExtension.Of([9, 1], blockLength).ExpectedBitsPerSymbol * blockLength, 1e-12);
    }

    [Fact]
    public void Integer_codes_have_the_published_lengths()
    {
        Lengths("elias-gamma", n => EliasGamma.Length(n + 1));
        Lengths("elias-delta", n => EliasDelta.Length(n + 1));
        Lengths("elias-omega", n => EliasOmega.Length(n + 1));
        Lengths("golomb-m5", n => GolombCode.Length(n, 5));
        Lengths("ue", n => ExpGolombCode.Length(n, 0));
        Assert.Equal((long)Number("golomb-42-10"), GolombCode.Length(42, 10));

        static void Lengths(string id, Func<long, long> length) =>
            Assert.Equal(Values[id]["expected"]!.AsArray().Select(bits => (long)bits!), Enumerable.Range(0, Values[id]["expected"]!.AsArray().Count).Select(n => length(n)));
    }

    [Fact]
    public void The_golomb_rule_gives_the_published_parameters()
    {
        double[] thetas = [.. Values["golomb-rule"]["input"]!.AsArray().Select(theta => ((string)theta!).Split('/')).Select(parts => double.Parse(parts[0]) / double.Parse(parts[1]))];
        Assert.Equal(Values["golomb-rule"]["expected"]!.AsArray().Select(m => (long)m!), thetas.Select(GolombCode.ParameterFor));
    }

    [Fact]
    public void Abracadabra_costs_what_is_published()
    {
        var counts = new long[256];
        foreach (byte letter in "abracadabra"u8) counts[letter]++;
        Assert.Equal(Number("abra", 0), Entropy.BitsPerSymbol(counts), 1e-12);
        Assert.Equal(Number("abra", 1) / 11, Rate(counts), 1e-12);
    }
}
