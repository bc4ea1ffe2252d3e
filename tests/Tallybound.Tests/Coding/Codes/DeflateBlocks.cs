namespace Tallybound.Tests.Coding.Codes;

/// <summary>One dynamic block of literals, as another encoder wrote it.</summary>
/// <param name="Lengths">Code length of each literal and of end-of-block (256).</param>
/// <param name="Counts">How often each came in the block.</param>
/// <param name="PayloadBits">Bits of the literals' words and the end of block.</param>
internal sealed record LiteralBlock(byte[] Lengths, long[] Counts, long PayloadBits);

/// <summary>A reader of RFC 1951 that knows blocks without matches, written from the standard and apart from the program's own.</summary>
internal sealed class DeflateBlocks(byte[] stream)
{
    private static readonly int[] Order = [16, 17, 18, 0, 8, 7, 9, 6, 10, 5, 11, 4, 12, 3, 13, 2, 14, 1, 15];
    private long position;

    /// <summary>The dynamic blocks; stored and fixed ones are passed over, and so is everything after a match.</summary>
    public List<LiteralBlock> Dynamic()
    {
        var blocks = new List<LiteralBlock>();
        for (bool last = false; !last;)
        {
            last = Bits(1) == 1;
            int type = Bits(2);
            if (type == 0)
            {
                position = (position + 7) / 8 * 8;
                int length = Bits(16);
                position += 16 + (8L * length);
            }
            else if (type == 1)
            {
                byte[] lengths = [.. Enumerable.Range(0, 288).Select(s => (byte)(s < 144 ? 8 : s < 256 ? 9 : s < 280 ? 7 : 8))];
                if (Literals(lengths) is null) return blocks;
            }
            else
            {
                byte[] lengths = Header();
                if (Literals(lengths) is not { } block) return blocks;
                blocks.Add(block);
            }
        }
        return blocks;
    }

    /// <summary>The first block alone, which must be dynamic.</summary>
    public LiteralBlock DynamicFirst()
    {
        Bits(1);
        if (Bits(2) != 2) throw new InvalidDataException("The first block is not dynamic.");
        return Literals(Header()) ?? throw new InvalidDataException("The first block holds a match.");
    }

    private byte[] Header()
    {
        int literals = Bits(5) + 257, distances = Bits(5) + 1, precodes = Bits(4) + 4;
        var precode = new byte[19];
        for (int i = 0; i < precodes; i++) precode[Order[i]] = (byte)Bits(3);
        var words = Words(precode);
        var lengths = new List<byte>();
        while (lengths.Count < literals + distances)
        {
            int symbol = Symbol(words);
            if (symbol < 16) lengths.Add((byte)symbol);
            else if (symbol == 16) lengths.AddRange(Enumerable.Repeat(lengths[^1], Bits(2) + 3));
            else lengths.AddRange(Enumerable.Repeat((byte)0, symbol == 17 ? Bits(3) + 3 : Bits(7) + 11));
        }
        return [.. lengths.Take(literals)];
    }

    private LiteralBlock? Literals(byte[] lengths)
    {
        Dictionary<(int, int), int> words = Words(lengths);
        var counts = new long[257];
        long start = position;
        while (true)
        {
            int symbol = Symbol(words);
            if (symbol > 256) return null;
            counts[symbol]++;
            if (symbol == 256) return new LiteralBlock([.. lengths.Take(257)], counts, position - start);
        }
    }

    private static Dictionary<(int Length, int Word), int> Words(byte[] lengths)
    {
        var words = new Dictionary<(int, int), int>();
        int word = 0;
        for (int length = 1; length < 16; length++, word <<= 1)
            for (int symbol = 0; symbol < lengths.Length; symbol++)
                if (lengths[symbol] == length) words.Add((length, word++), symbol);
        return words;
    }

    private int Symbol(Dictionary<(int Length, int Word), int> words)
    {
        int word = 0;
        for (int length = 1; length < 16; length++)
        {
            word = (word << 1) | Bits(1);
            if (words.TryGetValue((length, word), out int symbol)) return symbol;
        }
        throw new InvalidDataException("No word of the block's code.");
    }

    private int Bits(int count)
    {
        int value = 0;
        for (int i = 0; i < count; i++, position++) value |= ((stream[position >> 3] >> (int)(position & 7)) & 1) << i;
        return value;
    }
}
