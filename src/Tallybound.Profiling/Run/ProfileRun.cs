using System.Runtime.InteropServices;
using Tallybound.Profiling.Corpus;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;
using Tallybound.Sources;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>What a run left: the records are in the ledger, the whole is here.</summary>
/// <param name="Complete">False when the run was stopped before every source had its turn.</param>
/// <param name="Corpus">The corpus roll-up.</param>
/// <param name="Findings">What the figures say of the whole, by bytes at stake; empty when no rule fires.</param>
/// <param name="Run">Provenance.</param>
/// <param name="Ledger">The open ledger, from which reports stream; the caller disposes of it.</param>
/// <param name="KeptTallies">The counts themselves, source by source, to be read once; null unless they were to be kept.</param>
public sealed record RunResult(bool Complete, CorpusProfile Corpus, IReadOnlyList<Finding> Findings, RunRecord Run, RunLedger Ledger, IEnumerable<TallyRow>? KeptTallies);

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
    public static RunResult Execute(RunPlan plan, string folder, RunProgress progress, IRunLog log, CancellationToken stop)
    {
        DateTime started = DateTime.UtcNow;
        Announce(plan, progress);
        RunLedger ledger = RunLedger.Create(Path.Combine(folder, "ledger.sqlite"), [new("digest", plan.Digest)], plan.ForLedger());
        try
        {
            var corpus = new CorpusBuilder();
            TallyKeeper? keeper = plan.Parameters.KeepTallies ? new TallyKeeper(plan, folder) : null;
            var records = new RecordKeeper(ledger, corpus, log);
            records.KeepDecided(plan);
            Work(plan, progress, keeper, records, stop);
            ledger.Settle();
            bool complete = !records.AnyStopped;
            CorpusProfile whole = corpus.Finish(ledger, plan.ExcludedByRule);
            return new RunResult(complete, whole, corpus.Findings(whole), Provenance(plan, started, complete), ledger, keeper?.Rows());
        }
        catch
        {
            ledger.Dispose();
            throw;
        }
    }

    private static void Work(RunPlan plan, RunProgress progress, TallyKeeper? keeper, RecordKeeper records, CancellationToken stop)
    {
        var queue = new UnitQueue(plan);
        var drawn = new DrawnSources(plan);
        RunParameters parameters = plan.Parameters;
        using var pool = new TallyPool(Math.Max(1, plan.Memory.DenseThreads), () => TallyChoice.Create(ViewNames.Bytes, parameters.HighestOrder, parameters.LongestBlock, null));
        using var giveUp = CancellationTokenSource.CreateLinkedTokenSource(stop);
        Exception? failure = null;
        Thread[] threads = [.. Enumerable.Range(0, plan.Memory.WorkerThreads).Select(number => new Thread(() =>
        {
            try
            {
                new Worker(number, plan, queue, pool, drawn, keeper, progress, records.Keep).Run(giveUp.Token);
            }
#pragma warning disable CA1031 // Carried to the thread that waits, and thrown there.
            catch (Exception exception)
#pragma warning restore CA1031
            {
                Interlocked.CompareExchange(ref failure, exception, null);
                giveUp.Cancel();
            }
        })
        { Name = "count-" + number.ToString(System.Globalization.CultureInfo.InvariantCulture), IsBackground = true })];
        foreach (Thread thread in threads) thread.Start();
        foreach (Thread thread in threads) thread.Join();
        if (failure is not null) System.Runtime.ExceptionServices.ExceptionDispatchInfo.Throw(failure);
    }

    private static void Announce(RunPlan plan, RunProgress progress)
    {
        progress.BytesPlanned = plan.Entries.Sum(entry => entry.Found?.Bytes ?? 0);
        progress.SourcesPlanned = plan.Entries.LongCount(entry => entry.Found is not null);
        progress.HasStream = plan.Entries.Any(entry => entry.Found is { Bytes: null });
    }

    private static RunRecord Provenance(RunPlan plan, DateTime started, bool complete) => new()
    {
        Complete = complete,
        EndedBecause = complete ? null : RunEnd.ByUser,
        Parameters = ParametersRecord(plan),
        PlanDigest = plan.Digest,
        StartedUtc = started,
        FinishedUtc = DateTime.UtcNow,
        Machine = new MachineRecord(RuntimeInformation.OSDescription, RuntimeInformation.ProcessArchitecture.ToString().ToLowerInvariant(), Environment.ProcessorCount,
            GC.GetGCMemoryInfo().TotalAvailableMemoryBytes, RuntimeInformation.FrameworkDescription),
    };

    private static RunParametersRecord ParametersRecord(RunPlan plan)
    {
        RunParameters parameters = plan.Parameters;
        return new RunParametersRecord
        {
            Inputs = RawArguments.NamesOf(parameters.Inputs),
            Include = parameters.Include,
            Exclude = parameters.Exclude,
            Order = parameters.HighestOrder,
            BlockLength = parameters.LongestBlock,
            LengthLimit = parameters.LengthLimits,
            Radix = parameters.Radices,
            View = parameters.Views,
            Segment = parameters.SegmentBytes,
            Seed = parameters.Seed,
            Inside = parameters.Inside,
            InsideRatio = parameters.InsideRatio,
            InsideSize = parameters.InsideBytes,
            Digest = parameters.Digest,
            Threads = plan.Memory.WorkerThreads,
            DenseThreads = plan.Memory.DenseThreads,
            Memory = plan.Memory.LimitBytes,
        };
    }
}
