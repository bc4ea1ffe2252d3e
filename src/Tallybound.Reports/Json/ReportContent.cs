using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Json;

/// <summary>What a report is drawn from: the head of a run's document whole, of its sources as many as a report shows.</summary>
public sealed record ReportContent
{
    /// <summary>Version of the program that made the run.</summary>
    public required string ToolVersion { get; init; }

    /// <summary>Provenance.</summary>
    public required RunRecord Run { get; init; }

    /// <summary>The whole of the run.</summary>
    public required CorpusProfile Corpus { get; init; }

    /// <summary>What the figures say of the whole, in the document's order; empty where the document has none.</summary>
    public required IReadOnlyList<Finding> Findings { get; init; }

    /// <summary>The heaviest sources that were read, at most 200, most bytes first, equal ones in document order.</summary>
    public required IReadOnlyList<DrawnSource> Drawn { get; init; }

    /// <summary>The heaviest sources that were read, at most 10,000, in the order of <see cref="Drawn"/>.</summary>
    public required IReadOnlyList<SourceSummary> Listed { get; init; }

    /// <summary>The first failed or partial sources in document order, at most 200.</summary>
    public required IReadOnlyList<SourceSummary> Failures { get; init; }

    /// <summary>The first skipped sources in document order, at most 200.</summary>
    public required IReadOnlyList<SourceSummary> Skipped { get; init; }
}

/// <summary>A source that gets a page of its own.</summary>
/// <param name="Number">Its rank by bytes, from 1.</param>
/// <param name="Place">Its place in the document's list of sources, from 0.</param>
/// <param name="Profile">Its record, with the counts for its drawings where the document has them.</param>
/// <param name="HasPairs">Whether the record holds pair counts of a view.</param>
public sealed record DrawnSource(int Number, long Place, SourceProfile Profile, bool HasPairs);
