using System.Numerics;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Tables;

namespace Tallybound.Profiling.Segments;

/// <summary>Prices neighbouring table blocks, each of its cheapest kind, once for every table format.</summary>
/// <remarks>
/// Kinds are chosen block by block on whole bytes; of equal ones the first of stored, one symbol, last table, own table. The last table serves a block only when it has a word for
/// each of its symbols; a format that cannot hold a block's lengths gives it no own table. A code is built, and a table priced, only when their floors leave them a chance to win:
/// a floor is never above the true figure, so what is left out could not have been chosen.
/// </remarks>
internal sealed class TableBlockPricer
{
    private static readonly TableFormat[] s_formats = [TableFormat.Flat, TableFormat.Rfc1951DynamicHeader, TableFormat.Rfc8878HuffmanWeights, TableFormat.Sparse];

    [ThreadStatic]
    private static TableBlockPricer? t_pricer;

    private readonly int alphabetSize;
    private readonly int plainBits;
    private readonly FormatChain[] chains;
    private readonly byte[] own;
    private readonly long[] seenTables;
    private readonly long[] seenPayloads;
    private long blocks;

    /// <param name="alphabetSize">1 to 256.</param>
    /// <param name="formats">Formats to price; null: all that hold code lengths.</param>
    public TableBlockPricer(int alphabetSize, params TableFormat[] formats)
    {
        this.alphabetSize = alphabetSize;
        plainBits = PlainBits(alphabetSize);
        chains = Array.ConvertAll(formats.Length == 0 ? s_formats : formats, format => new FormatChain(format, alphabetSize));
        own = new byte[alphabetSize];
        seenTables = new long[chains.Length];
        seenPayloads = new long[chains.Length];
    }

    /// <summary>One chain a format, in the order in which ties between formats are decided.</summary>
    public ReadOnlySpan<FormatChain> Chains => chains;

    /// <summary>A pricer of all formats, without blocks; one a thread, so that small sources allocate none.</summary>
    public static TableBlockPricer ForThread(int alphabetSize)
    {
        if (t_pricer?.alphabetSize != alphabetSize) t_pricer = new TableBlockPricer(alphabetSize);
        t_pricer.Begin();
        return t_pricer;
    }

    /// <summary>⌈log2 A⌉: bits of a symbol sent plain.</summary>
    public static int PlainBits(int alphabetSize) => alphabetSize == 1 ? 0 : BitOperations.Log2((uint)alphabetSize - 1) + 1;

    /// <summary>Forgets all blocks and tables.</summary>
    public void Begin()
    {
        blocks = 0;
        foreach (FormatChain chain in chains) chain.Begin();
    }

    /// <summary>Prices the next block.</summary>
    /// <param name="counts">Its counts, one a symbol of the alphabet.</param>
    public void Add(ReadOnlySpan<long> counts)
    {
        BlockStatistics block = BlockStatistics.Of(counts);
        var prices = new BlockPrices(block, plainBits);
        int seen = 0;
        foreach (FormatChain chain in chains)
        {
            BlockKind kind = prices.PlainKind;
            long payload = prices.PlainPayload, table = 0, best = prices.PlainBytes;
            if (chain.LastTableBlock >= 0 && block.CoveredBy(chain.LastTableUsed))
            {
                long last = PayloadUnder(chain, counts, ref seen);
                if (prices.Bytes(last) < best) (kind, payload, best) = (BlockKind.LastTable, last, prices.Bytes(last));
            }
            if (TryOwnTable(chain.Format, counts, ref prices, best, out long ownTable)) (kind, payload, table) = (BlockKind.OwnTable, prices.OwnPayload, ownTable);
            chain.Add(kind, block.Symbols, payload, table);
            if (kind == BlockKind.OwnTable) chain.KeepTable(own, blocks, block.Used);
        }
        blocks++;
    }

    /// <summary>The cheapest chain; of equal ones the first.</summary>
    public FormatChain Cheapest()
    {
        FormatChain cheapest = chains[0];
        foreach (FormatChain chain in chains)
        {
            if (chain.Totals.TotalBits < cheapest.Totals.TotalBits) cheapest = chain;
        }
        return cheapest;
    }

    private bool TryOwnTable(TableFormat format, ReadOnlySpan<long> counts, ref BlockPrices prices, long best, out long table)
    {
        table = 0;
        BlockStatistics block = prices.Block;
        if (block.InUse == 0 || prices.Bytes(block.PayloadFloor + TableFloor.Before(format, alphabetSize, block.InUse)) >= best) return false;
        if (prices.OwnPayload < 0)
        {
            Huffman.Lengths(counts, own);
            prices.OwnPayload = Huffman.PayloadDigits(counts, own);
        }
        return prices.Bytes(prices.OwnPayload + TableFloor.Of(format, own)) < best
            && TablePricing.TryPrice(format, own, out table)
            && prices.Bytes(prices.OwnPayload + table) < best;
    }

    /// <summary>Chains that send the same table last share its price.</summary>
    private long PayloadUnder(FormatChain chain, ReadOnlySpan<long> counts, ref int seen)
    {
        for (int i = 0; i < seen; i++)
        {
            if (seenTables[i] == chain.LastTableBlock) return seenPayloads[i];
        }
        seenTables[seen] = chain.LastTableBlock;
        return seenPayloads[seen++] = Huffman.PayloadDigits(counts, chain.LastTable);
    }
}
