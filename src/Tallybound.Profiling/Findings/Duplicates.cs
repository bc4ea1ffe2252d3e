using Tallybound.Profiling.Corpus;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Sources hold the same bytes, and one of each would do.</summary>
internal sealed class Duplicates : ICorpusRule
{
    public string Id => "duplicates";

    public Finding? Judge(CorpusProfile corpus)
    {
        if (corpus.Duplicates is not { } sets) return null;
        long copies = 0, saved = 0, sources = 0;
        foreach (DuplicateSet set in sets)
        {
            copies += set.Count - 1;
            sources += set.Count;
            saved += (set.Count - 1) * set.Bytes;
        }
        if (!ViewPrices.Matters(saved, corpus.Bytes)) return null;
        string atLeast = sets.Count == CorpusBuilder.DuplicateSets ? "at least " : "";
        return new Finding
        {
            Id = Id,
            Claim = $"{(copies == 1 ? "One source repeats" : $"{SizeText.Count(copies)} sources repeat")} the bytes of another: of {SizeText.Bytes(corpus.Bytes)} as they stand, {atLeast}{SizeText.Bytes(saved)} are copies.",
            BytesAtStake = saved,
            Against = "every copy kept as it stands",
            Evidence = [Count("copies of another source", copies, "sources"), Count("sets of equal sources", sets.Count, "sets"), Count("size of all sources", corpus.Bytes, "bytes")],
            HoldsUnless = "Each source must be there by itself; coded, a copy costs less than it does as it stands.",
            Sources = sources,
        };
    }
}
