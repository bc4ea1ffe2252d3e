using Tallybound.Sources.Members;

namespace Tallybound.Sources;

/// <summary>Opens what a walk found.</summary>
public static class SourceOpener
{
    /// <summary>Opens a source for reading.</summary>
    /// <param name="source">What the walk found.</param>
    /// <param name="limits">Limits of compressed members.</param>
    /// <exception cref="SourceReadException">It cannot be opened.</exception>
    public static SourceReading Open(FoundSource source, MemberLimits limits) => source.Kind switch
    {
        SourceKind.Stream => Reading.StreamReading.Open(source.Path),
        SourceKind.Member => MemberReading.Open(source.Path, limits),
        _ => Reading.FileReading.Open(source.Path),
    };
}
