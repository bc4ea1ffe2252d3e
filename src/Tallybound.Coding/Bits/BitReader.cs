namespace Tallybound.Coding.Bits;

/// <summary>Reads what <see cref="BitWriter"/> wrote.</summary>
/// <param name="bytes">The bytes.</param>
public ref struct BitReader(ReadOnlySpan<byte> bytes)
{
    private readonly ReadOnlySpan<byte> bytes = bytes;

    /// <summary>Bits read so far.</summary>
    public long Position { get; private set; }

    /// <summary>The next <paramref name="bits"/> bits as a number, the first one most significant.</summary>
    /// <param name="bits">0 to 64.</param>
    /// <exception cref="InvalidDataException">Fewer bits are left.</exception>
    public ulong Read(int bits)
    {
        if (Position + bits > (long)bytes.Length * 8) throw new InvalidDataException($"The bits end at {(long)bytes.Length * 8}; {bits} more were to be read at {Position}.");
        ulong value = 0;
        for (int i = 0; i < bits; i++, Position++) value = (value << 1) | (uint)((bytes[(int)(Position >> 3)] >> (7 - (int)(Position & 7))) & 1);
        return value;
    }
}

/// <summary>Reads what <see cref="LowBitWriter"/> wrote.</summary>
/// <param name="bytes">The bytes.</param>
public ref struct LowBitReader(ReadOnlySpan<byte> bytes)
{
    private readonly ReadOnlySpan<byte> bytes = bytes;

    /// <summary>Bits read so far.</summary>
    public long Position { get; private set; }

    /// <summary>The next <paramref name="bits"/> bits as a number, the first one least significant.</summary>
    /// <param name="bits">0 to 64.</param>
    /// <exception cref="InvalidDataException">Fewer bits are left.</exception>
    public ulong Read(int bits)
    {
        if (Position + bits > (long)bytes.Length * 8) throw new InvalidDataException($"The bits end at {(long)bytes.Length * 8}; {bits} more were to be read at {Position}.");
        ulong value = 0;
        for (int i = 0; i < bits; i++, Position++) value |= (ulong)((bytes[(int)(Position >> 3)] >> (int)(Position & 7)) & 1) << i;
        return value;
    }
}
