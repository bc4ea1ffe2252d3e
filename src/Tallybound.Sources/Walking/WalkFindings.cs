using Tallybound.Sources.Names;

namespace Tallybound.Sources.Walking;

/// <summary>What a walk came upon, before it is put in order and told apart.</summary>
internal sealed class WalkFindings
{
    private readonly List<FoundSource> found = [];
    private readonly List<SkippedSource> skipped = [];
    private readonly List<FailedSource> failed = [];

    /// <summary>Files kept out by the globs.</summary>
    public long Excluded { get; set; }

    public void Add(FoundSource source) => found.Add(source);

    public void AddSkipped(string name, string reason) => skipped.Add(new SkippedSource(name, reason));

    public void AddFailed(string name, string reason) => failed.Add(new FailedSource(name, reason));

    /// <summary>
    /// Orders the lists, turns a file's further names into skipped records, and makes names unique. What was reached twice
    /// under one and the same name (an input typed twice, an input inside another) is one thing and stands once.
    /// </summary>
    public WalkResult Settle()
    {
        found.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        List<FoundSource> sources = OnePerFile();
        List<SkippedSource> left = [.. skipped.Distinct()];
        List<FailedSource> unreached = [.. failed.Distinct()];
        var names = new UniqueNames();
        for (int i = 0; i < sources.Count; i++) sources[i] = names.Take(sources[i].Name) is var name && name == sources[i].Name ? sources[i] : sources[i] with { Name = name };
        left.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        for (int i = 0; i < left.Count; i++) left[i] = left[i] with { Name = names.Take(left[i].Name) };
        unreached.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        for (int i = 0; i < unreached.Count; i++) unreached[i] = unreached[i] with { Name = names.Take(unreached[i].Name) };
        if (names.Changed)
        {
            sources.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
            left.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
            unreached.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        }
        return new WalkResult(sources, left, unreached, Excluded);
    }

    private List<FoundSource> OnePerFile()
    {
        var first = new Dictionary<(ulong Device, ulong Inode), string>(found.Count);
        var sources = new List<FoundSource>(found.Count);
        bool standardInput = false;
        foreach (FoundSource source in found)
        {
            string? known = null;
            if (source.Path.IsStandardInput)
            {
                if (standardInput) continue;
                standardInput = true;
            }
            else if (source.Inode != 0 && !first.TryAdd((source.Device, source.Inode), source.Name))
            {
                known = first[(source.Device, source.Inode)];
            }
            if (known is null) sources.Add(source);
            else if (known != source.Name) AddSkipped(source.Name, $"another name of {known}");
        }
        return sources;
    }
}
