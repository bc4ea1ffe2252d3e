using System.Runtime.InteropServices;

[assembly: DefaultDllImportSearchPaths(DllImportSearchPath.SafeDirectories)]

namespace Tallybound.Sources.Native;

/// <summary>The calls of the C library that paths of bytes need. Linux, 64-bit.</summary>
/// <remarks>Layouts are those of the kernel's <c>statx</c> (the same on every architecture) and of <c>linux_dirent64</c> (getdents64).</remarks>
internal static unsafe partial class LibC
{
    public const int CurrentFolder = -100;
    public const int ReadOnly = 0;
    public const int NonBlocking = 0x800;
    public const int CloseOnExec = 0x80000;
    public const int PathOnly = 0x200000;
    public const int NoFollow = 0x100;
    public const int EmptyPath = 0x1000;
    public const uint BasicFacts = 0x7FF;

    // O_DIRECTORY and O_NOFOLLOW are swapped about on some architectures.
    public static readonly int FolderOnly = RuntimeInformation.ProcessArchitecture is Architecture.Arm64 or Architecture.Arm ? 0x4000 : 0x10000;

    [LibraryImport("libc", EntryPoint = "openat", SetLastError = true)]
    public static partial int OpenAt(int folder, byte* path, int flags);

    [LibraryImport("libc", EntryPoint = "close", SetLastError = true)]
    public static partial int Close(int descriptor);

    [LibraryImport("libc", EntryPoint = "read", SetLastError = true)]
    public static partial nint Read(int descriptor, byte* buffer, nint count);

    [LibraryImport("libc", EntryPoint = "pread", SetLastError = true)]
    public static partial nint ReadAt(int descriptor, byte* buffer, nint count, long offset);

    [LibraryImport("libc", EntryPoint = "statx", SetLastError = true)]
    public static partial int Statx(int folder, byte* path, int flags, uint mask, StatxBuffer* buffer);

    [LibraryImport("libc", EntryPoint = "syscall", SetLastError = true)]
    public static partial nint GetEntries(nint number, nint descriptor, byte* buffer, nint count);

    [LibraryImport("libc", EntryPoint = "poll", SetLastError = true)]
    public static partial int Poll(PollEntry* entries, nuint count, int milliseconds);

    [LibraryImport("libc", EntryPoint = "posix_fadvise")]
    public static partial int Advise(int descriptor, long offset, long length, int advice);

    /// <summary>Number of getdents64.</summary>
    public static nint GetEntriesCall => RuntimeInformation.ProcessArchitecture == Architecture.X64 ? 217 : 61;

    [StructLayout(LayoutKind.Explicit, Size = 256)]
    public struct StatxBuffer
    {
        [FieldOffset(28)] public ushort Mode;
        [FieldOffset(32)] public ulong Inode;
        [FieldOffset(40)] public ulong Size;
        [FieldOffset(112)] public long ModifiedSeconds;
        [FieldOffset(120)] public uint ModifiedNanoseconds;
        [FieldOffset(136)] public uint DeviceMajor;
        [FieldOffset(140)] public uint DeviceMinor;
    }

    [StructLayout(LayoutKind.Sequential)]
    public struct PollEntry
    {
        public int Descriptor;
        public short Events;
        public short Returned;
    }
}
