using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Json;

/// <summary>Takes the sources of a document one after another and keeps those that a report shows.</summary>
internal sealed class SourceGathering
{
    /// <summary>Sources listed at most.</summary>
    public const int MostListed = 10_000;

    /// <summary>Failed or partial sources listed at most, and skipped ones.</summary>
    public const int MostNotWhole = 200;

    private readonly HeaviestKept<(SourceProfile Profile, long Place)> drawn = new(ProfileDocument.SourcesWithPage);
    private readonly HeaviestKept<SourceSummary> listed = new(MostListed);
    private readonly List<SourceSummary> failures = [];
    private readonly List<SourceSummary> skipped = [];
    private long place;

    /// <summary>Failed and partial ones so far, in the order they came.</summary>
    public IReadOnlyList<SourceSummary> Failures => failures;

    /// <summary>Skipped ones so far, in the order they came.</summary>
    public IReadOnlyList<SourceSummary> Skipped => skipped;

    /// <summary>Takes the next source.</summary>
    public void Add(SourceProfile profile)
    {
        long here = place++;
        SourceSummary line = SourceSummary.Of(profile);
        if (profile.Status is SourceStatus.Failed or SourceStatus.Partial && failures.Count < MostNotWhole) failures.Add(line);
        if (profile.Status is SourceStatus.Skipped && skipped.Count < MostNotWhole) skipped.Add(line);
        if (profile is not { Bytes: { } bytes, Views.Count: > 0 }) return;
        drawn.Add(bytes, (profile, here));
        listed.Add(bytes, line);
    }

    /// <summary>The heaviest ones, heaviest first; asked for once, when all are in.</summary>
    public IReadOnlyList<DrawnSource> TakeDrawn() =>
        [.. drawn.Take().Select((kept, index) => new DrawnSource(index + 1, kept.Place, kept.Profile, kept.Profile.Views!.Any(view => view.PairCounts is not null)))];

    /// <summary>Lines of the heaviest ones, heaviest first; asked for once, when all are in.</summary>
    public IReadOnlyList<SourceSummary> TakeListed() => listed.Take();
}
