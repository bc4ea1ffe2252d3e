using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>At the smallest block size in use, tables and framing take a quarter or more of what the payload saves.</summary>
internal sealed class TableEatsGain : IFindingRule
{
    private const double LeastShare = 0.25;

    public string Id => "table-eats-gain";

    public string Against => "table blocks of the smallest usual size";

    public string HoldsUnless => "Blocks must stay small because each is read by itself; a table that both ends know beforehand then costs nothing.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.TableBlocks is not { Count: > 1 } curve || SmallestUsual(curve) is not { } point || CheapestExact(curve) is not { } best) return null;
        long gain = view.RawBits - point.PayloadBits, eaten = point.TableBits + point.FramingBits;
        if (gain <= 0 || eaten < LeastShare * gain) return null;
        long saved = (point.TotalBits - best.TotalBits) / 8;
        if (best.BlockBytes <= point.BlockBytes || !ViewPrices.Matters(saved, point.TotalBits / 8)) return null;
        string about = point.Exact ? "" : "about ";
        string block = SizeText.Whole(point.BlockBytes), larger = SizeText.Whole(best.BlockBytes);
        return this.Claim(
            $"In table blocks of {block}, tables and framing take {about}{SizeText.Bytes(eaten / 8)} of the {SizeText.Bytes(gain / 8)} that coding saves ({SizeText.Percent((double)eaten / gain)}); in blocks of {larger}, the whole is {SizeText.Bytes(best.TotalBits / 8)} instead of {about}{SizeText.Bytes(point.TotalBits / 8)}, {about}{SizeText.Bytes(saved)} less.",
            saved,
            Share("share of the payload's saving that tables and framing take", (double)eaten / gain),
            Bytes($"blocks of {block}, tables", point.TableBits),
            Bytes($"blocks of {block}, framing", point.FramingBits),
            Bytes($"blocks of {block}, total{(point.Exact ? "" : ", estimated")}", point.TotalBits),
            Bytes($"blocks of {larger}, total", best.TotalBits)) with
        {
            Against = $"table blocks of {block}",
            BytesAtStakeInterval = point is { Exact: false, TotalBitsInterval: [var low, var high] } ? [Above(low, best), Above(high, best)] : null,
        };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, tables and framing of small table blocks take {SizeText.Percent(LeastShare)} or more of what coding saves; blocks of the best size save {SizeText.Bytes(total.BytesAtStake)}.";

    private static long Above(long bits, TableBlockPrice best) => Math.Max(0, (bits - best.TotalBits) / 8);

    private static TableBlockPrice? SmallestUsual(IReadOnlyList<TableBlockPrice> curve)
    {
        for (int i = 0; i < curve.Count; i++)
            if (curve[i].BlockBytes is 4 << 10 or 16 << 10 or 64 << 10 or 128 << 10 or 1 << 20) return curve[i];
        return null;
    }

    /// <summary>Of equal ones the one with the larger blocks: fewer of them.</summary>
    private static TableBlockPrice? CheapestExact(IReadOnlyList<TableBlockPrice> curve)
    {
        TableBlockPrice? cheapest = null;
        for (int i = 0; i < curve.Count; i++)
            if (curve[i].Exact && (cheapest is null || curve[i].TotalBits <= cheapest.TotalBits)) cheapest = curve[i];
        return cheapest;
    }
}
