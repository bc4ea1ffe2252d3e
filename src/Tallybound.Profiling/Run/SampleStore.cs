using Tallybound.Profiling.Plan;

namespace Tallybound.Profiling.Run;

/// <summary>The bytes of the sample windows of one source, gathered while it is read.</summary>
/// <remarks>Bytes of one window must come in order and from one thread; different windows may come from different threads.
/// A window that did not come whole is not kept.</remarks>
internal sealed class SampleStore
{
    private readonly Lock gate = new();
    private readonly SamplePlan plan;
    private readonly HashSet<long>? chosen;
    private readonly PriorityQueue<Window, (ulong Rank, long Index)> kept = new(Comparer<(ulong, long)>.Create((a, b) => b.CompareTo(a)));
    private readonly Dictionary<long, Window> filling = [];
    private readonly Stack<byte[]> spare = new();

    /// <summary>A store for a source.</summary>
    /// <param name="plan">The sample plan of the run.</param>
    /// <param name="bytes">Length of the source; null: unknown.</param>
    public SampleStore(SamplePlan plan, long? bytes)
    {
        this.plan = plan;
        chosen = bytes is { } known ? [.. plan.Choose(known)] : null;
    }

    /// <summary>Takes what it needs of bytes that stand at <paramref name="offset"/> of the source.</summary>
    public void Offer(long offset, ReadOnlySpan<byte> bytes)
    {
        while (!bytes.IsEmpty)
        {
            long index = offset / SamplePlan.WindowBytes;
            int within = (int)(offset % SamplePlan.WindowBytes);
            int length = Math.Min(bytes.Length, SamplePlan.WindowBytes - within);
            if (Find(index, within) is { } window) Fill(window, within, bytes[..length]);
            offset += length;
            bytes = bytes[length..];
        }
    }

    /// <summary>The whole windows, ascending by place in the source.</summary>
    public IReadOnlyList<byte[]> Windows()
    {
        lock (gate) return [.. kept.UnorderedItems.Select(item => item.Element).OrderBy(window => window.Index).Select(window => window.Bytes)];
    }

    private Window? Find(long index, int within)
    {
        lock (gate)
        {
            if (filling.TryGetValue(index, out Window? window)) return window;
            if (within != 0 || !Wanted(index)) return null;
            window = new Window(index, spare.TryPop(out byte[]? bytes) ? bytes : new byte[SamplePlan.WindowBytes]);
            filling.Add(index, window);
            return window;
        }
    }

    private bool Wanted(long index)
    {
        if (chosen is not null) return chosen.Contains(index);
        return kept.Count < SamplePlan.MostWindows || (kept.TryPeek(out _, out (ulong Rank, long Index) worst) && (plan.Rank(index), index).CompareTo(worst) < 0);
    }

    private void Fill(Window window, int within, ReadOnlySpan<byte> bytes)
    {
        bytes.CopyTo(window.Bytes.AsSpan(within));
        if (within + bytes.Length < SamplePlan.WindowBytes) return;
        lock (gate)
        {
            filling.Remove(window.Index);
            kept.Enqueue(window, (plan.Rank(window.Index), window.Index));
            // On a stream windows come and go; their memory is used again instead of left to the collector.
            if (kept.Count > SamplePlan.MostWindows) spare.Push(kept.Dequeue().Bytes);
        }
    }

    private sealed record Window(long Index, byte[] Bytes);
}
