namespace Tallybound.Sources.Native;

/// <summary>What kind of thing a path names.</summary>
internal enum FileType
{
    Regular,
    Folder,
    Link,
    Pipe,
    Socket,
    CharacterDevice,
    BlockDevice,
    Other,
}

/// <summary>What the system says of a path.</summary>
/// <param name="Type">What it is.</param>
/// <param name="Bytes">Its size.</param>
/// <param name="ModifiedUtc">Time of its last change; null where the file system holds a time that no calendar here reaches.</param>
/// <param name="Device">Device number.</param>
/// <param name="Inode">Inode number; 0: unknown.</param>
internal readonly record struct FileFacts(FileType Type, long Bytes, DateTime? ModifiedUtc, ulong Device, ulong Inode);

/// <summary>Reads types out of the mode of a file (POSIX <c>sys/stat.h</c>; the numbers of Linux and macOS are the same).</summary>
internal static class FileTypes
{
    public static FileType OfMode(ushort mode) => (mode & 0xF000) switch
    {
        0x8000 => FileType.Regular,
        0x4000 => FileType.Folder,
        0xA000 => FileType.Link,
        0x1000 => FileType.Pipe,
        0xC000 => FileType.Socket,
        0x2000 => FileType.CharacterDevice,
        0x6000 => FileType.BlockDevice,
        _ => FileType.Other,
    };
}
