using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>A length limit that was priced costs no bit, so the decoder's table may be as small as it allows.</summary>
internal sealed class LimitCostsNothing : IFindingRule
{
    public string Id => "limit-costs-nothing";

    public string Against => "the free Huffman code";

    public string HoldsUnless => "Later data have other counts: the limit is tried on the counts seen here alone.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.SymbolsInUse < 2 || view.Binary("huffman") is not { LongestCode: { } longest, PayloadBits: { } payload } huffman || !view.IsWorthCoding(huffman)) return null;
        CodePrice? least = null;
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i] is { LimitCostBits: 0, LengthLimit: not null } code && (least is null || code.LengthLimit < least.LengthLimit)) least = code;
        if (least?.LengthLimit is not { } limit) return null;
        int enough = Math.Min(limit, longest);
        string why = longest > limit ? $", though the free Huffman code's longest has {longest}: a" : $": the free Huffman code's longest has {longest}, and a";
        return this.Claim(
            $"A limit of {limit} bits costs nothing{why} decoding table of {Entries(enough)} entries finds every symbol in one step.",
            0,
            Count("longest code that costs nothing", enough, "bits"),
            Count("least limit priced that costs nothing", limit, "bits"),
            Count("longest code of the free Huffman code", longest, "bits"),
            Bytes("Huffman, payload", payload));
    }

    public string ClaimOfMany(FindingTotal total)
    {
        int limit = (int)total.GreatestFigure;
        return $"{total.Where}, a limit of {limit} bits costs nothing: a decoding table of {Entries(limit)} entries finds every symbol in one step.";
    }

    private static string Entries(int limit) => SizeText.Count(1L << Math.Min(limit, 62));
}
