using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>A table of each segment's own would save at most 1 % of payload over one table for the whole source.</summary>
internal sealed class StaticTableDoes : IFindingRule
{
    private const int LeastSegments = 16;
    private const long ComparedBlockBytes = 64 << 10;

    public string Id => "static-table-does";

    public string Against => "table blocks of 64 KiB or one segment";

    public string HoldsUnless => "Later data drift away from these counts, so that the table no longer fits.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Segments is not { } segments || segments.OwnTableBits.Count < LeastSegments) return null;
        if (view.Binary("huffman") is not { TotalBits: { } total } huffman || !view.IsWorthCoding(huffman) || Compared(view) is not { } blocks) return null;
        long own = Sum(segments.OwnTableBits), one = Sum(segments.SourceTableBits);
        if (100 * one > 101 * own || 100 * total > 101 * blocks.TotalBits) return null;
        long apart = (blocks.TotalBits - total) / 8, saved = ViewPrices.Matters(apart, blocks.TotalBits / 8) ? apart : 0;
        string size = SizeText.Whole(blocks.BlockBytes);
        return this.Claim(
            $"One table does for the whole source, {SizeText.Bytes(total / 8)} with it: a table for each of its {SizeText.Count(segments.OwnTableBits.Count)} segments could save {(one - own < 8 ? "nothing" : SizeText.Bytes((one - own) / 8))} before tables are paid for, and table blocks of {size} take {SizeText.Bytes(blocks.TotalBits / 8)}{(saved > 0 ? $", {SizeText.Bytes(saved)} more" : "")}.",
            saved,
            Share("payload that own tables of segments could save", (double)(one - own) / one),
            Bytes("payload of segments under the source's table", one),
            Bytes("payload of segments under own tables, tables left out", own),
            Bytes("Huffman, total", total),
            Bytes($"table blocks of {size}, each of its cheapest kind, total", blocks.TotalBits)) with
        {
            Against = $"table blocks of {size}, each of its cheapest kind",
        };
    }

    public string ClaimOfMany(FindingTotal total) => total.BytesAtStake == 0
        ? $"{total.Where}, one table does for the whole source: own tables of segments could save at most 1 % of its payload."
        : $"{total.Where}, one table does for the whole source; against table blocks of 64 KiB or one segment, it saves {SizeText.Bytes(total.BytesAtStake)}.";

    /// <summary>The exact point of 64 KiB, or the next larger one.</summary>
    private static TableBlockPrice? Compared(ViewProfile view)
    {
        if (view.TableBlocks is not { } curve) return null;
        for (int i = 0; i < curve.Count; i++)
            if (curve[i].Exact && curve[i].BlockBytes >= ComparedBlockBytes) return curve[i];
        return null;
    }

    private static long Sum(IReadOnlyList<long> bits)
    {
        long sum = 0;
        for (int i = 0; i < bits.Count; i++) sum += bits[i];
        return sum;
    }
}
