using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Read as other symbols, the source codes smaller.</summary>
internal sealed class AnotherView : IFindingRule
{
    private const double MostOfFirst = 0.98;

    public string Id => "another-view";

    public string Against => "the cheapest code of the first view";

    public string HoldsUnless => "A codec that finds repeats runs behind the code: symbols of another kind can hide them.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (source.Views is not { Count: > 1 } views) return null;
        ViewProfile? other = null;
        (long TotalBits, CodePrice? Code) best = default;
        for (int i = 1; i < views.Count; i++)
        {
            (long TotalBits, CodePrice? Code) of = views[i].Cheapest();
            of.TotalBits += views[i].SideBits;
            if (views[i].Symbols > 0 && (other is null || of.TotalBits < best.TotalBits)) (other, best) = (views[i], of);
        }
        (long firstBits, CodePrice? firstCode) = view.Cheapest();
        if (other is null || best.TotalBits > MostOfFirst * firstBits) return null;
        long saved = (firstBits - best.TotalBits) / 8;
        if (!ViewPrices.Matters(saved, firstBits / 8)) return null;
        return this.Claim(
            $"As {other.View} the source is {SizeText.Bytes(best.TotalBits / 8)} with {Words(best.Code)}, as {view.View} {SizeText.Bytes(firstBits / 8)} with {Words(firstCode)}: {SizeText.Bytes(saved)} less.",
            saved,
            Bytes($"{view.View}, {Words(firstCode)}, total", firstBits),
            Bytes($"{other.View}, {Words(best.Code)}, total", best.TotalBits)) with
        {
            Against = $"the cheapest code of {view.View}",
        };
    }

    public string ClaimOfMany(FindingTotal total) => $"{total.Where}, another view codes smaller than the first: {SizeText.Bytes(total.BytesAtStake)} less.";

    private static string Words(CodePrice? code) => code is null ? "stored symbols" : CodeText.Of(CodeChoice.KeyOf(code));
}
