using System.Diagnostics;

namespace Tallybound.Coding.Bits;

/// <summary>Writes words most significant bit first: the first bit of a word is the highest free bit of its byte.</summary>
public sealed class BitWriter : IBitSink
{
    private readonly List<byte> bytes = [];
    private int pending;
    private int pendingBits;

    /// <inheritdoc/>
    public long Bits => ((long)bytes.Count * 8) + pendingBits;

    /// <inheritdoc/>
    public void Write(ulong code, int bits)
    {
        Debug.Assert(bits is >= 0 and <= 64 && (bits == 64 || code >> bits == 0), "A word does not fit its length.");
        for (int left = bits; left > 0;)
        {
            int take = Math.Min(left, 8 - pendingBits);
            pending = (pending << take) | (int)((code >> (left - take)) & ((1u << take) - 1));
            pendingBits += take;
            left -= take;
            if (pendingBits < 8) continue;
            bytes.Add((byte)pending);
            pending = 0;
            pendingBits = 0;
        }
    }

    /// <summary>The bytes so far, the last one filled up with zero bits.</summary>
    public byte[] ToArray()
    {
        if (pendingBits == 0) return [.. bytes];
        return [.. bytes, (byte)(pending << (8 - pendingBits))];
    }
}

/// <summary>Writes words least significant bit first, as RFC 1951 §3.1.1 packs all but its Huffman codes.</summary>
public sealed class LowBitWriter : IBitSink
{
    private readonly List<byte> bytes = [];
    private int pending;
    private int pendingBits;

    /// <inheritdoc/>
    public long Bits => ((long)bytes.Count * 8) + pendingBits;

    /// <inheritdoc/>
    public void Write(ulong code, int bits)
    {
        Debug.Assert(bits is >= 0 and <= 64 && (bits == 64 || code >> bits == 0), "A word does not fit its length.");
        for (int done = 0; done < bits;)
        {
            int take = Math.Min(bits - done, 8 - pendingBits);
            pending |= (int)((code >> done) & ((1u << take) - 1)) << pendingBits;
            pendingBits += take;
            done += take;
            if (pendingBits < 8) continue;
            bytes.Add((byte)pending);
            pending = 0;
            pendingBits = 0;
        }
    }

    /// <summary>The bytes so far, the last one filled up with zero bits.</summary>
    public byte[] ToArray() => pendingBits == 0 ? [.. bytes] : [.. bytes, (byte)pending];
}
