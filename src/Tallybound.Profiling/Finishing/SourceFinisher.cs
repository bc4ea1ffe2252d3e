using Tallybound.Profiling.Findings;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Run;
using Tallybound.Profiling.Wording;
using Tallybound.Sources;

namespace Tallybound.Profiling.Finishing;

/// <summary>Turns what was counted of a source into its record. One object a thread.</summary>
internal sealed class SourceFinisher(RunParameters parameters)
{
    private readonly ViewFinisher views = new(parameters);

    /// <summary>The record of a source, and the counts for its drawings.</summary>
    /// <param name="work">The source, all of whose units are in.</param>
    /// <param name="part">All that was counted; null: it could not be opened, or had no turn.</param>
    /// <param name="note">A fact for its reader; null: none.</param>
    /// <param name="keepCounts">Whether counts for drawings are wanted.</param>
    /// <param name="keepPairs">Whether pair counts are wanted.</param>
    public (SourceProfile Profile, DrawingCounts? Drawing) Finish(SourceWork work, SourcePart? part, string? note, bool keepCounts, bool keepPairs)
    {
        long bytes = work.BytesRead;
        (string? stopped, long? compressed, long? lengthNow) = work.Afterwards();
        if (part is null || (bytes == 0 && (work.Trouble ?? stopped) is not null)) return (NotRead(work), null);
        (SourceStatus status, string? reason) = Judge(work, bytes, stopped);
        var profiles = new List<ViewProfile>(part.Tallies.Length);
        var drawings = new List<DrawingCountsOfView>(part.Tallies.Length);
        for (int view = 0; view < part.Tallies.Length; view++)
        {
            string name = parameters.Views[view];
            IReadOnlyList<byte[]> windows = name == ViewNames.Bytes && work.Samples is not null && part.Segments.SegmentBytes > SegmentSize.LeastBytes ? work.Samples.Windows() : [];
            ViewFinisher.Finished finished = views.Finish(name, part.Tallies[view], bytes, ViewSegments.Of(name, part.Segments), windows, keepCounts, keepPairs);
            profiles.Add(finished.Profile);
            drawings.Add(finished.Drawing ?? new DrawingCountsOfView(null, null, null));
        }
        (string Hexadecimal, bool OfPieces)? digest = parameters.Digest ? PieceDigest.Combine(work.Pieces()) : null;
        var profile = new SourceProfile
        {
            Name = work.Entry.Name,
            Kind = work.Entry.Kind,
            Status = status,
            Reason = reason,
            Notes = Notes(work, bytes, lengthNow, note),
            Bytes = bytes,
            CompressedBytes = compressed,
            Sha256 = digest is { OfPieces: false } whole ? whole.Hexadecimal : null,
            Sha256Pieces = digest is { OfPieces: true } pieces ? pieces.Hexadecimal : null,
            Views = profiles,
        };
        if (FindingRules.Of(profile) is { } findings) profile = profile with { Findings = findings };
        return (profile, keepCounts ? new DrawingCounts(drawings) : null);
    }

    private static SourceProfile NotRead(SourceWork work)
    {
        bool notReached = work.Trouble == RunEnd.Stopped;
        return new SourceProfile
        {
            Name = work.Entry.Name,
            Kind = work.Entry.Kind,
            Status = notReached ? SourceStatus.Skipped : SourceStatus.Failed,
            Reason = notReached ? RunEnd.NotReached : work.Trouble ?? work.Afterwards().Stopped ?? "it could not be read",
        };
    }

    private static (SourceStatus Status, string? Reason) Judge(SourceWork work, long bytes, string? stopped)
    {
        if ((work.Trouble ?? stopped) is { } trouble) return (SourceStatus.Partial, trouble);
        if (work.Bytes is { } planned && bytes < planned)
            return (SourceStatus.Partial, $"the file shrank from {SizeText.Count(planned)} to {SizeText.Count(bytes)} bytes while it was read");
        return (SourceStatus.Profiled, null);
    }

    private static List<string>? Notes(SourceWork work, long bytes, long? lengthNow, string? note)
    {
        var notes = new List<string>();
        if (note is not null) notes.Add(note);
        if (work.Bytes is { } planned && lengthNow > planned && bytes == planned)
            notes.Add($"the file grew to {SizeText.Count(lengthNow.Value)} bytes while it was read; the {SizeText.Count(planned)} bytes that stood there when it was listed were profiled");
        if (work.Entry.Found?.Bytes == 0 && bytes > 0) notes.Add("the file was listed with 0 bytes and gave more when it was read");
        return notes.Count > 0 ? notes : null;
    }
}
