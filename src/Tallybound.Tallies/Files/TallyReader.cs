using System.Security.Cryptography;

namespace Tallybound.Tallies.Files;

/// <summary>Reads what <see cref="TallyWriter"/> wrote, and refuses anything else.</summary>
internal sealed class TallyReader : IDisposable
{
    private readonly Stream stream;
    private readonly IncrementalHash hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
    private readonly byte[] one = new byte[1];

    /// <exception cref="InvalidDataException">The stream does not begin as a tally of this kind.</exception>
    public TallyReader(Stream stream, TallyKind kind)
    {
        this.stream = stream;
        foreach (byte expected in TallyWriter.Magic)
            if (NextByte() != expected) throw new InvalidDataException("This is no tally: it does not begin with the tally mark.");
        long version = Read("version", TallyWriter.Version);
        if (version != TallyWriter.Version) throw new InvalidDataException($"The tally has version {version}; this program reads version {TallyWriter.Version}.");
        long found = Read("kind", 255);
        if (found != (long)kind) throw new InvalidDataException($"The tally is of kind {found}; kind {(long)kind} ({kind}) was expected.");
    }

    /// <summary>What kind of tally a stream begins with; the stream is left behind its head.</summary>
    /// <exception cref="InvalidDataException">The stream does not begin as a tally.</exception>
    public static TallyKind KindOf(Stream stream)
    {
        Span<byte> head = stackalloc byte[TallyWriter.Magic.Length + 2];
        if (stream.ReadAtLeast(head, head.Length, throwOnEndOfStream: false) < head.Length || !head.StartsWith(TallyWriter.Magic))
            throw new InvalidDataException("This is no tally: it does not begin with the tally mark.");
        return (TallyKind)head[^1];
    }

    /// <summary>A number of at least 0.</summary>
    /// <param name="what">What it is, for the error.</param>
    /// <param name="largest">Greatest value allowed.</param>
    /// <exception cref="InvalidDataException">The tally ends, or the number is out of range.</exception>
    public long Read(string what, long largest)
    {
        ulong value = 0;
        for (int shift = 0; shift < 64; shift += 7)
        {
            byte next = NextByte();
            value |= (ulong)(next & 127) << shift;
            if (next < 128)
                return value <= (ulong)largest ? (long)value : throw new InvalidDataException($"The tally is damaged: its {what} is {value}; at most {largest} is possible.");
        }
        throw new InvalidDataException($"The tally is damaged: its {what} has no end.");
    }

    /// <summary>Reads sparse entries in ascending order.</summary>
    /// <param name="keys">Number of possible keys.</param>
    /// <param name="take">Takes each key and count.</param>
    /// <exception cref="InvalidDataException">The entries are damaged.</exception>
    public void ReadSparse(long keys, Action<long, long> take)
    {
        long entries = Read("number of entries", keys);
        long before = -1;
        for (long i = 0; i < entries; i++)
        {
            long gap = Read("gap", keys);
            long count = Read("count", long.MaxValue);
            if (gap == 0 || before + gap >= keys || count == 0) throw new InvalidDataException("The tally is damaged: its entries do not ascend.");
            before += gap;
            take(before, count);
        }
    }

    /// <summary>Reads the checksum and holds it against what was read.</summary>
    /// <exception cref="InvalidDataException">They differ.</exception>
    public void Finish()
    {
        byte[] actual = hash.GetHashAndReset();
        var stored = new byte[actual.Length];
        if (stream.ReadAtLeast(stored, stored.Length, throwOnEndOfStream: false) < stored.Length) throw new InvalidDataException("The tally ends before its checksum.");
        if (!stored.AsSpan().SequenceEqual(actual)) throw new InvalidDataException("The tally is damaged: its checksum does not fit.");
    }

    public void Dispose() => hash.Dispose();

    private byte NextByte()
    {
        int next = stream.ReadByte();
        if (next < 0) throw new InvalidDataException("The tally ends in the middle.");
        one[0] = (byte)next;
        hash.AppendData(one);
        return one[0];
    }
}
