using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Run;

/// <summary>What a run left: the records are in the ledger, the whole is here.</summary>
/// <param name="Complete">False when the run was stopped before every source had its turn.</param>
/// <param name="Corpus">The corpus roll-up.</param>
/// <param name="Run">Provenance.</param>
/// <param name="Ledger">The open ledger, from which reports stream; the caller disposes of it.</param>
/// <param name="KeptTallies">The counts themselves, source by source; null unless they were to be kept.</param>
public sealed record RunResult(bool Complete, CorpusProfile Corpus, RunRecord Run, RunLedger Ledger, IEnumerable<TallyRow>? KeptTallies);

/// <summary>Carries a frozen plan through: units, merge, finish, ledger, roll-up.</summary>
public static class ProfileRun
{
    /// <summary>Reads every source of the plan once and returns what was found.</summary>
    /// <param name="plan">The frozen plan.</param>
    /// <param name="folder">Folder that the ledger is made in.</param>
    /// <param name="progress">Counters that the run keeps up to date.</param>
    /// <param name="log">Where events go.</param>
    /// <param name="stop">Stops reading: what was read by then is finished and recorded, and the result is not complete.</param>
    /// <exception cref="IOException">The ledger cannot be written.</exception>
    public static RunResult Execute(RunPlan plan, string folder, RunProgress progress, IRunLog log, CancellationToken stop) =>
        throw new InvalidOperationException("Under construction.");
}
