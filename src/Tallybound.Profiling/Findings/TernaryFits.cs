using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>On a link with three levels a ternary Huffman code needs fewer trits than a binary one that is packed into them.</summary>
internal sealed class TernaryFits : IFindingRule
{
    /// <summary>3^7 = 2,187 words of 7 trits hold the 2^11 = 2,048 words of 11 bits.</summary>
    private const long BitsPacked = 11;
    private const long TritsPacked = 7;

    public string Id => "ternary-fits";

    public string Against => "the binary Huffman code, packed 11 bits in 7 trits";

    public string HoldsUnless => "The link has another number of levels or packs bits more tightly than 11 in 7 trits; tables are left out on both sides.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Binary("huffman") is not { PayloadBits: { } payload }) return null;
        CodePrice? ternary = null;
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i] is { Code: "huffman", Radix: 3, PayloadDigits: not null }) ternary = view.Codes[i];
        if (ternary?.PayloadDigits is not { } trits) return null;
        long packed = (payload + BitsPacked - 1) / BitsPacked * TritsPacked;
        if (100 * trits > 99 * packed) return null;
        long saved = (long)((packed - trits) * Math.Log2(3) / 8);
        if (!ViewPrices.Matters(saved, payload / 8)) return null;
        return this.Claim(
            $"On a link with three levels, a ternary Huffman code takes {SizeText.Count(trits)} trits instead of {SizeText.Count(packed)} for the binary one, packed 11 bits in 7 trits: {SizeText.Count(packed - trits)} fewer, worth {SizeText.Bytes(saved)}.",
            saved,
            Count("ternary Huffman code, payload", trits, "trits"),
            Count("binary Huffman code, payload in trits", packed, "trits"),
            Count("binary Huffman code, payload", payload, "bits"));
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, a ternary Huffman code needs fewer trits on a link with three levels than the binary one, packed 11 bits in 7 trits; those saved are worth {SizeText.Bytes(total.BytesAtStake)}.";
}
