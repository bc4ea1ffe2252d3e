using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>No code that was priced saves 1 % against stored symbols.</summary>
internal sealed class StoreIt : IFindingRule
{
    private const long LeastSymbols = 1024;
    private const double LeastOfPlain = 0.99;

    public string Id => "store-it";

    public string Against => "one Huffman table for the whole source";

    public string HoldsUnless => "A coder that was not priced here finds more, such as one that looks for repeated strings.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Symbols < LeastSymbols || view.Binary("huffman") is not { TotalBits: { } huffman }) return null;
        (long TotalBits, CodePrice? Code) cheapest = (long.MaxValue, null);
        int priced = 0;
        for (int i = 0; i < view.Codes.Count; i++)
        {
            if (view.Codes[i].TotalBits is not { } bits) continue;
            priced++;
            if (bits < cheapest.TotalBits) cheapest = (bits, view.Codes[i]);
        }
        if (cheapest.TotalBits <= LeastOfPlain * view.StoredTotalBits || GainsOtherwise(view)) return null;
        long saved = Math.Max(0, (huffman - view.StoredTotalBits) / 8);
        List<FindingEvidence> evidence = [Bytes("stored, total", view.StoredTotalBits), Bytes("Huffman, total", huffman), Count("codes priced", priced, "codes")];
        if (cheapest.Code is { Code: not "huffman" } other) evidence.Add(Bytes(TotalOf(other), cheapest.TotalBits));
        return this.Claim(
            $"Best stored: none of the {priced} codes priced here saves 1 % of {SizeText.Bytes(view.StoredTotalBits / 8)} stored; {(saved > 0 ? $"Huffman with its table would add {SizeText.Bytes(saved)}" : $"the cheapest takes {SizeText.Bytes(cheapest.TotalBits / 8)}")}.",
            saved, evidence);
    }

    public string ClaimOfMany(FindingTotal total) => total.BytesAtStake == 0
        ? $"{total.Where}, none of the codes priced here saves 1 % against stored symbols."
        : $"{total.Where}, none of the codes priced here saves 1 % against stored symbols; Huffman with its table would add {SizeText.Bytes(total.BytesAtStake)}.";

    /// <summary>Whether an adaptive model, a block size or a division into stretches saves 1 %.</summary>
    private static bool GainsOtherwise(ViewProfile view)
    {
        double plain = LeastOfPlain * Math.Log2(view.AlphabetSize);
        for (int i = 0; i < view.Orders.Count; i++)
            if (view.Orders[i].AdaptiveBitsPerSymbol <= plain) return true;
        double stored = LeastOfPlain * view.StoredTotalBits;
        for (int i = 0; i < (view.TableBlocks?.Count ?? 0); i++)
            if (view.TableBlocks![i].TotalBits <= stored) return true;
        return view.AdaptiveSplit?.TotalBits <= stored;
    }
}
