using CsCheck;
using Tallybound.Tallies;
using Xunit;

namespace Tallybound.Tests.Tallies;

public sealed class SampledContextTallyTests
{
    private sealed class Rows : IContextVisitor
    {
        public List<string> Seen { get; } = [];

        public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1) =>
            Seen.Add($"{context}: {string.Join(',', symbols.ToArray())} {string.Join(',', fold0.ToArray())} {string.Join(',', fold1.ToArray())}");
    }

    private static string Text(SampledContextTally tally)
    {
        var rows = new Rows();
        tally.VisitContexts(rows);
        return $"{tally.Threshold} {tally.Predicted}\n{string.Join('\n', rows.Seen)}";
    }

    [Fact]
    public void Neither_cuts_nor_order_of_merging_change_the_sample()
    {
        int cases = 0;
        Gen.Select(Gen.Byte[0, 5].Array[4096, 13000], Gen.Int[1, 2]).Sample(
            (bytes, piece) =>
            {
                cases++;
                int cut = Math.Min(piece * 4096, bytes.Length / 4096 * 4096);
                var whole = new SampledContextTally(3, 40);
                whole.Begin(0, []);
                whole.Append(bytes);
                SampledContextTally one = new(3, 40), two = new(3, 40), other = new(3, 40);
                one.Begin(0, []);
                one.Append(bytes.AsSpan(0, cut));
                two.Begin(cut, bytes.AsSpan(cut - 3, 3));
                two.Append(bytes.AsSpan(cut));
                other.Merge(two);
                other.Merge(one);
                one.Merge(two);
                using var stream = new MemoryStream();
                one.WriteTo(stream);
                stream.Position = 0;
                string expected = Text(whole);
                return whole.ContextsKept <= 40 && Text(one) == expected && Text(other) == expected && Text(SampledContextTally.ReadFrom(stream)) == expected;
            }, iter: 60, threads: 1);
        Assert.Equal(60, cases);
    }

    [Fact]
    public void With_room_for_all_contexts_every_count_is_exact()
    {
        byte[] bytes = "door open door shut door open"u8.ToArray();
        var tally = new SampledContextTally(3, 1000);
        tally.Begin(0, []);
        tally.Append(bytes);
        TallyContent plain = TallyContent.Counted(bytes, 8, 3, 1);
        var rows = new Rows();
        tally.VisitContexts(rows);
        Assert.Equal(ulong.MaxValue, tally.Threshold);
        Assert.Equal(plain.Contexts.Keys.Where(key => key.Order == 3).Select(key => key.Context).Distinct().Count(), rows.Seen.Count);
        Assert.Equal(bytes.Length - 3, tally.Predicted);
    }
}
