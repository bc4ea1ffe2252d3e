using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Counts change along the source, and stretches with tables of their own save more than those tables cost.</summary>
internal sealed class StatisticsChange : IFindingRule
{
    private const double MostOfPlain = 0.98;

    public string Id => "statistics-change";

    public string Against => OneTable.AgainstOfMany;

    public string HoldsUnless => "Other sources change elsewhere and an encoder cannot look ahead to find the places; the stretches are the best found, not proved best.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.AdaptiveSplit is not { Starts.Count: > 1 } split || OneTable.Of(view) is not { } plain) return null;
        if (split.TotalBits > MostOfPlain * plain.TotalBits || plain.SavedBy(split.TotalBits) is not { } saved) return null;
        return this.Claim(
            $"Counts change along the source: in {SizeText.Count(split.Starts.Count)} stretches, each with a new table or the last one, it is {SizeText.Bytes(split.TotalBits / 8)}, tables included, instead of {plain.Words}: {SizeText.Bytes(saved)} less.",
            saved,
            Count("stretches", split.Starts.Count, "stretches"),
            plain.Evidence,
            Bytes("stretches, total", split.TotalBits),
            Bytes("stretches, tables", split.TableBits),
            Bytes($"best fixed table block, {SizeText.Whole(split.BestFixedBlockBytes)}, total", split.BestFixedTotalBits)) with
        {
            Against = plain.Against,
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, counts change along the source; stretches with tables of their own save {SizeText.Bytes(total.BytesAtStake)}, those tables included.";
}
