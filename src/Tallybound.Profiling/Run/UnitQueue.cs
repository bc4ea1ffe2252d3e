using Tallybound.Profiling.Plan;

namespace Tallybound.Profiling.Run;

/// <summary>Hands out the units of a plan: those that need large tables to workers that may hold one, the rest to anyone.</summary>
/// <remarks>The units of one source are handed out one after the other, so that its workers finish it together.</remarks>
internal sealed class UnitQueue
{
    private readonly Lock gate = new();
    private readonly Queue<SourceWork> large = new();
    private readonly Queue<(int Id, PlanEntry Entry)> small = new();
    private readonly RunParameters parameters;
    private readonly int denseThreads;
    private SourceWork? current;
    private int nextUnit;

    public UnitQueue(RunPlan plan)
    {
        parameters = plan.Parameters;
        denseThreads = Math.Max(1, plan.Memory.DenseThreads);
        for (int id = 0; id < plan.Entries.Count; id++)
        {
            PlanEntry entry = plan.Entries[id];
            if (entry.Found is not { } found) continue;
            // Streams come last: they may keep a worker waiting.
            if (found.Bytes is { } bytes && NeedsMore(bytes)) large.Enqueue(new SourceWork(id, entry, parameters));
            else if (found.Bytes is not null) small.Enqueue((id, entry));
        }
        for (int id = 0; id < plan.Entries.Count; id++)
            if (plan.Entries[id].Found is { Bytes: null }) large.Enqueue(new SourceWork(id, plan.Entries[id], parameters));
    }

    /// <summary>The next unit for a worker; null when there is none for it.</summary>
    public (SourceWork Source, WorkUnit Unit)? Take(int worker)
    {
        lock (gate)
        {
            if (worker < denseThreads)
            {
                if (current is null && large.TryDequeue(out current)) nextUnit = 0;
                if (current is { } source)
                {
                    WorkUnit unit = source.Units[nextUnit++];
                    if (nextUnit == source.Units.Count) current = null;
                    return (source, unit);
                }
            }
            if (!small.TryDequeue(out (int Id, PlanEntry Entry) next)) return null;
            var work = new SourceWork(next.Id, next.Entry, parameters);
            return (work, work.Units[0]);
        }
    }

    private bool NeedsMore(long bytes) =>
        bytes > WorkUnit.UnitBytes || parameters.Views.Any(view => Tallies.TallyChoice.NeedsDense(view, parameters.HighestOrder, parameters.LongestBlock, bytes));
}
