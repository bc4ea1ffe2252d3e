using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using static Tallybound.Profiling.Findings.FindingMaking;

namespace Tallybound.Profiling.Findings;

/// <summary>Neither adaptive models nor a general-purpose codec find anything: the bytes look compressed or encrypted.</summary>
internal sealed class AlreadyDense : IFindingRule
{
    private const double LeastOfPlain = 0.99;
    private const long BlockBytes = 1 << 20;

    public string Id => "already-dense";

    public string Against => "coding it again";

    public string HoldsUnless => "The bytes come out of another compressor that can be undone first.";

    public Finding? Judge(SourceProfile source, ViewProfile view)
    {
        if (view.Referee is not { } referee || view.Orders is not [{ AdaptiveBitsPerSymbol: { } order0 }, { Order: 1, AdaptiveBitsPerSymbol: { } order1 }, ..]) return null;
        double plain = Math.Log2(view.AlphabetSize);
        if (Math.Min(order0, order1) < LeastOfPlain * plain) return null;
        RefereePrice? best = null;
        for (int i = 0; i < referee.Count; i++)
            if (referee[i].BlockBytes == BlockBytes && (best is null || referee[i].Bytes < best.Bytes)) best = referee[i];
        long raw = view.RawBits / 8;
        if (best is null || best.Bytes <= LeastOfPlain * raw) return null;
        return this.Claim(
            $"Already dense: {best.Codec} at level {best.Level} makes {SizeText.Bytes(best.Bytes)} of {SizeText.Bytes(raw)}, and adaptive models of order 0 and 1 stay within 1 % of {SizeText.Rate(plain)} bit/symbol.",
            0,
            Rate("adaptive cost of order 0", order0),
            Rate("adaptive cost of order 1", order1),
            Rate("plain symbols", plain),
            Bytes("as it stands", view.RawBits),
            Count($"{best.Codec}, level {best.Level}, blocks of 1 MiB", best.Bytes, "bytes"));
    }

    public string ClaimOfMany(FindingTotal total) => $"{total.Where}, the bytes are already dense: neither adaptive models nor the codecs tried save 1 %.";
}
