using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Few symbols are in use, about equally often: codes of one length do as well as Huffman.</summary>
internal sealed class FixedCodeDoes : IFindingRule
{
    public string Id => "fixed-code-does";

    public string Against => "stored symbols";

    public string HoldsUnless => "Counts become less even, or a symbol appears that is not in use here.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.SymbolsInUse < 2 || view.Binary("huffman") is not { TotalBits: { } huffman } || view.Binary("fixed") is not { TotalBits: { } total, LongestCode: { } width }) return null;
        if (100 * total > 101 * huffman || 100 * total > 99 * view.StoredTotalBits) return null;
        long saved = (view.StoredTotalBits - total) / 8;
        if (!ViewPrices.Matters(saved, view.StoredTotalBits / 8)) return null;
        return this.Claim(
            $"Fixed-length codes of {width} {(width == 1 ? "bit" : "bits")} are enough: with them, the source is {SizeText.Bytes(total / 8)} instead of {SizeText.Bytes(view.StoredTotalBits / 8)} stored, {SizeText.Bytes(saved)} less; with Huffman, it is {SizeText.Bytes(huffman / 8)}.",
            saved,
            Count("width of a fixed-length code", width, "bits"),
            Count("symbols in use", view.SymbolsInUse, "symbols"),
            Bytes("stored, total", view.StoredTotalBits),
            Bytes("fixed-length codes, total", total),
            Bytes("Huffman, total", huffman));
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, fixed-length codes take at most 1 % more than Huffman and save {SizeText.Bytes(total.BytesAtStake)} against stored symbols.";
}
