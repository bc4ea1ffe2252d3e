using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class CorpusRuleTests
{
    private static CorpusProfile Coded(long coded, long best) => Made.Corpus(3, 100_000, best) with { Verdict = new Verdict("tans", 100_000, coded, "One sentence.") };

    [Fact]
    public void A_code_for_each_source_that_saves_1_percent_is_worth_a_word()
    {
        Finding finding = new CodePerSource().Judge(Coded(60_000, 57_000))!;
        Assert.Equal(3000, finding.BytesAtStake);
        Assert.Equal(3, finding.Sources);
        Assert.Equal("tANS, for all sources", finding.Against);
        Assert.Contains("is 55.7 KiB, tables and framing included, instead of 58.6 KiB with tANS", finding.Claim, StringComparison.Ordinal);
        Assert.Null(new CodePerSource().Judge(Coded(60_000, 59_500)));
        Assert.Null(new CodePerSource().Judge(Coded(60_000, 59_500) with { Verdict = null }));
    }

    [Fact]
    public void Copies_are_counted_beside_the_one_that_stays()
    {
        Finding finding = new Duplicates().Judge(Made.Corpus(9) with { Bytes = 100_000, Duplicates = [new DuplicateSet("00", 5000, 3, ["a", "b"]), new DuplicateSet("01", 700, 2, ["c"])] })!;
        Assert.Equal(10_700, finding.BytesAtStake);
        Assert.Equal(5, finding.Sources);
        Assert.StartsWith("3 sources repeat the bytes of another", finding.Claim, StringComparison.Ordinal);
        Assert.DoesNotContain("at least", finding.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void A_list_of_copies_that_is_cut_short_says_at_least()
    {
        DuplicateSet[] sets = [.. Enumerable.Range(0, 100).Select(i => new DuplicateSet($"{i}", 500, 2, ["a"]))];
        Assert.Contains("at least 48.8 KiB are copies", new Duplicates().Judge(Made.Corpus(300) with { Bytes = 100_000, Duplicates = sets })!.Claim, StringComparison.Ordinal);
    }

    [Fact]
    public void No_copies_or_too_few_say_nothing()
    {
        Assert.Null(new Duplicates().Judge(Made.Corpus(3)));
        Assert.Null(new Duplicates().Judge(Made.Corpus(3) with { Bytes = 1_000_000, Duplicates = [new DuplicateSet("00", 4000, 2, ["a"])] }));
    }
}
