namespace Tallybound.Profiling.Plan;

/// <summary>A stretch of one source that one worker reads and counts.</summary>
/// <param name="Source">Id of the source in the plan.</param>
/// <param name="Index">Place among the source's units.</param>
/// <param name="Offset">First byte of the stretch, a multiple of <see cref="UnitBytes"/>.</param>
/// <param name="Length">Bytes; null: to the end of a source of unknown length.</param>
public readonly record struct WorkUnit(int Source, int Index, long Offset, long? Length)
{
    /// <summary>Bytes of a unit: the piece of a digest, a multiple of every fold, window and small segment.</summary>
    public const long UnitBytes = 64L << 20;

    /// <summary>The units of a source of known length, in order; one of length 0 for an empty source, one without length for a stream.</summary>
    public static IEnumerable<WorkUnit> Cut(int source, long? bytes)
    {
        if (bytes is not { } known)
        {
            yield return new WorkUnit(source, 0, 0, null);
            yield break;
        }
        int index = 0;
        for (long offset = 0; offset < known || index == 0; offset += UnitBytes)
            yield return new WorkUnit(source, index++, offset, Math.Min(UnitBytes, known - offset));
    }
}
