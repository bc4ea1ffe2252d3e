using System.Text.Json.Serialization;

namespace Tallybound.Profiling.Records;

/// <summary>What is known of one source when the run is over: the unit of the ledger and of <c>profile.json</c>.</summary>
/// <remarks>A figure that was not computed is null here and absent in JSON; it is never written as 0.</remarks>
public sealed record SourceProfile
{
    /// <summary>The source's name, unique in a run; bytes that are not UTF-8 stand as <c>%HH</c>, <c>%</c> as <c>%25</c>.</summary>
    public required string Name { get; init; }

    /// <summary>Where the bytes came from.</summary>
    public required SourceProfileKind Kind { get; init; }

    /// <summary>How far the source was read.</summary>
    public required SourceStatus Status { get; init; }

    /// <summary>Why the source is not plainly <see cref="SourceStatus.Profiled"/>, in words; null when it is.</summary>
    public string? Reason { get; init; }

    /// <summary>Facts a reader should know that do not change the status, such as an order left out for want of memory. Null when there are none.</summary>
    public IReadOnlyList<string>? Notes { get; init; }

    /// <summary>Bytes counted (decompressed bytes for a member). Null when nothing was read.</summary>
    public long? Bytes { get; init; }

    /// <summary>Bytes of the compressed file that a member was read from; null for other kinds.</summary>
    public long? CompressedBytes { get; init; }

    /// <summary>SHA-256 of the bytes read, lower-case hexadecimal; for sources of at most 64 MiB.</summary>
    public string? Sha256 { get; init; }

    /// <summary>SHA-256 of the SHA-256s of the consecutive 64 MiB pieces; for sources above 64 MiB.</summary>
    public string? Sha256Pieces { get; init; }

    /// <summary>One entry a view, in the order asked for. Null when nothing was read.</summary>
    public IReadOnlyList<ViewProfile>? Views { get; init; }

    /// <summary>What the figures of the first view say, the most bytes at stake first. Null when they say nothing that a rule knows.</summary>
    public IReadOnlyList<Finding>? Findings { get; init; }
}

/// <summary>Where a source's bytes came from.</summary>
[JsonConverter(typeof(JsonStringEnumConverter<SourceProfileKind>))]
public enum SourceProfileKind
{
    /// <summary>A regular file.</summary>
    [JsonStringEnumMemberName("file")] File,

    /// <summary>Standard input, a named pipe or another source of unknown length.</summary>
    [JsonStringEnumMemberName("stream")] Stream,

    /// <summary>The decompressed content of a compressed file.</summary>
    [JsonStringEnumMemberName("member")] Member,

    /// <summary>Neither: a folder, socket or device that the walk met and did not read.</summary>
    [JsonStringEnumMemberName("object")] Object,
}

/// <summary>How far a source was read.</summary>
[JsonConverter(typeof(JsonStringEnumConverter<SourceStatus>))]
public enum SourceStatus
{
    /// <summary>Read whole.</summary>
    [JsonStringEnumMemberName("profiled")] Profiled,

    /// <summary>Read in part: the figures cover what was read, the reason says why it ended.</summary>
    [JsonStringEnumMemberName("partial")] Partial,

    /// <summary>Not read: the reason says why.</summary>
    [JsonStringEnumMemberName("failed")] Failed,

    /// <summary>Left out by a rule: a link, a second name of a file, a device.</summary>
    [JsonStringEnumMemberName("skipped")] Skipped,
}
