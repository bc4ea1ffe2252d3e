using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>Table blocks priced as the method reads: every kind of every block in full, no floor, nothing shared.</summary>
internal static class NaiveBlocks
{
    public sealed record Price(TableFormat Format, long Payload, long Table, long Framing, long[] Kinds)
    {
        public long Total => Payload + Table + Framing;
    }

    public static readonly TableFormat[] Formats = [TableFormat.Flat, TableFormat.Rfc1951DynamicHeader, TableFormat.Rfc8878HuffmanWeights, TableFormat.Sparse];

    public static Price Cheapest(IReadOnlyList<long[]> blocks, int alphabetSize) => Formats.Select(format => InFormat(blocks, alphabetSize, format)).MinBy(price => price.Total)!;

    public static Price InFormat(IReadOnlyList<long[]> blocks, int alphabetSize, TableFormat format)
    {
        int plain = 0;
        while (1 << plain < alphabetSize) plain++;
        long payload = 0, table = 0, framing = 0;
        long[] kinds = new long[4];
        byte[]? last = null;
        foreach (long[] counts in blocks)
        {
            long symbols = counts.Sum();
            byte[] own = new byte[alphabetSize];
            Huffman.Lengths(counts, own);
            var ways = new List<(BlockKind Kind, long Payload, long Table)> { (BlockKind.Stored, symbols * plain, 0) };
            if (counts.Count(n => n > 0) == 1) ways.Add((BlockKind.OneSymbol, plain, 0));
            if (last is not null && Enumerable.Range(0, alphabetSize).All(s => counts[s] == 0 || last[s] > 0)) ways.Add((BlockKind.LastTable, Bits(counts, last), 0));
            if (TablePricing.TryPrice(format, own, out long tableBits)) ways.Add((BlockKind.OwnTable, Bits(counts, own), tableBits));
            var best = ways.MinBy(way => way.Payload + way.Table + Framing.Bits(symbols, way.Table, way.Payload));
            payload += best.Payload;
            table += best.Table;
            framing += Framing.Bits(symbols, best.Table, best.Payload);
            kinds[(int)best.Kind]++;
            if (best.Kind == BlockKind.OwnTable) last = own;
        }
        return new Price(format, payload, table, framing, kinds);
    }

    private static long Bits(long[] counts, byte[] lengths) => counts.Zip(lengths, (n, length) => n * length).Sum();
}
