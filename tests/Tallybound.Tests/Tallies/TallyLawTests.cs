using CsCheck;
using Tallybound.Tallies;
using Tallybound.Tallies.Files;
using Xunit;

namespace Tallybound.Tests.Tallies;

/// <summary>The laws that every tally keeps, each view by each way of counting it.</summary>
public sealed class TallyLawTests
{
    private const int Cases = 40;

    /// <summary>Sources with runs, few and many values, long enough to cross folds (4 KiB) and segments.</summary>
    private static readonly Gen<byte[]> Source = Gen.OneOf(
        Gen.Byte.Array[0, 40],
        Gen.Byte[0, 3].Array[0, 700],
        Gen.Select(Gen.Byte.Array[0, 9000], Gen.Int[0, 8000], Gen.Int[0, 3000], Gen.Byte).Select((bytes, at, length, value) =>
        {
            for (int i = at; i < Math.Min(bytes.Length, at + length); i++) bytes[i] = value;
            return bytes;
        }));

    public static TheoryData<string, int, int, bool> Tallies() => new()
    {
        { "bytes", 2, 3, true }, { "bytes", 2, 3, false }, { "bytes", 1, 2, true }, { "bytes", 1, 2, false }, { "bytes", 0, 1, true }, { "bytes", 0, 1, false }, { "bytes", 0, 3, true },
        { "nibbles", 2, 3, true }, { "nibbles", 4, 5, true }, { "bits", 5, 8, true }, { "bits", 2, 3, true }, { "words-le", 2, 3, true }, { "words-be", 2, 3, true },
    };

    private static ISymbolTally Make(string view, int order, int block, bool large) => TallyChoice.Create(view, order, block, large ? null : 1000);

    private static ISymbolTally ReadBack(ISymbolTally tally, Stream stream) => tally switch
    {
        ByteTally => ByteTally.ReadFrom(stream),
        SparseByteTally => SparseByteTally.ReadFrom(stream),
        SmallAlphabetTally => SmallAlphabetTally.ReadFrom(stream),
        _ => WordTally.ReadFrom(stream),
    };

    private static TallyContent Plain(string view, byte[] bytes, ISymbolTally tally) => TallyContent.Counted(
        bytes, view switch { "bytes" => 8, "nibbles" => 4, "bits" => 1, _ => 16 }, tally.HighestOrder, tally.LongestBlock, view != "words-le");

    [Theory]
    [MemberData(nameof(Tallies))]
    public void Counting_in_any_cuts_gives_what_counting_symbol_by_symbol_gives(string view, int order, int block, bool large)
    {
        int cases = 0;
        ISymbolTally tally = Make(view, order, block, large);
        Gen.Select(Source, Gen.Int[1, 5000].Array[1, 6]).Sample(
            (bytes, steps) =>
            {
                cases++;
                tally.Clear();
                tally.Begin(0, []);
                for (int at = 0, step = 0; at < bytes.Length; step++)
                {
                    int length = Math.Min(steps[step % steps.Length], bytes.Length - at);
                    tally.Append(bytes.AsSpan(at, length));
                    at += length;
                }
                return TallyContent.Of(tally).Same(Plain(view, bytes, tally));
            }, iter: Cases, threads: 1);
        Assert.Equal(Cases, cases);
        (tally as IDisposable)?.Dispose();
    }

    [Theory]
    [MemberData(nameof(Tallies))]
    public void Merging_pieces_in_any_order_gives_the_tally_of_the_whole(string view, int order, int block, bool large)
    {
        int cases = 0;
        ISymbolTally one = Make(view, order, block, large), two = Make(view, order, block, large);
        Gen.Select(Source, Gen.Int[0, 3], Gen.Bool).Sample(
            (bytes, cutAt, swap) =>
            {
                cases++;
                int cut = Math.Min(cutAt * 4096, bytes.Length / 4096 * 4096);
                one.Clear();
                two.Clear();
                one.Begin(0, []);
                one.Append(bytes.AsSpan(0, cut));
                two.Begin(cut, bytes.AsSpan(Math.Max(0, cut - 16), Math.Min(16, cut)));
                two.Append(bytes.AsSpan(cut));
                (ISymbolTally to, ISymbolTally from) = swap ? (two, one) : (one, two);
                to.Merge(from);
                return TallyContent.Of(to).Same(Plain(view, bytes, to)) && to.LeftOverBytes == (view.StartsWith("words", StringComparison.Ordinal) ? bytes.Length % 2 : 0);
            }, iter: Cases, threads: 1);
        Assert.Equal(Cases, cases);
        (one as IDisposable)?.Dispose();
        (two as IDisposable)?.Dispose();
    }

