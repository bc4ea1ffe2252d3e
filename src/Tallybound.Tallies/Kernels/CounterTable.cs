using System.Runtime.InteropServices;

namespace Tallybound.Tallies.Kernels;

/// <summary>Counters of 32 bits outside the managed heap, zero when made, in huge pages where the system grants them.</summary>
/// <remarks>Pages that are never written take no memory.</remarks>
internal sealed unsafe partial class CounterTable : IDisposable
{
    private const int HugePage = 2 << 20;
    private const int AdviseHugePages = 14;
    private uint* memory;

    public CounterTable(int counters)
    {
        Length = counters;
        nuint bytes = (nuint)counters * sizeof(uint);
        memory = (uint*)NativeMemory.AllocZeroed(bytes);
        GC.AddMemoryPressure((long)bytes);
        if (OperatingSystem.IsLinux() && bytes >= 2 * HugePage)
        {
            nuint start = ((nuint)memory + HugePage - 1) & ~(nuint)(HugePage - 1);
            // Advice only: where it is refused, the counters are merely slower.
            _ = Advise((void*)start, ((nuint)memory + bytes - start) & ~(nuint)(HugePage - 1), AdviseHugePages);
        }
    }

#pragma warning disable MA0055 // Owns memory outside the managed heap; a tally that is dropped must not leak it.
    ~CounterTable() => Free();
#pragma warning restore MA0055

    /// <summary>Number of counters.</summary>
    public int Length { get; }

    /// <summary>Bytes taken.</summary>
    public long Bytes => (long)Length * sizeof(uint);

    /// <summary>The first counter.</summary>
    public uint* Pointer => memory;

    /// <summary>A stretch of counters.</summary>
    public Span<uint> Slice(int start, int length) => new(memory + start, length);

    public void Dispose()
    {
        Free();
        GC.SuppressFinalize(this);
    }

    private void Free()
    {
        if (memory is null) return;
        NativeMemory.Free(memory);
        memory = null;
        GC.RemoveMemoryPressure(Bytes);
    }

    [LibraryImport("libc", EntryPoint = "madvise")]
    [DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]
    private static partial int Advise(void* start, nuint length, int advice);
}
