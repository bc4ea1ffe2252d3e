using System.Security.Cryptography;

namespace Tallybound.Sources;

/// <summary>SHA-256 of a source in consecutive pieces of 64 MiB, so that pieces may be read by different threads.</summary>
/// <remarks>A source of at most one piece has the plain SHA-256; a longer one the SHA-256 of its pieces' SHA-256s.</remarks>
public sealed class PieceDigest : IDisposable
{
    /// <summary>Bytes of a piece.</summary>
    public const long PieceBytes = 64L << 20;

    private static readonly byte[] OfNothing = SHA256.HashData([]);
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

    /// <summary>The digests of the pieces so far, the last one perhaps shorter; one of no bytes where nothing came. More may be appended afterwards.</summary>
    public IReadOnlyList<byte[]> Pieces() => inPiece > 0 || finished.Count == 0 ? [.. finished, hash.GetCurrentHash()] : [.. finished];

    /// <summary>The digest of a source from the digests of its pieces, and whether it is of several.</summary>
    /// <param name="pieces">In the order of the source. Pieces of no bytes do not count, such as units give that a shrunk file no longer reached.</param>
    /// <returns>In lower-case hexadecimal; that of no bytes where no piece has any.</returns>
    public static (string Hexadecimal, bool OfPieces) Combine(IReadOnlyList<byte[]> pieces)
    {
        List<byte[]> filled = [.. pieces.Where(piece => !piece.AsSpan().SequenceEqual(OfNothing))];
        if (filled.Count <= 1) return (Convert.ToHexStringLower(filled.Count == 0 ? OfNothing : filled[0]), false);
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        foreach (byte[] piece in filled) hash.AppendData(piece);
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
