using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Code lengths in whole bits lose a few per cent, and a coder without them wins it back, its table charged.</summary>
internal sealed class IntegerLengthsLose : IFindingRule
{
    private const double LeastShare = 0.03;
    private const double LeastBitsPerSymbol = 0.02;

    public string Id => "integer-lengths-lose";

    public string Against => OneTable.AgainstOfMany;

    public string HoldsUnless => "The decoder has no room for the other coder; or symbol blocks win and neighbours become independent, since observed blocks also use dependence.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (OneTable.Of(view) is not { } plain || plain.Huffman.RedundancyBitsPerSymbol is not { } redundancy || view.Orders.Count == 0) return null;
        double entropy = view.Orders[0].EntropyBitsPerSymbol;
        double? topShare = OneTable.TopShare(view, plain.Huffman);
        if (redundancy < LeastBitsPerSymbol || redundancy < LeastShare * entropy || topShare >= NearConstant.LeastShare) return null;
        if (view.CheapestWithoutWholeBits() is not { TotalBits: { } bits } winner || plain.SavedBy(bits) is not { } saved) return null;
        List<FindingEvidence> evidence = [Rate("redundancy of the Huffman code", redundancy), Rate("H0", entropy)];
        if (topShare is { } share) evidence.Add(Share("share of the commonest symbol", share));
        evidence.Add(plain.Evidence);
        evidence.AddRange(view.WithoutWholeBits());
        return this.Claim(
            $"Code lengths in whole bits lose {SizeText.Rate(redundancy)} bit/symbol over H0 of {SizeText.Rate(entropy)}; with {CodeText.Of(CodeChoice.KeyOf(winner))}, the source is {SizeText.Bytes(bits / 8)} instead of {plain.Words}: {SizeText.Bytes(saved)} less.",
            saved, evidence) with
        {
            Against = plain.Against,
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, code lengths in whole bits lose 3 % of H0 or more; the cheapest of tANS, range coding and symbol blocks wins {SizeText.Bytes(total.BytesAtStake)} back.";
}
