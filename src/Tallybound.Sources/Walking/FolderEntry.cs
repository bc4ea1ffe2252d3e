using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>One entry of a folder.</summary>
/// <param name="Name">Its name's bytes.</param>
/// <param name="Facts">What it is; null where it could not be looked at.</param>
/// <param name="Trouble">Why not, in words.</param>
internal readonly record struct FolderEntry(byte[] Name, FileFacts? Facts, string? Trouble);

/// <summary>How a system lists folders and looks at paths.</summary>
internal interface IFolderReader
{
    /// <summary>Looks at a path; links are followed.</summary>
    /// <param name="path">Bytes of the path.</param>
    /// <param name="facts">What is there.</param>
    /// <param name="missing">True where nothing is there.</param>
    /// <param name="trouble">Why it failed, in words; null on success.</param>
    bool TryLook(ReadOnlySpan<byte> path, out FileFacts facts, out bool missing, out string? trouble);

    /// <summary>Lists a folder. Entries that vanish while it is read are left out; a followed link that leads nowhere stays a link.</summary>
    /// <param name="path">Bytes of the folder's path.</param>
    /// <param name="followLinks">Whether an entry that is a link is answered with what it leads to.</param>
    /// <param name="entries">Takes the entries, in the order of the system.</param>
    /// <param name="stop">Ends the listing.</param>
    /// <returns>Why the listing ended early, in words; null where it is whole.</returns>
    string? List(ReadOnlySpan<byte> path, bool followLinks, List<FolderEntry> entries, CancellationToken stop);
}
