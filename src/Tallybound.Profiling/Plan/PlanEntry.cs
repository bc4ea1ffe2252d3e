using Tallybound.Profiling.Records;
using Tallybound.Sources;

namespace Tallybound.Profiling.Plan;

/// <summary>One source of a plan: to be read, or decided already.</summary>
public sealed record PlanEntry
{
    /// <summary>Unique name.</summary>
    public required string Name { get; init; }

    /// <summary>Where its bytes come from.</summary>
    public required SourceProfileKind Kind { get; init; }

    /// <summary>What the walk found; null when there is nothing to read.</summary>
    public FoundSource? Found { get; init; }

    /// <summary>The status the walk decided; null when the source is to be read.</summary>
    public SourceStatus? Status { get; init; }

    /// <summary>Why, in words; null when the source is to be read.</summary>
    public string? Reason { get; init; }

    /// <summary>An entry that will be read.</summary>
    public static PlanEntry ToRead(FoundSource found) => new()
    {
        Name = found.Name,
        Found = found,
        Kind = found.Kind switch
        {
            SourceKind.Stream => SourceProfileKind.Stream,
            SourceKind.Member => SourceProfileKind.Member,
            _ => SourceProfileKind.File,
        },
    };

    /// <summary>An entry that the walk settled.</summary>
    public static PlanEntry Decided(string name, SourceStatus status, string reason) => new()
    {
        Name = name,
        Kind = status == SourceStatus.Failed ? SourceProfileKind.File : SourceProfileKind.Object,
        Status = status,
        Reason = reason,
    };
}
