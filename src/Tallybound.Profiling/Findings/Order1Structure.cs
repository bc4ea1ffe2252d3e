using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>The previous symbol tells about the next: enough to pay for one table a context, or for an adaptive coder that sends none.</summary>
internal sealed class Order1Structure : IFindingRule
{
    private const double MostOfPlain = 0.98;

    public string Id => "order-1-structure";

    public string Against => OneTable.AgainstOfMany;

    public string HoldsUnless => "The decoder has no room for a model of each previous symbol, or must begin at places where it has seen none.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Orders is not [{ } order0, { Order: 1 } order1, ..] || OneTable.Of(view) is not { } plain) return null;
        // What half of the source teaches must help with the other half; else the contexts are too thin to speak.
        if (order1.HeldOutBitsPerSymbol >= order0.HeldOutBitsPerSymbol) return null;
        CodePrice? contexts = view.Binary("context-huffman");
        if (contexts is { TotalBits: { } total } && total <= MostOfPlain * plain.TotalBits)
        {
            return plain.SavedBy(total) is { } saved ? Finding(
                $"The previous symbol tells about the next: with a Huffman table per previous symbol, the source is {SizeText.Bytes(total / 8)}, tables included, instead of {plain.Words}: {SizeText.Bytes(saved)} less.",
                saved) : null;
        }
        if (order1.AdaptiveBitsPerSymbol is not { } rate || rate > MostOfPlain * order0.AdaptiveBitsPerSymbol) return null;
        long adaptive = (long)Math.Ceiling(rate * view.Symbols);
        if (adaptive > MostOfPlain * plain.TotalBits || plain.SavedBy(adaptive) is not { } could) return null;
        return Finding(
            $"The previous symbol tells about the next, but a table for each takes the gain; an adaptive coder of order 1 could bring the source to {SizeText.Bytes((adaptive + 7) / 8)} instead of {plain.Words}: {SizeText.Bytes(could)} less.",
            could);

        Finding Finding(string claim, long bytes) => this.Claim(claim, bytes, Evidence(order0, order1, plain, contexts, view.Symbols)) with { Against = plain.Against };
    }

    public string ClaimOfMany(FindingTotal total) =>
        $"{total.Where}, the previous symbol tells about the next; a Huffman table per previous symbol, or an adaptive coder of order 1 where those tables take the gain, saves {SizeText.Bytes(total.BytesAtStake)}.";

    private static List<FindingEvidence> Evidence(OrderProfile order0, OrderProfile order1, OneTable plain, CodePrice? contexts, long symbols)
    {
        List<FindingEvidence> evidence = [Rate("H0", order0.EntropyBitsPerSymbol), Rate("H1", order1.EntropyBitsPerSymbol)];
        if (order0.HeldOutBitsPerSymbol is { } held0 && order1.HeldOutBitsPerSymbol is { } held1)
        {
            evidence.Add(Rate("held-out, order 0", held0));
            evidence.Add(Rate("held-out, order 1", held1));
        }
        evidence.Add(plain.Evidence);
        if (contexts is { TotalBits: { } total, TableBits: { } tables })
        {
            evidence.Add(Bytes("Huffman per previous symbol, total", total));
            evidence.Add(Bytes("Huffman per previous symbol, tables", tables));
        }
        if (order1.AdaptiveBitsPerSymbol is { } rate) evidence.Add(Bytes("adaptive cost of order 1", (((long)Math.Ceiling(rate * symbols) + 7) / 8) * 8));
        return evidence;
    }
}
