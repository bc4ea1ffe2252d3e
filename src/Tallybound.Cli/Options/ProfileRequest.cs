using Tallybound.Profiling.Plan;

namespace Tallybound.Cli.Options;

/// <summary>What a <c>profile</c> command line means.</summary>
/// <param name="Parameters">What the run is asked to do.</param>
/// <param name="OutputFolder">The folder of <c>--out</c>; null: <c>reports/NAME</c> after the first input.</param>
/// <param name="Quiet">No progress and no log on standard error.</param>
/// <param name="JsonLog">Log lines are JSON objects.</param>
internal sealed record ProfileRequest(RunParameters Parameters, string? OutputFolder, bool Quiet, bool JsonLog) : Request;
