using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Records;
using Xunit;

namespace Tallybound.Tests.Profiling.Findings;

public sealed class FindingLawTests
{
    /// <summary>A source made by chance, so that every rule fires in some.</summary>
    private static SourceProfile Drawn(Random random)
    {
        T Pick<T>(params T[] from) => from[random.Next(from.Length)];
        long Near(long bytes, double low, double high) => (long)(bytes * (low + ((high - low) * random.NextDouble())));
        long size = 1L << random.Next(10, 22), payload = Near(size, Pick(0.1, 0.5, 0.8, 1.0), 1.0), total = payload + 104;
        double entropy = 8.0 * payload / size;
        CodePrice[] codes =
        [
            Made.Code("fixed", Pick(size, payload, Near(size, 0.2, 1)), 32) with { LongestCode = random.Next(1, 9) },
            Made.Huffman(payload, 100, Pick<double?>(null, 0.3, 0.95), random.Next(2, 20)) with { RedundancyBitsPerSymbol = Pick(0.001, 0.05, 0.4) },
            Made.Limited(11, payload + Near(payload, 0, 0.01), 90, Pick(0, 8 * payload / 300)), Made.Limited(15, payload, 100, Pick(0, 40)),
            new CodePrice { Code = "huffman", Radix = 3, BlockLength = 1, PayloadDigits = Near(8 * payload, 0.6, 0.66), BoundClass = "memoryless", Exact = true },
            Made.Code("tans", Near(payload, 0.8, 1.05), 200), Made.Code("block-huffman", Near(payload, 0.8, 1.2), 900, blockLength: 2), Made.Code("context-huffman", Near(payload, 0.7, 1.2), 2000),
        ];
        int segments = random.Next(10, 30);
        ViewProfile view = Made.View(size, codes) with
        {
            Orders = [Made.Order(0, entropy, Pick(entropy + 0.01, 8.1), entropy + 0.01), Made.Order(1, entropy - 0.5, entropy + Pick(-1.0, 0.2), entropy + Pick(-0.8, 0.3))],
            TableBlocks = [Made.Point(4096, Near(size, 0.5, 1), Near(size, 0, 0.2), 100) with { Exact = Pick(true, false), TotalBitsInterval = Pick<long[]?>(null, new long[] { total * 7, total * 9 }) }, Made.Point(65_536, payload, Near(size, 0, 0.05), 20)],
            Segments = new SegmentSeries
            {
                SegmentBytes = 4096, OwnTableBits = [.. Enumerable.Repeat(1000L, segments)], SourceTableBits = [.. Enumerable.Repeat(Pick(1000L, 1009L, 1100L), segments)], PreviousTableBits = [], DivergenceBits = [],
            },
            AdaptiveSplit = new AdaptiveSplitProfile
            {
                Starts = [0, 4096], PayloadBits = 8 * payload, TableBits = 800, FramingBits = 32, TotalBits = 8 * Near(total, 0.9, 1.1), BestFixedBlockBytes = 4096, BestFixedTotalBits = 8 * total,
            },
            Referee = Pick<RefereePrice[]?>(null, new[] { new RefereePrice("zstandard", 3, 1 << 20, Near(size, 0.98, 1.01)) }),
        };
        ViewProfile other = Made.View(size, Made.Huffman(Near(payload, 0.6, 1.2), 20)) with { View = "nibbles" };
        return Made.Judged($"unit-{random.Next(100)}", random.Next(2) == 0 ? [view] : [view, other]);
    }

    private static void AssertSaysWhatItClaims(Finding finding)
    {
        Assert.True(finding.BytesAtStake >= 0);
        if (finding.BytesAtStake > 0) Assert.Contains(Tallybound.Profiling.Wording.SizeText.Bytes(finding.BytesAtStake), finding.Claim, StringComparison.Ordinal);
        Assert.EndsWith(".", finding.Claim, StringComparison.Ordinal);
        Assert.EndsWith(".", finding.HoldsUnless, StringComparison.Ordinal);
        Assert.NotEmpty(finding.Against);
        Assert.NotEmpty(finding.Evidence);
        Assert.All(finding.Evidence, figure => Assert.True(double.IsFinite(figure.Value) && figure.Figure.Length > 0 && figure.Unit.Length > 0));
        Assert.Equal(finding.Evidence.Count, finding.Evidence.Select(figure => figure.Figure).Distinct().Count());
        if (finding.BytesAtStakeInterval is { } interval) Assert.True(interval is [>= 0, _] && interval[0] <= interval[1]);
        foreach (string word in (string[])["optimal", "incompressible", "  ", "NaN", "∞"]) Assert.DoesNotContain(word, finding.Claim + finding.HoldsUnless, StringComparison.OrdinalIgnoreCase);
    }

    [Fact]
    public void Every_claim_holds_its_size_its_figures_and_its_condition_about_one_source_and_about_many()
    {
        var random = new Random(11);
        var fired = new Dictionary<string, int>(StringComparer.Ordinal);
        var corpus = new CorpusFindings();
        for (int source = 0; source < 3000; source++)
        {
            SourceProfile drawn = Drawn(random);
            corpus.Add(drawn);
            foreach (Finding finding in drawn.Findings ?? [])
            {
                AssertSaysWhatItClaims(finding);
                fired[finding.Id] = fired.GetValueOrDefault(finding.Id) + 1;
            }
            Assert.Equal((drawn.Findings ?? []).OrderByDescending(finding => finding.BytesAtStake), drawn.Findings ?? []);
        }
        Assert.Equal(FindingRules.All.Select(rule => rule.Id).Order(StringComparer.Ordinal), fired.Keys.Order(StringComparer.Ordinal));
        IReadOnlyList<Finding> list = corpus.Finish(Made.Corpus(3000, 1_000_000, 900_000) with { Duplicates = [new DuplicateSet("00", 500_000, 2, ["a", "b"])] });
        Assert.Equal(FindingRules.All.Count + FindingRules.OfCorpus.Count, list.Count);
        Assert.All(list, AssertSaysWhatItClaims);
        Assert.All(list, finding => Assert.Equal(fired.GetValueOrDefault(finding.Id, (int)finding.Sources!), finding.Sources));
        Assert.Equal(list.OrderByDescending(finding => finding.BytesAtStake).ThenBy(finding => finding.Id, StringComparer.Ordinal), list);
    }

    [Fact]
    public void Rules_exclude_only_rules_that_are_there_and_each_other()
    {
        string[] ids = [.. FindingRules.All.Select(rule => rule.Id), .. FindingRules.OfCorpus.Select(rule => rule.Id)];
        Assert.Equal(ids.Length, ids.Distinct().Count());
        int pairs = 0;
        foreach (string id in ids)
        {
            foreach (string other in FindingExclusions.Of(id) ?? [])
            {
                Assert.NotEqual(id, other);
                Assert.Contains(other, ids);
                Assert.Contains(id, FindingExclusions.Of(other)!);
                pairs++;
            }
        }
        Assert.True(pairs >= 70);
        Assert.All(FindingExclusions.All, id => Assert.Contains(id, ids));
    }

    [Fact]
    public void A_source_without_symbols_or_unread_has_no_findings()
    {
        Assert.Null(FindingRules.Of(Made.Source("empty", Made.View(0))));
        Assert.Null(FindingRules.Of(new SourceProfile { Name = "x", Kind = SourceProfileKind.File, Status = SourceStatus.Failed, Reason = "permission denied" }));
    }
}
