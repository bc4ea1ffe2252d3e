using System.Buffers.Binary;

namespace Tallybound.DemoCorpus;

/// <summary>A gzip file (RFC 1952) whose bytes do not depend on any library's version: one Deflate block of fixed codes with simple matches.</summary>
internal static class GzipFile
{
    private const int ShortestMatch = 3;
    private const int LongestMatch = 258;
    private const int Window = 32_768;

    // RFC 1951 section 3.2.5.
    private static readonly int[] LengthBase = [3, 4, 5, 6, 7, 8, 9, 10, 11, 13, 15, 17, 19, 23, 27, 31, 35, 43, 51, 59, 67, 83, 99, 115, 131, 163, 195, 227, 258];
    private static readonly int[] LengthExtra = [0, 0, 0, 0, 0, 0, 0, 0, 1, 1, 1, 1, 2, 2, 2, 2, 3, 3, 3, 3, 4, 4, 4, 4, 5, 5, 5, 5, 0];
    private static readonly int[] DistanceBase = [1, 2, 3, 4, 5, 7, 9, 13, 17, 25, 33, 49, 65, 97, 129, 193, 257, 385, 513, 769, 1025, 1537, 2049, 3073, 4097, 6145, 8193, 12289, 16385, 24577];

    public static byte[] Make(byte[] content)
    {
        var file = new List<byte> { 0x1F, 0x8B, 8, 0, 0, 0, 0, 0, 0, 255 };
        file.AddRange(Deflate(content));
        Span<byte> tail = stackalloc byte[8];
        BinaryPrimitives.WriteUInt32LittleEndian(tail, Checksum(content));
        BinaryPrimitives.WriteUInt32LittleEndian(tail[4..], (uint)content.Length);
        file.AddRange(tail);
        return [.. file];
    }

    private static List<byte> Deflate(byte[] content)
    {
        var output = new FixedCodeWriter();
        var last = new Dictionary<int, int>();
        for (int at = 0; at < content.Length;)
        {
            int length = 0, distance = 0;
            if (at + ShortestMatch <= content.Length)
            {
                int key = content[at] | (content[at + 1] << 8) | (content[at + 2] << 16);
                if (last.TryGetValue(key, out int from) && at - from <= Window)
                {
                    distance = at - from;
                    while (length < LongestMatch && at + length < content.Length && content[from + length] == content[at + length]) length++;
                }
                last[key] = at;
            }
            if (length >= ShortestMatch)
            {
                WriteMatch(output, length, distance);
                at += length;
            }
            else
            {
                output.Symbol(content[at++]);
            }
        }
        output.Symbol(256);
        return output.Finish();
    }

    private static void WriteMatch(FixedCodeWriter output, int length, int distance)
    {
        int code = Array.FindLastIndex(LengthBase, start => start <= length);
        output.Symbol(257 + code);
        output.Bits(length - LengthBase[code], LengthExtra[code]);
        code = Array.FindLastIndex(DistanceBase, start => start <= distance);
        output.Reversed(code, 5);
        output.Bits(distance - DistanceBase[code], Math.Max(0, (code / 2) - 1));
    }

    private static uint Checksum(byte[] content)
    {
        uint crc = uint.MaxValue;
        foreach (byte each in content)
        {
            crc ^= each;
            for (int bit = 0; bit < 8; bit++) crc = (crc & 1) == 1 ? (crc >> 1) ^ 0xEDB88320u : crc >> 1;
        }
        return ~crc;
    }
}

/// <summary>Writes one final Deflate block with the fixed codes of RFC 1951 section 3.2.6.</summary>
internal sealed class FixedCodeWriter
{
    private readonly List<byte> bytes = [];
    private uint pending = 0b011;
    private int count = 3;

    public void Symbol(int symbol)
    {
        if (symbol < 144) Reversed(0x30 + symbol, 8);
        else if (symbol < 256) Reversed(0x190 + symbol - 144, 9);
        else if (symbol < 280) Reversed(symbol - 256, 7);
        else Reversed(0xC0 + symbol - 280, 8);
    }

    /// <summary>A code word, its first bit first.</summary>
    public void Reversed(int code, int length)
    {
        for (int bit = length - 1; bit >= 0; bit--) Bits((code >> bit) & 1, 1);
    }

    /// <summary>A number, its lowest bit first.</summary>
    public void Bits(int value, int length)
    {
        pending |= (uint)value << count;
        count += length;
        for (; count >= 8; count -= 8, pending >>= 8) bytes.Add((byte)pending);
    }

    public List<byte> Finish()
    {
        if (count > 0) bytes.Add((byte)pending);
        return bytes;
    }
}
