using System.Security.Cryptography;

namespace Tallybound.Sources;

/// <summary>SHA-256 of a source in consecutive pieces of 64 MiB, so that pieces may be read by different threads.</summary>
/// <remarks>A source of at most one piece has the plain SHA-256; a longer one the SHA-256 of its pieces' SHA-256s.</remarks>
public sealed class PieceDigest : IDisposable
{
    /// <summary>Bytes of a piece.</summary>
    public const long PieceBytes = 64L << 20;

    private readonly IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private readonly List<byte[]> finished = [];
    private long inPiece;

    /// <summary>Adds the next bytes, from the start of a piece on.</summary>
    public void Append(ReadOnlySpan<byte> bytes)
    {
        while (!bytes.IsEmpty)
        {
            // A full piece is closed when the next byte comes, so that a source of exactly one piece stays plain.
            if (inPiece == PieceBytes) Close();
            int length = (int)Math.Min(bytes.Length, PieceBytes - inPiece);
            hash.AppendData(bytes[..length]);
            inPiece += length;
            bytes = bytes[length..];
        }
    }

    /// <summary>The digests of the pieces so far, the last one perhaps shorter; one of no bytes where nothing came.</summary>
    public IReadOnlyList<byte[]> Pieces()
    {
        if (inPiece > 0 || finished.Count == 0) Close();
        return finished;
    }

    /// <summary>The digest of a source from the digests of its pieces in order, and whether it is of several.</summary>
    public static (string Hexadecimal, bool OfPieces) Combine(IReadOnlyList<byte[]> pieces)
    {
        if (pieces.Count == 1) return (Convert.ToHexStringLower(pieces[0]), false);
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        foreach (byte[] piece in pieces) hash.AppendData(piece);
        return (Convert.ToHexStringLower(hash.GetHashAndReset()), true);
    }

    /// <inheritdoc/>
    public void Dispose() => hash.Dispose();

    private void Close()
    {
        finished.Add(hash.GetHashAndReset());
        inPiece = 0;
    }
}
