using Tallybound.Profiling.Finishing;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Run;

/// <summary>One counting thread: takes units, counts them, and finishes a source when its last unit is in.</summary>
internal sealed class Worker(int number, RunPlan plan, UnitQueue queue, TallyPool pool, DrawnSources drawn, TallyKeeper? keeper, RunProgress progress, Action<int, SourceProfile, DrawingCounts?> keep)
{
    private readonly UnitCounter counter = new(plan.Parameters, progress);
    private readonly SourceFinisher finisher = new(plan.Parameters);
    private readonly TallyShop shop = new(plan, pool);

    /// <summary>Works until nothing is left; once stopped, what is left is noted as not reached.</summary>
    public void Run(CancellationToken stop)
    {
        while (queue.Take(number) is { } next)
        {
            progress.Begin(next.Source.Entry.Name);
            UnitCounter.Outcome outcome = stop.IsCancellationRequested
                ? new UnitCounter.Outcome(0, [], RunEnd.Stopped)
                : counter.Count(next.Source, next.Unit, () => next.Source.PartOf(number, () => shop.MakePart(next.Source)), stop);
            if (next.Source.Complete(next.Unit, outcome.Bytes, outcome.Digests, outcome.Trouble)) Finish(next.Source);
        }
    }

    private void Finish(SourceWork source)
    {
        SourcePart? part = source.Merged(number, shop.GiveBack);
        try
        {
            if (part is not null) keeper?.Keep(source.Id, part);
            (SourceProfile profile, DrawingCounts? drawing) = finisher.Finish(
                source, part, shop.LeavesOut(source) ? TallyShop.LeftOutNote : null, drawn.MayHavePage(source.Id, source.Entry), drawn.MayHavePairs(source.Id, source.Entry));
            keep(source.Id, profile, drawing);
        }
        finally
        {
            if (part is not null) shop.GiveBack(part);
            source.Dispose();
        }
        progress.AddSource();
    }
}
