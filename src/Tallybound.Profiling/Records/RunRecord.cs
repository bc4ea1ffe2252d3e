namespace Tallybound.Profiling.Records;

/// <summary>Provenance: how, when and where a run was made. Nothing here is a figure.</summary>
public sealed record RunRecord
{
    /// <summary>False when the run ended before every source had its turn.</summary>
    public required bool Complete { get; init; }

    /// <summary>Why the run ended early; null when it did not.</summary>
    public string? EndedBecause { get; init; }

    /// <summary>The parameters in force, defaults included.</summary>
    public required RunParametersRecord Parameters { get; init; }

    /// <summary>SHA-256 of the frozen plan: sources, sizes, times and every parameter that a figure depends on.</summary>
    public required string PlanDigest { get; init; }

    /// <summary>Start of the run.</summary>
    public required DateTime StartedUtc { get; init; }

    /// <summary>End of the run.</summary>
    public required DateTime FinishedUtc { get; init; }

    /// <summary>The machine.</summary>
    public required MachineRecord Machine { get; init; }
}

/// <summary>The parameters in force, in the words of the command line.</summary>
public sealed record RunParametersRecord
{
    /// <summary>Inputs as typed, escaped as source names are.</summary>
    public required IReadOnlyList<string> Inputs { get; init; }

    /// <summary>Globs of files to take.</summary>
    public required IReadOnlyList<string> Include { get; init; }

    /// <summary>Globs of files to leave.</summary>
    public required IReadOnlyList<string> Exclude { get; init; }

    /// <summary>Highest context order asked for.</summary>
    public required int Order { get; init; }

    /// <summary>Longest symbol block asked for.</summary>
    public required int BlockLength { get; init; }

    /// <summary>Length limits in bits.</summary>
    public required IReadOnlyList<int> LengthLimit { get; init; }

    /// <summary>Radices beside 2.</summary>
    public required IReadOnlyList<int> Radix { get; init; }

    /// <summary>Views.</summary>
    public required IReadOnlyList<string> View { get; init; }

    /// <summary>Segment size asked for in bytes; absent: by size of source.</summary>
    public long? Segment { get; init; }

    /// <summary>Seed of every drawn sample.</summary>
    public required long Seed { get; init; }

    /// <summary>Whether compressed files were read as what they hold.</summary>
    public required bool Inside { get; init; }

    /// <summary>Greatest ratio of decompressed to compressed bytes.</summary>
    public required long InsideRatio { get; init; }

    /// <summary>Greatest decompressed size in bytes.</summary>
    public required long InsideSize { get; init; }

    /// <summary>Whether digests were taken.</summary>
    public required bool Digest { get; init; }

    /// <summary>Counting threads.</summary>
    public required int Threads { get; init; }

    /// <summary>Threads that may hold the large tables at one time; fewer than threads where memory is short.</summary>
    public required int DenseThreads { get; init; }

    /// <summary>Bytes the process plans to hold at most.</summary>
    public required long Memory { get; init; }
}

/// <summary>The machine a run was made on.</summary>
/// <param name="OperatingSystem">Name and version.</param>
/// <param name="Architecture">Of the process.</param>
/// <param name="Processors">Logical processors the process may use.</param>
/// <param name="MemoryBytes">Memory the process may use.</param>
/// <param name="Runtime">Runtime name and version.</param>
public sealed record MachineRecord(string OperatingSystem, string Architecture, int Processors, long MemoryBytes, string Runtime);
