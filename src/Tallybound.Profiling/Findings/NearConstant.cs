using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>One symbol is nearly all there is, and Huffman spends a whole bit on each.</summary>
internal sealed class NearConstant : IFindingRule
{
    /// <summary>Share of the commonest symbol from which a stream is called near constant.</summary>
    public const double LeastShare = 0.9;

    public string Id => "near-constant";

    public string Against => OneTable.AgainstOfMany;

    public string HoldsUnless => "The commonest symbol becomes rarer than it is here, or each symbol must be decoded without the ones before it.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (OneTable.Of(view) is not { } plain || OneTable.TopShare(view, plain.Huffman) is not { } share || share < LeastShare) return null;
        if (view.CheapestWithoutWholeBits() is not { TotalBits: { } bits } winner || plain.SavedBy(bits) is not { } saved) return null;
        List<FindingEvidence> evidence = [Share("share of the commonest symbol", share)];
        if (view.Orders.Count > 0) evidence.Add(Rate("H0", view.Orders[0].EntropyBitsPerSymbol));
        evidence.Add(plain.Evidence);
        evidence.AddRange(view.WithoutWholeBits());
        string seen = view.SymbolsInUse == 1 ? "All symbols are one and the same" : $"{SizeText.Percent(share)} of symbols are one and the same";
        return this.Claim(
            $"{seen}, and Huffman spends at least 1 bit on each; with {CodeText.Of(CodeChoice.KeyOf(winner))}, the source is {SizeText.Bytes(bits / 8)} instead of {plain.Words}: {SizeText.Bytes(saved)} less.",
            saved, evidence) with
        {
            Against = plain.Against,
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, one symbol is {(total.LeastFigure >= 100 ? "all there is" : $"at least {SizeText.Percent(Math.Floor(10 * total.LeastFigure) / 1000)} of all")}, and Huffman spends at least 1 bit on each; the cheapest of tANS, range coding and symbol blocks saves {SizeText.Bytes(total.BytesAtStake)}.";
}
