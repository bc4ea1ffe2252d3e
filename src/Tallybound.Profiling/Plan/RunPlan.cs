namespace Tallybound.Profiling.Plan;

/// <summary>The frozen plan of a run.</summary>
public sealed record RunPlan
{
    /// <summary>What was asked for.</summary>
    public required RunParameters Parameters { get; init; }

    /// <summary>Lists the sources and freezes the plan.</summary>
    /// <exception cref="FileNotFoundException">An INPUT does not exist.</exception>
    public static RunPlan Freeze(RunParameters parameters, CancellationToken stop) => throw new InvalidOperationException("Under construction.");
}
