using System.Text;

namespace Tallybound.Sources;

/// <summary>What to look for.</summary>
/// <param name="Inputs">Inputs as typed, at least one.</param>
/// <param name="Include">Globs of files to take of each folder, relative to it; empty: all.</param>
/// <param name="Exclude">Globs of files to leave.</param>
/// <param name="Inside">Whether compressed files are to be read as what they hold.</param>
/// <param name="FollowLinks">Whether a walk goes through symbolic links; loops are impossible either way.</param>
public sealed record SourceRequest(IReadOnlyList<string> Inputs, IReadOnlyList<string> Include, IReadOnlyList<string> Exclude, bool Inside = false, bool FollowLinks = false);

/// <summary>Where a source's bytes come from.</summary>
public enum SourceKind
{
    /// <summary>A regular file.</summary>
    File,

    /// <summary>Standard input, a named pipe or another source of unknown length.</summary>
    Stream,

    /// <summary>The content of a compressed file.</summary>
    Member,
}

/// <summary>A path as the system has it: bytes, which need not be UTF-8.</summary>
/// <param name="RawBytes">The bytes, without a final zero; empty for standard input.</param>
public sealed record SourcePath(ReadOnlyMemory<byte> RawBytes)
{
    /// <summary>Standard input.</summary>
    public static SourcePath StandardInput { get; } = new(ReadOnlyMemory<byte>.Empty);

    /// <summary>True for standard input.</summary>
    public bool IsStandardInput => RawBytes.IsEmpty;

    /// <summary>A path of text.</summary>
    public static SourcePath Of(string text) => new(Encoding.UTF8.GetBytes(text));

    /// <summary>The path as text, for systems whose paths are text and for messages.</summary>
    public override string ToString() => Encoding.UTF8.GetString(RawBytes.Span);
}

/// <summary>A source that can be read.</summary>
/// <param name="Name">Unique name; bytes that are not UTF-8 stand as <c>%HH</c>, <c>%</c> as <c>%25</c>.</param>
/// <param name="Kind">Where its bytes come from.</param>
/// <param name="Path">How to open it.</param>
/// <param name="Bytes">Its size; null: unknown.</param>
/// <param name="ModifiedUtc">Time of its last change; null: unknown.</param>
/// <param name="Device">Device number; with <paramref name="Inode"/> it tells one file from another.</param>
/// <param name="Inode">Inode number; 0: unknown.</param>
public sealed record FoundSource(string Name, SourceKind Kind, SourcePath Path, long? Bytes, DateTime? ModifiedUtc, ulong Device, ulong Inode);

/// <summary>A source that a rule leaves out.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Reason">The rule, in words.</param>
public sealed record SkippedSource(string Name, string Reason);

/// <summary>A source that could not be reached.</summary>
/// <param name="Name">Its name.</param>
/// <param name="Reason">Why, in words.</param>
public sealed record FailedSource(string Name, string Reason);

/// <summary>What a walk found, each list in ordinal order of names.</summary>
/// <param name="Sources">To be read.</param>
/// <param name="Skipped">Left out by a rule.</param>
/// <param name="Failed">Not reached.</param>
/// <param name="ExcludedByRule">Files kept out by the globs.</param>
public sealed record WalkResult(IReadOnlyList<FoundSource> Sources, IReadOnlyList<SkippedSource> Skipped, IReadOnlyList<FailedSource> Failed, long ExcludedByRule);

/// <summary>A glob of the request cannot be understood: a wrong command line. The message is one line that says how to mend it.</summary>
public sealed class GlobException(string message, Exception? inner = null) : FormatException(message, inner);

/// <summary>An INPUT that does not exist: a wrong command line, not a source that failed.</summary>
public sealed class InputNotFoundException(string input) : IOException($"{DisplayText.Escape(input)}: there is no such file or folder; check the path, or quote it if it has spaces.")
{
    /// <summary>The input as typed.</summary>
    public string Input { get; } = input;
}
