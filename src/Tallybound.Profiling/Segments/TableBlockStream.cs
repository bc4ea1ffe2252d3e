using Tallybound.Coding.Bits;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>A source really written as table blocks, and read back: the bits that the block-size curve and the adaptive split count.</summary>
/// <remarks>A block is its kind and number of symbols (<see cref="Framing"/>), its table where it carries one, its symbols, and zero bits up to a whole byte; block follows block.
/// Alphabet and table format are known to both sides. Words are canonical by (length, symbol), RFC 1951 §3.2.2, their first bit first.</remarks>
public static class TableBlockStream
{
    /// <summary>Writes a source.</summary>
    /// <param name="source">Its symbols, each below <paramref name="alphabetSize"/>.</param>
    /// <param name="alphabetSize">A, 1 to 256.</param>
    /// <param name="blockSymbols">Symbols of each block, at least 1, the source in all.</param>
    /// <param name="format">How tables are written; a block that it cannot hold a table of has no table of its own.</param>
    /// <returns>As many bytes as the blocks cost, each of its cheapest kind.</returns>
    /// <exception cref="ArgumentException">The blocks are not the source.</exception>
    public static byte[] Write(ReadOnlySpan<byte> source, int alphabetSize, ReadOnlySpan<int> blockSymbols, TableFormat format)
    {
        var pricer = new TableBlockPricer(alphabetSize, format);
        var sink = new BitWriter();
        Span<long> counts = stackalloc long[alphabetSize];
        foreach (int symbols in blockSymbols)
        {
            if (symbols < 1 || symbols > source.Length) throw new ArgumentException($"A block of {symbols} symbols was to be written; {source.Length} are left.", nameof(blockSymbols));
            ReadOnlySpan<byte> block = source[..symbols];
            counts.Clear();
            foreach (byte symbol in block) counts[symbol]++;
            pricer.Add(counts);
            WriteBlock(block, TableBlockPricer.PlainBits(alphabetSize), pricer.Chains[0], sink);
            source = source[symbols..];
        }
        return source.IsEmpty ? sink.ToArray() : throw new ArgumentException($"{source.Length} symbols stand behind the last block.", nameof(blockSymbols));
    }

    /// <summary>Reads what <see cref="Write"/> wrote.</summary>
    /// <param name="stream">All of it.</param>
    /// <param name="alphabetSize">As it was written.</param>
    /// <param name="format">As it was written.</param>
    /// <param name="source">Takes the symbols; as long as the source was.</param>
    /// <exception cref="InvalidDataException">The stream is damaged, or is another source's.</exception>
    public static void Read(ReadOnlySpan<byte> stream, int alphabetSize, TableFormat format, scoped Span<byte> source)
    {
        var reader = new BitReader(stream);
        int plainBits = TableBlockPricer.PlainBits(alphabetSize);
        long end = stream.Length * 8L;
        byte[] lengths = new byte[alphabetSize];
        BlockCode? table = null;
        while (reader.Position < end)
        {
            (BlockKind kind, long symbols) = Framing.Decode(ref reader);
            if (symbols > source.Length) throw new InvalidDataException($"A block has {symbols} symbols; {source.Length} are left to the source.");
            Span<byte> block = source[..(int)symbols];
            if (kind == BlockKind.OwnTable)
            {
                TableTransport.Decode(format, ref reader, end - reader.Position, lengths);
                table = new BlockCode(lengths);
            }
            if (kind is BlockKind.Stored) foreach (ref byte symbol in block) symbol = ReadPlain(ref reader, plainBits, alphabetSize);
            else if (kind is BlockKind.OneSymbol) block.Fill(ReadPlain(ref reader, plainBits, alphabetSize));
            else if (table is null) throw new InvalidDataException("A block asks for the last table, and none was sent.");
            else table.Decode(ref reader, block);
            if (reader.Read((int)(-reader.Position & 7)) != 0) throw new InvalidDataException($"The padding before bit {reader.Position} is not zero.");
            source = source[(int)symbols..];
        }
        if (!source.IsEmpty) throw new InvalidDataException($"The stream ends {source.Length} symbols before the source.");
    }

    private static void WriteBlock(ReadOnlySpan<byte> block, int plainBits, FormatChain chain, BitWriter sink)
    {
        Framing.Encode(chain.Kind, block.Length, ref sink);
        switch (chain.Kind)
        {
            case BlockKind.Stored:
                foreach (byte symbol in block) sink.Write(symbol, plainBits);
                break;
            case BlockKind.OneSymbol:
                sink.Write(block[0], plainBits);
                break;
            default:
                if (chain.Kind == BlockKind.OwnTable) TableTransport.Encode(chain.Format, chain.LastTable, sink);
                new BlockCode(chain.LastTable).Encode(block, sink);
                break;
        }
        Framing.Pad(ref sink);
    }

    private static byte ReadPlain(ref BitReader reader, int plainBits, int alphabetSize)
    {
        ulong symbol = reader.Read(plainBits);
        return symbol < (ulong)alphabetSize ? (byte)symbol : throw new InvalidDataException($"A plain symbol is {symbol}; the alphabet has {alphabetSize}.");
    }
}
