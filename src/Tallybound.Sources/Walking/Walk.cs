using Tallybound.Sources.Members;
using Tallybound.Sources.Names;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>One walk over all inputs.</summary>
/// <param name="request">What to look for.</param>
/// <param name="folders">How this system lists folders.</param>
/// <param name="stop">Ends the walk.</param>
internal sealed class Walk(SourceRequest request, IFolderReader folders, CancellationToken stop)
{
    private readonly FileRules rules = new(request.Include, request.Exclude);
    private readonly WalkFindings findings = new();
    private readonly List<FolderEntry> entries = [];

    public WalkResult Run()
    {
        IReadOnlyList<byte[]> paths = RawArguments.BytesOf(request.Inputs);
        var inputs = new List<(FileFacts Facts, string? Trouble)>(paths.Count);
        for (int i = 0; i < paths.Count; i++) inputs.Add(LookAtInput(request.Inputs[i], paths[i]));
        for (int i = 0; i < paths.Count; i++) TakeInput(request.Inputs[i], paths[i], inputs[i].Facts, inputs[i].Trouble);
        return findings.Settle();
    }

    private (FileFacts Facts, string? Trouble) LookAtInput(string input, byte[] path)
    {
        if (input == "-") return (default, null);
        if (input.Length == 0) throw new InputNotFoundException(input);
        if (folders.TryLook(path, out FileFacts facts, out bool missing, out string? trouble)) return (facts, null);
        return missing ? throw new InputNotFoundException(input) : (default, trouble);
    }

    private void TakeInput(string input, byte[] path, FileFacts facts, string? trouble)
    {
        if (input == "-")
        {
            findings.Add(new FoundSource("stdin", SourceKind.Stream, SourcePath.StandardInput, null, null, 0, 0));
            return;
        }
        bool several = request.Inputs.Count > 1;
        string typed = NameBytes.ToName(path.AsSpan().TrimEnd((byte)'/') is { Length: > 0 } trimmed ? trimmed : path.AsSpan(0, 1));
        string name = several ? typed : typed[(typed.LastIndexOf('/') + 1)..];
        if (name.Length == 0) name = typed;
        if (trouble is not null) findings.AddFailed(name, trouble);
        else if (facts.Type == FileType.Folder) WalkFolder(path, !several ? "" : typed.EndsWith('/') ? typed : typed + "/", facts, name);
        else if (facts.Type == FileType.Regular) AddFile(name, path, facts);
        else if (facts.Type is FileType.Pipe or FileType.CharacterDevice or FileType.BlockDevice)
            findings.Add(new FoundSource(name, SourceKind.Stream, new SourcePath(path), null, null, facts.Device, facts.Inode));
        else findings.AddFailed(name, "it is a socket; read it with a program of its own and pipe the bytes in");
    }

    /// <summary>Folders wait in a list and are opened one at a time, so that depth costs neither stack nor descriptors.</summary>
    private void WalkFolder(byte[] root, string prefix, FileFacts rootFacts, string rootName)
    {
        // Per input: globs are told from each input's own folder, so what one input left out another may take.
        var walked = new Dictionary<(ulong Device, ulong Inode), string> { [(rootFacts.Device, rootFacts.Inode)] = rootName };
        var waiting = new Stack<(byte[] Path, byte[] Relative)>();
        var inside = new List<byte[]>();
        waiting.Push((root, []));
        while (waiting.TryPop(out (byte[] Path, byte[] Relative) folder))
        {
            entries.Clear();
            if (folders.List(folder.Path, request.FollowLinks, entries, stop) is { } trouble)
                findings.AddFailed(folder.Relative.Length == 0 ? rootName : prefix + NameBytes.ToName(folder.Relative), "the folder cannot be listed: " + trouble);
            inside.Clear();
            foreach (FolderEntry entry in entries)
            {
                if (entry.Facts is { Type: FileType.Folder } facts && IsNew(facts, folder.Relative, entry.Name)) inside.Add(entry.Name);
                else if (entry.Facts is not { Type: FileType.Folder }) TakeEntry(entry, prefix, Join(folder.Relative, entry.Name), folder.Path);
            }
            // The last one pushed is walked first.
            inside.Sort(FolderOrder.Instance);
            for (int i = inside.Count - 1; i >= 0; i--) waiting.Push((Join(folder.Path, inside[i]), Join(folder.Relative, inside[i])));
        }

        bool IsNew(FileFacts facts, byte[] parent, byte[] name)
        {
            if (facts.Inode == 0) return true;
            string full = prefix + NameBytes.ToName(Join(parent, name));
            if (walked.TryAdd((facts.Device, facts.Inode), full)) return true;
            findings.AddSkipped(full, $"another name of the folder {walked[(facts.Device, facts.Inode)]}");
            return false;
        }
    }

    private void TakeEntry(FolderEntry entry, string prefix, byte[] relative, byte[] folder)
    {
        string name = prefix + NameBytes.ToName(relative);
        if (entry.Facts is not { } facts) findings.AddFailed(name, entry.Trouble!);
        else if (!rules.Takes(relative)) findings.Excluded++;
        else if (facts.Type == FileType.Regular) AddFile(name, Join(folder, entry.Name), facts);
        else findings.AddSkipped(name, ReasonToSkip(facts.Type));
    }

    private string ReasonToSkip(FileType type) => type switch
    {
        FileType.Link => request.FollowLinks ? "a symbolic link that leads nowhere" : "a symbolic link; links are not followed in a folder",
        FileType.Pipe => "a named pipe; name it as INPUT to read it",
        FileType.Socket => "a socket",
        FileType.CharacterDevice or FileType.BlockDevice => "a device; name it as INPUT to read it",
        _ => "neither a file nor a folder",
    };

    private void AddFile(string name, byte[] path, FileFacts facts)
    {
        var sourcePath = new SourcePath(path);
        bool member = request.Inside && MemberFormat.Of(sourcePath) is not null;
        findings.Add(new FoundSource(name, member ? SourceKind.Member : SourceKind.File, sourcePath, member ? null : facts.Bytes, facts.ModifiedUtc, facts.Device, facts.Inode));
    }

    private static byte[] Join(byte[] folder, byte[] name) =>
        folder.Length == 0 ? name : folder[^1] == (byte)'/' ? [.. folder, .. name] : [.. folder, (byte)'/', .. name];
}
