using System.Text;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>Folders through the runtime's own calls, for systems other than Linux. </summary>
/// <remarks>Where the system does not tell which file a path is (all but macOS), folders are told apart by their full paths, so that loops of links end.</remarks>
internal sealed class PortableFolders : IFolderReader
{
    private readonly Dictionary<string, ulong> folderNumbers = new(StringComparer.Ordinal);

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

    private FileFacts FactsOf(FileSystemInfo info, bool followLink)
    {
        FileSystemInfo target = followLink && info.LinkTarget is not null && info.ResolveLinkTarget(returnFinalTarget: true) is { Exists: true } end ? end : info;
        FileType type = target.LinkTarget is not null ? FileType.Link
            : target.Attributes.HasFlag(FileAttributes.Directory) ? FileType.Folder
            : target.Attributes.HasFlag(FileAttributes.Device) ? FileType.CharacterDevice
            : FileType.Regular;
        ulong device = 0, inode = 0;
        if (MacFacts.Serve && MacFacts.TryLook(target.FullName, out FileType told, out device, out inode)) type = told;
        else if (type == FileType.Folder) inode = NumberOf(target);
        return new FileFacts(type, target is FileInfo file && type == FileType.Regular ? file.Length : 0, target.LastWriteTimeUtc, device, inode);
    }

    private ulong NumberOf(FileSystemInfo folder)
    {
        string path = Path.TrimEndingDirectorySeparator(folder.FullName);
        if (!folderNumbers.TryGetValue(path, out ulong number)) folderNumbers.Add(path, number = (ulong)folderNumbers.Count + 1);
        return number;
    }
}
