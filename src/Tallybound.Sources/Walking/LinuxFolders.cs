using System.Runtime.InteropServices;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>Folders of Linux, whose names are bytes.</summary>
internal sealed unsafe class LinuxFolders : IFolderReader
{
    private const int NoSuchEntry = 2;
    private const int NotAFolder = 20;
    private const int LinkLoop = 40;
    private const int RecordHead = 19;
    private readonly byte[] buffer = GC.AllocateUninitializedArray<byte>(1 << 16, pinned: true);

    public bool TryLook(ReadOnlySpan<byte> path, out FileFacts facts, out bool missing, out string? trouble)
    {
        bool found = LinuxPaths.TryLookAlong(path, out facts, out int error);
        missing = !found && error is NoSuchEntry or NotAFolder;
        trouble = found ? null : ErrorWords.Of(error);
        return found;
    }

    public string? List(ReadOnlySpan<byte> path, bool followLinks, List<FolderEntry> entries, CancellationToken stop)
    {
        int folder = LinuxPaths.Open(path, LibC.FolderOnly | LibC.NonBlocking, out int error);
        if (folder < 0) return ErrorWords.Of(error);
        try
        {
            fixed (byte* start = buffer)
            {
                while (true)
                {
                    stop.ThrowIfCancellationRequested();
                    nint filled = LibC.GetEntries(LibC.GetEntriesCall, folder, start, buffer.Length);
                    if (filled == 0) return null;
                    if (filled < 0) return ErrorWords.Of(Marshal.GetLastPInvokeError());
                    Take(folder, start, filled, followLinks, entries);
                }
            }
        }
        finally
        {
            _ = LibC.Close(folder);
        }
    }

    private static void Take(int folder, byte* start, nint filled, bool followLinks, List<FolderEntry> entries)
    {
        for (nint at = 0; at < filled;)
        {
            byte* record = start + at;
            at += *(ushort*)(record + 16);
            ReadOnlySpan<byte> name = MemoryMarshal.CreateReadOnlySpanFromNullTerminated(record + RecordHead);
            if (name.SequenceEqual("."u8) || name.SequenceEqual(".."u8)) continue;
            bool looked = LinuxPaths.TryLook(folder, name, followLink: false, out FileFacts facts, out int error);
            if (!looked && error == NoSuchEntry) continue;
            if (looked && facts.Type == FileType.Link && followLinks)
            {
                looked = LinuxPaths.TryLook(folder, name, followLink: true, out FileFacts target, out error);
                if (looked) facts = target;
                else looked = error is NoSuchEntry or LinkLoop;
            }
            entries.Add(new FolderEntry(name.ToArray(), looked ? facts : null, looked ? null : ErrorWords.Of(error)));
        }
    }
}
