using Tallybound.Sources.Members;
using Tallybound.Sources.Names;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Walking;

/// <summary>One walk over all inputs.</summary>
internal sealed class Walk(SourceRequest request, CancellationToken stop)
{
    private readonly IFolderReader folders = OperatingSystem.IsLinux() && Environment.Is64BitProcess ? new LinuxFolders() : new PortableFolders();
    private readonly FileRules rules = new(request.Include, request.Exclude);
    private readonly HashSet<(ulong Device, ulong Inode)> foldersSeen = [];
    private readonly List<FoundSource> found = [];
    private readonly List<SkippedSource> skipped = [];
    private readonly List<FailedSource> failed = [];
    private long excluded;

    public WalkResult Run()
    {
        var inputs = new List<(byte[] Path, FileFacts Facts, string? Trouble)>();
        foreach (string input in request.Inputs) inputs.Add(LookAtInput(input));
        for (int i = 0; i < inputs.Count; i++) TakeInput(request.Inputs[i], inputs[i].Path, inputs[i].Facts, inputs[i].Trouble);
        return Settle();
    }

    private (byte[] Path, FileFacts Facts, string? Trouble) LookAtInput(string input)
    {
        if (input == "-") return ([], default, null);
        if (input.Length == 0) throw new InputNotFoundException(input);
        byte[] path = RawArguments.BytesOf(input);
        if (folders.TryLook(path, followLink: true, out FileFacts facts, out bool missing, out string? trouble)) return (path, facts, null);
        if (missing) throw new InputNotFoundException(input);
        return (path, default, trouble);
    }

    private void TakeInput(string input, byte[] path, FileFacts facts, string? trouble)
    {
        if (input == "-")
        {
            found.Add(new FoundSource("stdin", SourceKind.Stream, SourcePath.StandardInput, null, null, 0, 0));
            return;
        }
        string typed = NameBytes.ToName(path.AsSpan().TrimEnd((byte)'/') is { Length: > 0 } trimmed ? trimmed : path);
        string name = request.Inputs.Count > 1 ? typed : typed[(typed.LastIndexOf('/') + 1)..];
        if (name.Length == 0) name = typed;
        if (trouble is not null) failed.Add(new FailedSource(name, trouble));
        else if (facts.Type == FileType.Folder) WalkFolder(path, request.Inputs.Count > 1 ? typed + "/" : "", facts, name);
        else if (facts.Type == FileType.Regular) AddFile(name, path, facts);
        else if (facts.Type is FileType.Pipe or FileType.CharacterDevice or FileType.BlockDevice)
            found.Add(new FoundSource(name, SourceKind.Stream, new SourcePath(path), null, null, facts.Device, facts.Inode));
        else failed.Add(new FailedSource(name, "it is a socket; read it with a program of its own and pipe the bytes in"));
    }

    /// <summary>Folders wait in a list and are opened one at a time, so that depth costs neither stack nor descriptors.</summary>
    private void WalkFolder(byte[] root, string prefix, FileFacts rootFacts, string rootName)
    {
        var waiting = new Stack<(byte[] Path, byte[] Relative)>();
        foldersSeen.Add((rootFacts.Device, rootFacts.Inode));
        waiting.Push((root, []));
        while (waiting.TryPop(out (byte[] Path, byte[] Relative) folder))
        {
            stop.ThrowIfCancellationRequested();
            List<FolderEntry>? entries = folders.List(folder.Path, request.FollowLinks, out string? trouble);
            if (entries is null)
            {
                failed.Add(new FailedSource(folder.Relative.Length == 0 ? rootName : prefix + NameBytes.ToName(folder.Relative), "the folder cannot be listed: " + trouble));
                continue;
            }
            foreach (FolderEntry entry in entries)
            {
                byte[] relative = folder.Relative.Length == 0 ? entry.Name : [.. folder.Relative, (byte)'/', .. entry.Name];
                byte[] path = folder.Path[^1] == (byte)'/' ? [.. folder.Path, .. entry.Name] : [.. folder.Path, (byte)'/', .. entry.Name];
                if (TakeEntry(entry, prefix, relative, path)) waiting.Push((path, relative));
            }
        }
    }

    /// <summary>Takes an entry; true where it is a folder to be walked.</summary>
    private bool TakeEntry(FolderEntry entry, string prefix, byte[] relative, byte[] path)
    {
        string inFolder = NameBytes.ToName(relative);
        string name = prefix + inFolder;
        if (entry.Facts is not { } facts)
        {
            failed.Add(new FailedSource(name, entry.Trouble!));
            return false;
        }
        if (facts.Type == FileType.Folder)
        {
            if (facts.Inode == 0 || foldersSeen.Add((facts.Device, facts.Inode))) return true;
            skipped.Add(new SkippedSource(name, "a folder that was walked already under another name"));
            return false;
        }
        if (!rules.Takes(inFolder)) excluded++;
        else if (facts.Type == FileType.Regular) AddFile(name, path, facts);
        else skipped.Add(new SkippedSource(name, ReasonToSkip(facts.Type)));
        return false;
    }

    private static string ReasonToSkip(FileType type) => type switch
    {
        FileType.Link => "a symbolic link; links are not followed in a folder",
        FileType.Pipe => "a named pipe; name it as INPUT to read it",
        FileType.Socket => "a socket",
        FileType.CharacterDevice or FileType.BlockDevice => "a device; name it as INPUT to read it",
        _ => "neither a file nor a folder",
    };

    private void AddFile(string name, byte[] path, FileFacts facts)
    {
        var sourcePath = new SourcePath(path);
        bool member = request.Inside && MemberFormat.Of(sourcePath) is not null;
        found.Add(new FoundSource(name, member ? SourceKind.Member : SourceKind.File, sourcePath, member ? null : facts.Bytes, facts.ModifiedUtc, facts.Device, facts.Inode));
    }

    /// <summary>Orders the lists and turns a file's further names into skipped records.</summary>
    private WalkResult Settle()
    {
        found.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        var first = new Dictionary<(ulong, ulong), string>();
        var sources = new List<FoundSource>(found.Count);
        foreach (FoundSource source in found)
        {
            if (source.Inode != 0 && !first.TryAdd((source.Device, source.Inode), source.Name))
                skipped.Add(new SkippedSource(source.Name, $"another name of {first[(source.Device, source.Inode)]}"));
            else if (source.Path.IsStandardInput && sources.Exists(other => other.Path.IsStandardInput))
                skipped.Add(new SkippedSource(source.Name, "standard input was named already"));
            else sources.Add(source);
        }
        var names = new UniqueNames();
        return new WalkResult(
            sources.ConvertAll(source => source with { Name = names.Take(source.Name) }),
            [.. skipped.OrderBy(source => source.Name, NameOrder.Instance).Select(source => source with { Name = names.Take(source.Name) })],
            [.. failed.OrderBy(source => source.Name, NameOrder.Instance).Select(source => source with { Name = names.Take(source.Name) })],
            excluded);
    }
}
