using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Profiling.Findings;

/// <summary>What one rule found over many sources, added up. Every member is a sum, a least or a greatest, so the order of sources never matters.</summary>
internal sealed record FindingTotal
{
    /// <summary>Sources in which the rule fires, at least 1.</summary>
    public required long Sources { get; init; }

    /// <summary>Bytes of those sources.</summary>
    public required long Bytes { get; init; }

    /// <summary>Sum of their bytes at stake.</summary>
    public required long BytesAtStake { get; init; }

    /// <summary>Name of the source with the most bytes at stake; of equal ones the first in ordinal order.</summary>
    public required string HeaviestSource { get; init; }

    /// <summary>Bytes at stake in that source.</summary>
    public required long HeaviestBytesAtStake { get; init; }

    /// <summary>Sums of the ends of the sources' intervals, exact sources added to both; null where all are exact. The sum lies inside more surely than each part.</summary>
    public (long Low, long High)? Interval { get; init; }

    /// <summary>Least value of the first figure behind the claim.</summary>
    public required double LeastFigure { get; init; }

    /// <summary>Greatest value of the first figure behind the claim.</summary>
    public required double GreatestFigure { get; init; }

    /// <summary>How many sources and how large, as a claim begins: "In 3 sources of 4.12 MiB together".</summary>
    public string Where => Sources == 1 ? $"In one source of {SizeText.Bytes(Bytes)}" : $"In {SizeText.Count(Sources)} sources of {SizeText.Bytes(Bytes)} together";

    /// <summary>The total of one source's finding.</summary>
    public static FindingTotal Of(SourceProfile source, Finding finding) => new()
    {
        Sources = 1,
        Bytes = source.Bytes ?? 0,
        BytesAtStake = finding.BytesAtStake,
        HeaviestSource = source.Name,
        HeaviestBytesAtStake = finding.BytesAtStake,
        Interval = finding.BytesAtStakeInterval is [var low, var high] ? (low, high) : null,
        LeastFigure = finding.Evidence[0].Value,
        GreatestFigure = finding.Evidence[0].Value,
    };

    /// <summary>Both together.</summary>
    public FindingTotal Plus(FindingTotal other)
    {
        bool otherLeads = other.HeaviestBytesAtStake != HeaviestBytesAtStake
            ? other.HeaviestBytesAtStake > HeaviestBytesAtStake
            : string.CompareOrdinal(other.HeaviestSource, HeaviestSource) < 0;
        FindingTotal leader = otherLeads ? other : this;
        (long Low, long High) mine = Interval ?? (BytesAtStake, BytesAtStake), theirs = other.Interval ?? (other.BytesAtStake, other.BytesAtStake);
        return new FindingTotal
        {
            Sources = Sources + other.Sources,
            Bytes = Bytes + other.Bytes,
            BytesAtStake = BytesAtStake + other.BytesAtStake,
            HeaviestSource = leader.HeaviestSource,
            HeaviestBytesAtStake = leader.HeaviestBytesAtStake,
            Interval = Interval is null && other.Interval is null ? null : (mine.Low + theirs.Low, mine.High + theirs.High),
            LeastFigure = Math.Min(LeastFigure, other.LeastFigure),
            GreatestFigure = Math.Max(GreatestFigure, other.GreatestFigure),
        };
    }
}
