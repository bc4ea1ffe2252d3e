using Tallybound.Sources.Reading;

namespace Tallybound.Sources.Members;

/// <summary>Formats of compressed files that can be read as what they hold, known by their first bytes.</summary>
internal enum MemberKind
{
    /// <summary>RFC 1952.</summary>
    Gzip,

    /// <summary>RFC 8878.</summary>
    Zstandard,
}

/// <summary>Tells the format of a file.</summary>
internal static class MemberFormat
{
    /// <summary>The format of the file; null where it is none of these, or cannot be opened.</summary>
    public static MemberKind? Of(SourcePath path)
    {
        try
        {
            using FileReading file = FileReading.Open(path);
            Span<byte> first = stackalloc byte[4];
            int read = file.Read(first, 0, CancellationToken.None);
            return Of(first[..read]);
        }
        catch (SourceReadException)
        {
            return null;
        }
    }

    /// <summary>The format of a file that begins so: RFC 1952 §2.3.1 (1F 8B, method 8), RFC 8878 §3.1.1 (magic FD2FB528) and §3.1.2 (skippable, 184D2A5?).</summary>
    public static MemberKind? Of(ReadOnlySpan<byte> first)
    {
        if (first.Length >= 3 && first[0] == 0x1F && first[1] == 0x8B && first[2] == 8) return MemberKind.Gzip;
        if (first.Length < 4) return null;
        uint magic = System.Buffers.Binary.BinaryPrimitives.ReadUInt32LittleEndian(first);
        return magic == 0xFD2FB528 || (magic & 0xFFFFFFF0) == 0x184D2A50 ? MemberKind.Zstandard : null;
    }
}
