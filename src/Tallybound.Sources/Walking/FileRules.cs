using Microsoft.Extensions.FileSystemGlobbing;

namespace Tallybound.Sources.Walking;

/// <summary>Which files of a folder are taken: the globs of <c>--include</c> and <c>--exclude</c>.</summary>
internal sealed class FileRules
{
    private readonly Matcher? matcher;

    public FileRules(IReadOnlyList<string> include, IReadOnlyList<string> exclude)
    {
        if (include.Count == 0 && exclude.Count == 0) return;
        matcher = new Matcher(StringComparison.Ordinal);
        if (include.Count == 0) matcher.AddInclude("**/*");
        foreach (string glob in include) matcher.AddInclude(glob);
        foreach (string glob in exclude) matcher.AddExclude(glob);
    }

    /// <summary>Whether a file is taken.</summary>
    /// <param name="path">Its path from the folder, with <c>/</c>.</param>
    public bool Takes(string path) => matcher is null || matcher.Match(path).HasMatches;
}
