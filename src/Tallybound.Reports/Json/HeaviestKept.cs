namespace Tallybound.Reports.Json;

/// <summary>Keeps the heaviest of many things, equal ones by who came first, in memory of its capacity alone.</summary>
/// <typeparam name="T">What is kept.</typeparam>
/// <param name="capacity">Things kept at most, at least 1.</param>
internal sealed class HeaviestKept<T>(int capacity)
{
    // The queue gives the lightest first, and of equal ones the latest: the one that makes room.
    private readonly PriorityQueue<T, (long Bytes, long Arrival)> queue =
        new(Comparer<(long Bytes, long Arrival)>.Create(static (a, b) => a.Bytes != b.Bytes ? a.Bytes.CompareTo(b.Bytes) : b.Arrival.CompareTo(a.Arrival)));

    private long arrivals;

    /// <summary>Keeps a thing while it is among the heaviest.</summary>
    public void Add(long bytes, T thing)
    {
        (long, long) weight = (bytes, arrivals++);
        if (queue.Count < capacity) queue.Enqueue(thing, weight);
        else queue.EnqueueDequeue(thing, weight);
    }

    /// <summary>What was kept, heaviest first; nothing is kept afterwards.</summary>
    public IReadOnlyList<T> Take()
    {
        var kept = new T[queue.Count];
        for (int i = kept.Length - 1; i >= 0; i--) kept[i] = queue.Dequeue();
        return kept;
    }
}
