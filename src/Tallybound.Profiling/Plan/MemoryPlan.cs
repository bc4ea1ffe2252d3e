namespace Tallybound.Profiling.Plan;

/// <summary>How many threads may hold the large tables at one time under a memory limit.</summary>
/// <param name="LimitBytes">Bytes the process plans to hold at most.</param>
/// <param name="DenseThreads">Threads that may hold order-2 tables; 0: orders stop at 1 for sources that are not small.</param>
/// <param name="WorkerThreads">Counting threads in all.</param>
public sealed record MemoryPlan(long LimitBytes, int DenseThreads, int WorkerThreads)
{
    /// <summary>What a run holds beside large tables: runtime, buffers, windows, segments.</summary>
    public const long BaseBytes = 300L << 20;

    /// <summary>What one thread with large tables adds: 256 MiB of counters and its buffers.</summary>
    public const long DenseThreadBytes = 300L << 20;

    /// <summary>The least limit that can be kept: a run without large tables.</summary>
    public const long LeastBytes = 192L << 20;

    /// <summary>The default limit: the larger of 600 MiB and a quarter of <paramref name="availableBytes"/>, never above 80 % of it.</summary>
    public static long DefaultLimit(long availableBytes) =>
        Math.Min(Math.Max(600L << 20, availableBytes / 4), availableBytes / 5 * 4);

    /// <summary>Divides a limit among threads.</summary>
    /// <param name="limitBytes">Limit; null: the default for this machine or cgroup.</param>
    /// <param name="threads">Threads asked for, at least 1.</param>
    public static MemoryPlan For(long? limitBytes, int threads)
    {
        long limit = limitBytes ?? DefaultLimit(GC.GetGCMemoryInfo().TotalAvailableMemoryBytes);
        long dense = Math.Clamp((limit - BaseBytes) / DenseThreadBytes, 0, threads);
        int workers = limit < BaseBytes ? 1 : threads;
        return new MemoryPlan(limit, (int)dense, workers);
    }
}
