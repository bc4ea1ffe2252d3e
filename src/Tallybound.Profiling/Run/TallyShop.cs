using Tallybound.Profiling.Plan;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>Where one worker gets tallies from: large ones from the pool of the run, those for small sources from its own shelf.</summary>
internal sealed class TallyShop(RunPlan plan, TallyPool pool)
{
    private readonly Dictionary<(string View, bool Small), ISymbolTally> shelf = [];

    /// <summary>Said of a source whose order 2 and blocks of 3 were left out for want of memory.</summary>
    public const string LeftOutNote = "counted to order 1 and blocks of 2: order 2 and blocks of 3 need at least 600 MiB (--memory)";

    /// <summary>Whether memory is too short for a source's large tables.</summary>
    public bool LeavesOut(SourceWork source) => plan.Memory.DenseThreads == 0 && plan.Parameters.Views.Any(view => NeedsDense(view, source));

    /// <summary>Empty tallies for every view of a source.</summary>
    public SourcePart MakePart(SourceWork source)
    {
        RunParameters parameters = plan.Parameters;
        int most = parameters.SegmentBytes is null ? SegmentSize.MostSegments : SegmentSize.MostSegmentsAsked;
        return new SourcePart([.. parameters.Views.Select(view => Make(view, source))], new SegmentTally(source.SegmentBytes, most));
    }

    /// <summary>Takes tallies back.</summary>
    public void GiveBack(SourcePart part)
    {
        foreach (ISymbolTally tally in part.Tallies)
        {
            if (tally is ByteTally { IsLarge: true }) pool.Return(tally);
            else if (shelf.ContainsValue(tally)) tally.Clear();
            else (tally as IDisposable)?.Dispose();
        }
    }

    private ISymbolTally Make(string view, SourceWork source)
    {
        (int order, int block) = (plan.Parameters.HighestOrder, plan.Parameters.LongestBlock);
        if (NeedsDense(view, source)) return plan.Memory.DenseThreads > 0 ? pool.Rent() : TallyChoice.Create(view, Math.Min(order, 1), Math.Min(block, 2), null);
        if (source.Units.Count > 1 || source.Bytes is null) return TallyChoice.Create(view, order, block, source.Bytes);
        (string, bool) key = (view, source.Bytes <= TallyChoice.SparseAtMostBytes);
        if (shelf.TryGetValue(key, out ISymbolTally? tally)) return tally;
        tally = TallyChoice.Create(view, order, block, source.Bytes);
        shelf.Add(key, tally);
        return tally;
    }

    private bool NeedsDense(string view, SourceWork source) => TallyChoice.NeedsDense(view, plan.Parameters.HighestOrder, plan.Parameters.LongestBlock, source.Bytes);
}
