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
