using System.Numerics;

namespace Tallybound.Profiling.Plan;

/// <summary>Bytes of a segment, the unit of statistics along a source.</summary>
public static class SegmentSize
{
    /// <summary>The least segment.</summary>
    public const long LeastBytes = 4096;

    /// <summary>Segments a source is cut into at most.</summary>
    public const int MostSegments = 1024;

    /// <summary>Segments at most where the user chose the starting size.</summary>
    public const int MostSegmentsAsked = 65536;

    /// <summary>The segment size of a source: the smallest power of two from the starting size up that keeps within the number of segments.</summary>
    /// <param name="bytes">Length of the source, at least 0.</param>
    /// <param name="asked">Starting size that the user chose, a power of two from 4 KiB; null: none.</param>
    public static long For(long bytes, long? asked)
    {
        long most = asked is null ? MostSegments : MostSegmentsAsked;
        long needed = (bytes + most - 1) / most;
        long least = asked ?? LeastBytes;
        return needed <= least ? least : (long)BitOperations.RoundUpToPowerOf2((ulong)needed);
    }
}
