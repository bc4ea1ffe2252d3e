using System.Security.Cryptography;

namespace Tallybound.Tallies.Files;

/// <summary>Writes a tally: magic, version, kind, numbers as base-128 varints, and a SHA-256 of all of it at the end.</summary>
internal sealed class TallyWriter : IDisposable
{
    internal const int Version = 1;
    internal static ReadOnlySpan<byte> Magic => "TBTALLY\n"u8;

    private readonly Stream stream;
    private readonly IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private readonly byte[] buffer = new byte[1 << 14];
    private int filled;

    public TallyWriter(Stream stream, TallyKind kind)
    {
        this.stream = stream;
        Magic.CopyTo(buffer);
        filled = Magic.Length;
        Write(Version);
        Write((long)kind);
    }

    /// <summary>Writes a number of at least 0.</summary>
    public void Write(long number)
    {
        if (filled > buffer.Length - 10) Flush();
        ulong left = (ulong)number;
        while (left >= 128)
        {
            buffer[filled++] = (byte)(left | 128);
            left >>= 7;
        }
        buffer[filled++] = (byte)left;
    }

    /// <summary>Writes entries in ascending order of key as gaps and counts; <paramref name="visit"/> is called twice, to count and to write.</summary>
    public void WriteSparse(Action<Action<long, long>> visit)
    {
        long entries = 0;
        visit((_, _) => entries++);
        Write(entries);
        long before = -1;
        visit((key, count) =>
        {
            Write(key - before);
            Write(count);
            before = key;
        });
    }

    /// <summary>Writes the checksum; nothing may follow.</summary>
    public void Dispose()
    {
        Flush();
        stream.Write(hash.GetHashAndReset());
        hash.Dispose();
    }

    private void Flush()
    {
        hash.AppendData(buffer, 0, filled);
        stream.Write(buffer, 0, filled);
        filled = 0;
    }
}

/// <summary>What a written tally holds.</summary>
internal enum TallyKind
{
    /// <summary>Bytes, orders 0 to 2, blocks to 3.</summary>
    Bytes = 1,

    /// <summary>A view with a small alphabet.</summary>
    SmallAlphabet = 2,

    /// <summary>16-bit words.</summary>
    Words = 3,

    /// <summary>Sampled contexts.</summary>
    SampledContexts = 4,

    /// <summary>Bytes of a small source.</summary>
    SparseBytes = 6,

    /// <summary>Counts of segments.</summary>
    Segments = 5,
}
