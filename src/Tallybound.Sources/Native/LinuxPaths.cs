using System.Runtime.InteropServices;

namespace Tallybound.Sources.Native;

/// <summary>Opens and looks at paths of bytes, of any length.</summary>
internal static unsafe class LinuxPaths
{
    /// <summary>A longer path is opened folder by folder.</summary>
    private const int LongestDirect = 4000;

    /// <summary>Whether this system is one whose calls these are.</summary>
    public static bool Serve => OperatingSystem.IsLinux() && Environment.Is64BitProcess;

    /// <summary>Opens a path; answers a descriptor, or −1 and the error.</summary>
    public static int Open(ReadOnlySpan<byte> path, int flags, out int error)
    {
        int folder = LibC.CurrentFolder;
        bool owned = false;
        while (path.Length > LongestDirect)
        {
            int cut = path[..LongestDirect].LastIndexOf((byte)'/');
            if (cut <= 0) break;
            int next = OpenAt(folder, path[..cut], LibC.PathOnly | LibC.FolderOnly | LibC.CloseOnExec, out error);
            if (owned) _ = LibC.Close(folder);
            if (next < 0) return -1;
            (folder, owned) = (next, true);
            path = path[(cut + 1)..];
        }
        int descriptor = OpenAt(folder, path, flags, out error);
        if (owned) _ = LibC.Close(folder);
        return descriptor;
    }

    /// <summary>Opens a name in a folder.</summary>
    public static int OpenAt(int folder, ReadOnlySpan<byte> name, int flags, out int error)
    {
        Span<byte> zeroed = name.Length < 512 ? stackalloc byte[name.Length + 1] : new byte[name.Length + 1];
        name.CopyTo(zeroed);
        zeroed[^1] = 0;
        fixed (byte* path = zeroed)
        {
            int descriptor = LibC.OpenAt(folder, path, flags | LibC.CloseOnExec);
            error = descriptor < 0 ? Marshal.GetLastPInvokeError() : 0;
            return descriptor;
        }
    }

    /// <summary>Looks at a name in a folder; false and the error where that fails.</summary>
    public static bool TryLook(int folder, ReadOnlySpan<byte> name, bool followLink, out FileFacts facts, out int error)
    {
        Span<byte> zeroed = name.Length < 512 ? stackalloc byte[name.Length + 1] : new byte[name.Length + 1];
        name.CopyTo(zeroed);
        zeroed[^1] = 0;
        LibC.StatxBuffer buffer;
        fixed (byte* path = zeroed)
        {
            int flags = (followLink ? 0 : LibC.NoFollow) | (name.IsEmpty ? LibC.EmptyPath : 0);
            if (LibC.Statx(folder, path, flags, LibC.BasicFacts, &buffer) != 0)
            {
                error = Marshal.GetLastPInvokeError();
                facts = default;
                return false;
            }
        }
        error = 0;
        facts = new FileFacts(FileTypes.OfMode(buffer.Mode), (long)buffer.Size,
            TimeOf(buffer.ModifiedSeconds, buffer.ModifiedNanoseconds), ((ulong)buffer.DeviceMajor << 32) | buffer.DeviceMinor, buffer.Inode);
        return true;
    }

    /// <summary>Looks at an open descriptor.</summary>
    public static bool TryLook(int descriptor, out FileFacts facts) => TryLook(descriptor, [], followLink: true, out facts, out _);

    /// <summary>Looks at a path of any length, links followed.</summary>
    public static bool TryLookAlong(ReadOnlySpan<byte> path, out FileFacts facts, out int error)
    {
        if (path.Length <= LongestDirect) return TryLook(LibC.CurrentFolder, path, followLink: true, out facts, out error);
        facts = default;
        int descriptor = Open(path, LibC.PathOnly, out error);
        if (descriptor < 0) return false;
        bool looked = TryLook(descriptor, [], followLink: true, out facts, out error);
        _ = LibC.Close(descriptor);
        return looked;
    }

    /// <summary>A file's time is whatever somebody set; file systems hold years that <see cref="DateTime"/> does not.</summary>
    private static DateTime? TimeOf(long seconds, uint nanoseconds) =>
        seconds is >= -62_135_596_800 and < 253_402_300_800 ? DateTime.UnixEpoch.AddSeconds(seconds).AddTicks(nanoseconds / 100) : null;
}
