using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>A length limit that was priced costs one part in a thousand of the payload or more.</summary>
internal sealed class LimitCosts : IFindingRule
{
    private const long LeastPart = 1000;
    private const long LeastBytes = 64;

    public string Id => "limit-costs";

    public string Against => "the least length limit that was priced";

    public string HoldsUnless => "The decoder has no room for the table that longer codes need.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Binary("huffman") is not { PayloadBits: { } payload, TotalBits: { } free, LongestCode: { } longest } huffman || !view.IsWorthCoding(huffman)) return null;
        CodePrice? tight = null;
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i] is { LimitCostBits: { } cost, LengthLimit: not null } code && LeastPart * cost >= payload && (tight is null || code.LengthLimit < tight.LengthLimit)) tight = code;
        if (tight is not { LengthLimit: { } limit, LimitCostBits: { } lost, TotalBits: { } total }) return null;
        long saved = (total - free) / 8;
        if (saved < LeastBytes) return null;
        CodePrice? next = Next(view, tight);
        List<FindingEvidence> evidence =
        [
            Count("limit", limit, "bits"), Bytes($"codes of at most {limit} bits, total", total), Bytes("Huffman, total", free), Share("payload that the limit costs", (double)lost / payload),
            Count("longest code of the free Huffman code", longest, "bits"),
        ];
        if (next is not null) evidence.Add(Bytes($"codes of at most {next.LengthLimit} bits, total", next.TotalBits!.Value));
        return this.Claim(
            $"Codes of at most {limit} bits cost {SizeText.Bytes(saved)}: the source is {SizeText.Bytes(total / 8)} with them and {SizeText.Bytes(free / 8)} with the free Huffman code{Less(next, free)}.",
            saved, evidence) with
        {
            Against = $"codes of at most {limit} bits",
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, the least length limit that was priced costs 0.1 % of the payload or more; the free Huffman code saves {SizeText.Bytes(total.BytesAtStake)}.";

    /// <summary>The least longer limit that costs less; null: none was priced.</summary>
    private static CodePrice? Next(ViewProfile view, CodePrice tight)
    {
        CodePrice? next = null;
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i] is { LimitCostBits: not null, TotalBits: not null } code && code.LengthLimit > tight.LengthLimit && code.TotalBits < tight.TotalBits && (next is null || code.LengthLimit < next.LengthLimit)) next = code;
        return next;
    }

    private static string Less(CodePrice? next, long free)
    {
        if (next is null) return "";
        long cost = (next.TotalBits!.Value - free) / 8;
        return cost > 0 ? $"; at most {next.LengthLimit} bits cost {SizeText.Bytes(cost)}" : $"; at most {next.LengthLimit} bits cost nothing";
    }
}
