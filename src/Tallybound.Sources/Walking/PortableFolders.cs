using System.Text;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>Folders through the runtime's own calls, for systems other than Linux. Device and inode stay unknown there.</summary>
internal sealed class PortableFolders : IFolderReader
{
    public bool TryLook(ReadOnlySpan<byte> path, out FileFacts facts, out bool missing, out string? trouble)
    {
        (facts, missing, trouble) = (default, false, null);
        try
        {
            string text = Encoding.UTF8.GetString(path);
            FileSystemInfo info = Directory.Exists(text) ? new DirectoryInfo(text) : new FileInfo(text);
            missing = !info.Exists;
            if (missing) return false;
            facts = FactsOf(info, followLink: true);
            return true;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            trouble = ErrorWords.Of(exception);
            return false;
        }
    }

    public string? List(ReadOnlySpan<byte> path, bool followLinks, List<FolderEntry> entries, CancellationToken stop)
    {
        try
        {
            var options = new EnumerationOptions { AttributesToSkip = FileAttributes.None, IgnoreInaccessible = false };
            foreach (FileSystemInfo info in new DirectoryInfo(Encoding.UTF8.GetString(path)).EnumerateFileSystemInfos("*", options))
            {
                stop.ThrowIfCancellationRequested();
                entries.Add(new FolderEntry(Encoding.UTF8.GetBytes(info.Name), FactsOf(info, followLinks), null));
            }
            return null;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            return ErrorWords.Of(exception);
        }
    }

    private static FileFacts FactsOf(FileSystemInfo info, bool followLink)
    {
        FileSystemInfo target = followLink && info.LinkTarget is not null && info.ResolveLinkTarget(returnFinalTarget: true) is { Exists: true } end ? end : info;
        FileType type = target.LinkTarget is not null ? FileType.Link
            : target.Attributes.HasFlag(FileAttributes.Directory) ? FileType.Folder
            : target.Attributes.HasFlag(FileAttributes.Device) ? FileType.CharacterDevice
            : FileType.Regular;
        return new FileFacts(type, target is FileInfo file && type == FileType.Regular ? file.Length : 0, target.LastWriteTimeUtc, 0, 0);
    }
}
