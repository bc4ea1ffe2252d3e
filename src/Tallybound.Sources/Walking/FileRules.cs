using System.Text;
using Microsoft.Extensions.FileSystemGlobbing;

namespace Tallybound.Sources.Walking;

/// <summary>Which files of a folder are taken: the globs of <c>--include</c> and <c>--exclude</c>.</summary>
internal sealed class FileRules
{
    private readonly Matcher? matcher;

    /// <exception cref="GlobException">A glob cannot be understood.</exception>
    public FileRules(IReadOnlyList<string> include, IReadOnlyList<string> exclude)
    {
        if (include.Count == 0 && exclude.Count == 0) return;
        matcher = new Matcher(StringComparison.Ordinal);
        if (include.Count == 0) matcher.AddInclude("**/*");
        foreach (string glob in include) Add("--include", glob, matcher.AddInclude);
        foreach (string glob in exclude) Add("--exclude", glob, matcher.AddExclude);
    }

    /// <summary>Whether a file is taken.</summary>
    /// <param name="relative">Bytes of its path from the folder, with <c>/</c>; what is not UTF-8 in them is matched as U+FFFD.</param>
    public bool Takes(ReadOnlySpan<byte> relative) => matcher is null || matcher.Match(Encoding.UTF8.GetString(relative)).HasMatches;

    private static void Add(string option, string glob, Func<string, Matcher> add)
    {
        try
        {
            add(glob);
        }
        catch (ArgumentException exception)
        {
            throw new GlobException($"{option} '{DisplayText.Escape(glob)}' is no glob that a path from a folder could match; write it as in '**/*.csv'", exception);
        }
    }
}