    [Theory]
    [MemberData(nameof(Tallies))]
    public void What_is_written_reads_back_as_the_same_tally(string view, int order, int block, bool large)
    {
        int cases = 0;
        ISymbolTally tally = Make(view, order, block, large);
        Source.Sample(
            bytes =>
            {
                cases++;
                tally.Clear();
                tally.Begin(0, []);
                tally.Append(bytes);
                using var stream = new MemoryStream();
                tally.WriteTo(stream);
                stream.Position = 0;
                ISymbolTally back = ReadBack(tally, stream);
                bool same = TallyContent.Of(back).Same(TallyContent.Of(tally)) && back.LeftOverBytes == tally.LeftOverBytes;
                (back as IDisposable)?.Dispose();
                return same;
            }, iter: 10, threads: 1);
        Assert.Equal(10, cases);
        (tally as IDisposable)?.Dispose();
    }

    [Theory]
    [InlineData("bytes", false)]
    [InlineData("nibbles", true)]
    [InlineData("words-be", true)]
    public void Damage_anywhere_is_refused(string view, bool large)
    {
        ISymbolTally tally = Make(view, 1, 2, large);
        tally.Begin(0, []);
        tally.Append("reefer 7 door open"u8);
        using var stream = new MemoryStream();
        tally.WriteTo(stream);
        byte[] whole = stream.ToArray();
        int refused = 0;
        for (int at = 0; at < whole.Length; at++)
        {
            byte[] damaged = [.. whole];
            damaged[at] ^= 0x15;
            Assert.ThrowsAny<InvalidDataException>(() => ReadBack(tally, new MemoryStream(damaged)));
            Assert.ThrowsAny<InvalidDataException>(() => ReadBack(tally, new MemoryStream(whole[..at])));
            refused++;
        }
        Assert.Equal(whole.Length, refused);
    }

    [Fact]
    public void Counters_that_grow_large_move_to_the_carry_and_change_nothing()
    {
        using var plain = new ByteTally();
        using var carried = new ByteTally(2, 3, spillAfter: 500);
        var random = new Random(3);
        var bytes = new byte[20_000];
        for (int i = 0; i < bytes.Length; i++) bytes[i] = (byte)random.Next(i % 4000 < 2000 ? 4 : 256);
        foreach (ByteTally tally in (ByteTally[])[plain, carried])
        {
            tally.Begin(0, []);
            tally.Append(bytes);
        }
        Assert.True(TallyContent.Of(carried).Same(TallyContent.Of(plain)));
        using var twice = new ByteTally(2, 3, spillAfter: 500);
        twice.Merge(carried);
        twice.Merge(carried);
        plain.Merge(plain);
        Assert.True(TallyContent.Of(twice).Same(TallyContent.Of(plain)));
    }

    [Theory]
    [InlineData(2_000_000_000L, 3)]
    [InlineData(2_147_483_647L, 9)]
    [InlineData(5_000_000_000L, 4)]
    public void Merging_tallies_of_billions_loses_no_count(long count, int tallies)
    {
        // 2,000,000,000 and 2^31 - 1 stay in the 32-bit counters when they are read; 5,000,000,000 stands in the carry from the start.
        using ByteTally sum = OfOneTriple(count);
        for (int i = 1; i < tallies; i++)
        {
            using ByteTally next = OfOneTriple(count);
            sum.Merge(next);
        }
        sum.Begin(0, []);
        sum.Append("\u0000\u0000\u0000\u0000"u8);
        var content = TallyContent.Of(sum);
        Assert.Equal((tallies * count) + 2, content.Contexts[(2, 0, 0)].Fold0);
        Assert.Equal((tallies * count) + 3, content.Contexts[(1, 0, 0)].Fold0);
        Assert.Equal((tallies * count) + 1, content.Blocks[(3, 0)]);
    }

    /// <summary>A tally that holds the triple 0, 0, 0 in fold 0 at a multiple of 3 and nothing else, as if it were read from a checkpoint.</summary>
    private static ByteTally OfOneTriple(long count)
    {
        using var stream = new MemoryStream();
        using (var writer = new TallyWriter(stream, TallyKind.Bytes))
        {
            writer.Write(2);
            writer.Write(3);
            writer.Write(count);
            for (int symbol = 0; symbol < 256; symbol++) writer.Write(0);
            writer.WriteSparse(_ => { });
            writer.WriteSparse(_ => { });
            writer.WriteSparse(entry => entry(0, count));
            for (int table = 0; table < 3; table++) writer.WriteSparse(_ => { });
        }
        stream.Position = 0;
        return ByteTally.ReadFrom(stream);
    }

    [Fact]
    public void Tallies_of_different_kinds_do_not_merge()
    {
        Assert.Throws<ArgumentException>(() => new WordTally(true).Merge(new WordTally(false)));
        Assert.Throws<ArgumentException>(() => new SparseByteTally(2, 3).Merge(new SparseByteTally(1, 3)));
        Assert.Throws<ArgumentException>(() => new SmallAlphabetTally(4, 2, 3).Merge(new SmallAlphabetTally(1, 2, 3)));
    }
}
