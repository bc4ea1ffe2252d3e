using Tallybound.Profiling.Corpus;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Run;

/// <summary>Takes finished records from every worker: into the ledger, into the roll-up, and into the log where something went wrong.</summary>
internal sealed class RecordKeeper(RunLedger ledger, CorpusBuilder corpus, IRunLog log)
{
    private readonly Lock gate = new();
    private bool anyStopped;

    /// <summary>True when the user's stop cut a source short or kept it from its turn.</summary>
    public bool AnyStopped => Volatile.Read(ref anyStopped);

    /// <summary>Keeps the records that the walk decided.</summary>
    public void KeepDecided(RunPlan plan)
    {
        for (int id = 0; id < plan.Entries.Count; id++)
        {
            PlanEntry entry = plan.Entries[id];
            if (entry.Status is { } status) Keep(id, new SourceProfile { Name = entry.Name, Kind = entry.Kind, Status = status, Reason = entry.Reason }, null);
        }
    }

    /// <summary>Keeps one record.</summary>
    public void Keep(int id, SourceProfile profile, DrawingCounts? drawing)
    {
        ledger.Finish(id, profile, drawing);
        corpus.Add(profile);
        if (profile.Reason is RunEnd.Stopped or RunEnd.NotReached)
        {
            Volatile.Write(ref anyStopped, true);
            if (profile.Reason == RunEnd.NotReached) return;
        }
        if (profile.Status is not SourceStatus.Failed and not SourceStatus.Partial) return;
        lock (gate) log.Write(new RunEvent(RunEventLevel.Warning, profile.Status == SourceStatus.Failed ? "source-failed" : "source-partial", profile.Reason ?? "", profile.Name));
    }
}
