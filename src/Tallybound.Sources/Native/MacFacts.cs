using System.Runtime.InteropServices;
using System.Text;

namespace Tallybound.Sources.Native;

/// <summary>What the runtime does not tell of a path of macOS: whether it is a pipe, a socket or a device, and which file it is.</summary>
/// <remarks>The layout is that of <c>struct stat</c> with 64-bit inodes (stat(2)), the only one that 64-bit ARM has.</remarks>
internal static unsafe partial class MacFacts
{
    /// <summary>Whether this system has that layout.</summary>
    public static bool Serve => OperatingSystem.IsMacOS() && RuntimeInformation.ProcessArchitecture == Architecture.Arm64;

    /// <summary>Type, device and inode of a path whose last link is not followed; false where the system does not tell.</summary>
    public static bool TryLook(string path, out FileType type, out ulong device, out ulong inode)
    {
        byte[] zeroed = Encoding.UTF8.GetBytes(path + '\0');
        StatBuffer buffer;
        fixed (byte* start = zeroed)
        {
            bool told = LStat(start, &buffer) == 0;
            type = told ? FileTypes.OfMode(buffer.Mode) : FileType.Other;
            (device, inode) = told ? ((uint)buffer.Device, buffer.Inode) : (0, 0);
            return told;
        }
    }

    [LibraryImport("libc", EntryPoint = "lstat")]
    private static partial int LStat(byte* path, StatBuffer* buffer);

    [StructLayout(LayoutKind.Explicit, Size = 144)]
    private struct StatBuffer
    {
        [FieldOffset(0)] public int Device;
        [FieldOffset(4)] public ushort Mode;
        [FieldOffset(8)] public ulong Inode;
    }
}
