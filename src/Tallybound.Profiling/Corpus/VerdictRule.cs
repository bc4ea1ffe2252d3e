using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Profiling.Corpus;

/// <summary>The one code with the lowest total over all sources, in one sentence with both sizes.</summary>
internal static class VerdictRule
{
    /// <summary>The verdict over totals whose first entry is the raw size.</summary>
    /// <param name="totals">Bytes by code key, <c>raw</c> and <c>bestPerSource</c> among them.</param>
    /// <param name="sourcesRead">Sources that the totals are of.</param>
    public static Verdict Of(IReadOnlyDictionary<string, long> totals, long sourcesRead)
    {
        long raw = totals["raw"];
        string best = "raw";
        long bestBytes = raw;
        foreach ((string key, long bytes) in totals)
        {
            if (key is "raw" or "bestPerSource" || bytes >= bestBytes) continue;
            best = key;
            bestBytes = bytes;
        }
        return new Verdict(best, raw, bestBytes, Sentence(best, raw, bestBytes, totals["bestPerSource"], sourcesRead));
    }

    private static string Sentence(string best, long raw, long coded, long bestPerSource, long sources)
    {
        string whole = $"{SizeText.Bytes(raw)} in {SizeText.Count(sources)} {(sources == 1 ? "source" : "sources")}";
        if (best == "raw") return $"{whole}: none of the codes priced here makes it smaller once tables and framing are charged; it is best stored.";
        string sentence = $"{whole}; with {CodeText.Of(best)}, it is {SizeText.Bytes(coded)}, tables and framing included: {SizeText.Ratio(raw, coded)}, saving {SizeText.Saving(raw, coded)}.";
        return bestPerSource < coded && sources > 1
            ? $"{sentence} With the best code of each source it is {SizeText.Bytes(bestPerSource)}, {SizeText.Ratio(raw, bestPerSource)}."
            : sentence;
    }
}
