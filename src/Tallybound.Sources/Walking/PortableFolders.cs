using System.Text;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>Folders through the runtime's own calls, for systems other than Linux. Device and inode stay unknown there.</summary>
internal sealed class PortableFolders : IFolderReader
{
    public bool TryLook(ReadOnlySpan<byte> path, bool followLink, out FileFacts facts, out bool missing, out string? trouble)
    {
        (facts, missing, trouble) = (default, false, null);
        try
        {
            string text = Encoding.UTF8.GetString(path);
            FileSystemInfo info = Directory.Exists(text) ? new DirectoryInfo(text) : new FileInfo(text);
            missing = !info.Exists;
            if (missing) return false;
            if (followLink && info.ResolveLinkTarget(returnFinalTarget: true) is { } target) info = target;
            facts = FactsOf(info, followLink);
            return true;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            trouble = ErrorWords.Of(exception);
            return false;
        }
    }

    public List<FolderEntry>? List(ReadOnlySpan<byte> path, bool followLinks, out string? trouble)
    {
        try
        {
            var entries = new List<FolderEntry>();
            var options = new EnumerationOptions { AttributesToSkip = FileAttributes.None, IgnoreInaccessible = false };
            foreach (FileSystemInfo info in new DirectoryInfo(Encoding.UTF8.GetString(path)).EnumerateFileSystemInfos("*", options))
                entries.Add(new FolderEntry(Encoding.UTF8.GetBytes(info.Name), FactsOf(info, followLinks), null));
            trouble = null;
            return entries;
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            trouble = ErrorWords.Of(exception);
            return null;
        }
    }

    private static FileFacts FactsOf(FileSystemInfo info, bool followLink)
    {
        FileType type = info.LinkTarget is not null && !followLink ? FileType.Link
            : info.Attributes.HasFlag(FileAttributes.Directory) ? FileType.Folder
            : info.Attributes.HasFlag(FileAttributes.Device) ? FileType.CharacterDevice
            : FileType.Regular;
        return new FileFacts(type, info is FileInfo file ? file.Length : 0, info.LastWriteTimeUtc, 0, 0);
    }
}
