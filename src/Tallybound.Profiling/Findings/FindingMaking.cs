using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Profiling.Findings;

/// <summary>Makes findings out of what a rule says, and figures out of bits and counts.</summary>
internal static class FindingMaking
{
    /// <summary>The rule's claim about one source.</summary>
    /// <param name="rule">The rule.</param>
    /// <param name="claim">The claim.</param>
    /// <param name="bytesAtStake">Its bytes.</param>
    /// <param name="evidence">The figures behind it, that of the corpus claim first.</param>
    public static Finding Claim(this IFindingRule rule, string claim, long bytesAtStake, params IReadOnlyList<FindingEvidence> evidence) => new()
    {
        Id = rule.Id,
        Claim = claim,
        BytesAtStake = bytesAtStake,
        Against = rule.Against,
        Evidence = evidence,
        HoldsUnless = rule.HoldsUnless,
        Excludes = FindingExclusions.Of(rule.Id),
    };

    /// <summary>A size in whole bytes.</summary>
    public static FindingEvidence Bytes(string figure, long bits) => new(figure, bits / 8, "bytes");

    /// <summary>What the total of a code is called as a figure.</summary>
    public static string TotalOf(CodePrice code) => CodeText.Of(CodeChoice.KeyOf(code)) + (code.Exact ? ", total" : ", total priced from counts");

    /// <summary>A share in per cent.</summary>
    public static FindingEvidence Share(string figure, double share) => new(figure, Math.Round(100 * share, 6), "%");

    /// <summary>A rate.</summary>
    public static FindingEvidence Rate(string figure, double bitsPerSymbol) => new(figure, Math.Round(bitsPerSymbol, 9), "bit/symbol");

    /// <summary>How many of something.</summary>
    public static FindingEvidence Count(string figure, long count, string unit) => new(figure, count, unit);
}
