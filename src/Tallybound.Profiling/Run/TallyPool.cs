using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>The large tallies of a run: as many as the memory plan allows, made when first needed, used again and again.</summary>
/// <remarks>A worker that waits here holds no large tally that is not yet handed to its source, and the worker that finishes a source needs no
/// second one, so waiting always ends.</remarks>
internal sealed class TallyPool(int most, Func<ISymbolTally> make) : IDisposable
{
    private readonly SemaphoreSlim free = new(most, most);
    private readonly Stack<ISymbolTally> idle = new();

    /// <summary>An empty tally; waits until one is free.</summary>
    public ISymbolTally Rent()
    {
        free.Wait();
        lock (idle)
        {
            if (idle.TryPop(out ISymbolTally? tally)) return tally;
        }
        return make();
    }

    /// <summary>Takes a tally back, emptied.</summary>
    public void Return(ISymbolTally tally)
    {
        tally.Clear();
        lock (idle) idle.Push(tally);
        free.Release();
    }

    /// <summary>Gives the memory back.</summary>
    public void Dispose()
    {
        foreach (ISymbolTally tally in idle) (tally as IDisposable)?.Dispose();
        free.Dispose();
    }
}
