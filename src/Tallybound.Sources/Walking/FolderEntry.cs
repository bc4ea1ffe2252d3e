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
    /// <summary>Looks at a path.</summary>
    /// <param name="path">Bytes of the path.</param>
    /// <param name="followLink">Whether a link is followed.</param>
    /// <param name="facts">What is there.</param>
    /// <param name="missing">True where nothing is there.</param>
    /// <param name="trouble">Why it failed, in words; null on success.</param>
    bool TryLook(ReadOnlySpan<byte> path, bool followLink, out FileFacts facts, out bool missing, out string? trouble);

    /// <summary>Lists a folder; null and the trouble where that fails. Entries that vanish while it is read are left out.</summary>
    List<FolderEntry>? List(ReadOnlySpan<byte> path, bool followLinks, out string? trouble);
}
