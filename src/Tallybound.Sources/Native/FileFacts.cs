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
internal readonly record struct FileFacts(FileType Type, long Bytes, DateTime ModifiedUtc, ulong Device, ulong Inode);
