namespace Tallybound.Profiling.Plan;

/// <summary>What a run is asked to do, defaults filled in: the meaning of the command line, not its text.</summary>
public sealed record RunParameters
{
    /// <summary>Inputs as typed.</summary>
    public required IReadOnlyList<string> Inputs { get; init; }

    /// <summary>Globs, relative to each folder INPUT, of files to take; empty: all.</summary>
    public IReadOnlyList<string> Include { get; init; } = [];

    /// <summary>Globs of files to leave.</summary>
    public IReadOnlyList<string> Exclude { get; init; } = [];

    /// <summary>Highest context order, 0 and up.</summary>
    public int HighestOrder { get; init; } = 2;

    /// <summary>Longest symbol block, 1 and up; 1: none.</summary>
    public int LongestBlock { get; init; } = 3;

    /// <summary>Code length limits in bits, ascending and distinct.</summary>
    public IReadOnlyList<int> LengthLimits { get; init; } = [11, 12, 15];

    /// <summary>True when <see cref="LengthLimits"/> were asked for by the user: those that cannot be met are then recorded.</summary>
    public bool LengthLimitsAsked { get; init; }

    /// <summary>Radices beside 2, 3 to 16.</summary>
    public IReadOnlyList<int> Radices { get; init; } = [];

    /// <summary>Views, in the order asked for; the first one carries the totals.</summary>
    public IReadOnlyList<string> Views { get; init; } = [ViewNames.Bytes];

    /// <summary>Starting segment size in bytes, a power of two from 4 KiB; null: by size of source.</summary>
    public long? SegmentBytes { get; init; }

    /// <summary>Seed of every drawn sample.</summary>
    public long Seed { get; init; } = 1;

    /// <summary>Read gzip and Zstandard files as what they hold.</summary>
    public bool Inside { get; init; }

    /// <summary>Greatest ratio of decompressed to compressed bytes.</summary>
    public long InsideRatio { get; init; } = 1000;

    /// <summary>Greatest decompressed size in bytes.</summary>
    public long InsideBytes { get; init; } = 64L << 30;

    /// <summary>Take SHA-256 digests of what is read.</summary>
    public bool Digest { get; init; } = true;

    /// <summary>Keep the counts for <c>tallies.parquet</c>.</summary>
    public bool KeepTallies { get; init; }

    /// <summary>Counting threads, at least 1.</summary>
    public int Threads { get; init; } = Environment.ProcessorCount;

    /// <summary>Bytes the process plans to hold at most; null: the default of <see cref="MemoryPlan"/>.</summary>
    public long? MemoryBytes { get; init; }
}

/// <summary>The names of the views that exist.</summary>
public static class ViewNames
{
    /// <summary>Bytes as they stand.</summary>
    public const string Bytes = "bytes";

    /// <summary>Half bytes, high then low.</summary>
    public const string Nibbles = "nibbles";

    /// <summary>Bits, most significant first.</summary>
    public const string Bits = "bits";

    /// <summary>16-bit words, low byte first.</summary>
    public const string WordsLittleEndian = "words-le";

    /// <summary>16-bit words, high byte first.</summary>
    public const string WordsBigEndian = "words-be";

    /// <summary>All of them, in the order they are listed to a user.</summary>
    public static IReadOnlyList<string> All { get; } = [Bytes, Nibbles, Bits, WordsLittleEndian, WordsBigEndian];
}
