using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Sources differ so much that a code chosen for each saves over the one code that suits all best.</summary>
internal sealed class CodePerSource : ICorpusRule
{
    private const double LeastShare = 0.01;

    public string Id => "code-per-source";

    public Finding? Judge(CorpusProfile corpus)
    {
        if (corpus.Verdict is not { } verdict) return null;
        long best = corpus.Totals["bestPerSource"];
        long saved = verdict.CodedBytes - best;
        if (saved < LeastShare * verdict.CodedBytes || !ViewPrices.Matters(saved, verdict.CodedBytes)) return null;
        string code = CodeText.Of(verdict.Code);
        return new Finding
        {
            Id = Id,
            Claim = $"With the best code of each source, the whole is {SizeText.Bytes(best)}, tables and framing included, instead of {SizeText.Bytes(verdict.CodedBytes)} {(verdict.Code == "raw" ? code : $"with {code}, for all")}: {SizeText.Bytes(saved)} less.",
            BytesAtStake = saved,
            Against = verdict.Code == "raw" ? "all as they stand" : $"{code}, for all sources",
            Evidence = [Count("as they stand", verdict.RawBytes, "bytes"), Count($"{code}, total", verdict.CodedBytes, "bytes"), Count("best code of each source, total", best, "bytes")],
            HoldsUnless = "The decoder has room for one kind of code only, or telling which code a source has costs what it saves.",
            Excludes = FindingExclusions.Of(Id),
            Sources = corpus.Profiled + corpus.Partial,
        };
    }
}
