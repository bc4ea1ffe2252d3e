using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>What one fold costs when it is coded by the counts of the other, summed over contexts.</summary>
/// <remarks>
/// With n(c) and d the symbols and the distinct symbols after c in training: a seen symbol has probability n(c,s)/(n(c)+d), n(c,s)/n(c) where
/// d is the whole alphabet; an unseen one d/(n(c)+d) · 1/(A-d); after an unseen context, 1/A. This is escape method C of
/// A. Moffat, Implementing the PPM data compression scheme, IEEE Transactions on Communications 38 (1990), ending in a uniform distribution over what is left.
/// </remarks>
internal sealed class HeldOutCost(int alphabetSize)
{
    private readonly double _uniformBits = Math.Log2(alphabetSize);
    private NeumaierSum _bits;

    public double Bits => _bits.Value;

    /// <summary>Symbols that training had not seen after their context.</summary>
    public long Escapes { get; private set; }

    /// <summary>Adds one context in one direction.</summary>
    /// <param name="training">Counts of the training fold.</param>
    /// <param name="seen">Their summary.</param>
    /// <param name="paying">Counts of the fold that pays, aligned with training.</param>
    /// <param name="payingTotal">Their sum.</param>
    public void Add(ReadOnlySpan<long> training, in FoldSummary seen, ReadOnlySpan<long> paying, long payingTotal)
    {
        if (payingTotal == 0) return;
        if (seen.Total == 0)
        {
            _bits.Add(payingTotal * _uniformBits);
            Escapes += payingTotal;
            return;
        }
        // Every cost is measured from that of training's commonest symbol: all terms are at or above 0, and nothing cancels where that symbol rules.
        double most = Log2Table.Of(seen.Largest), above = 0;
        long unseen = 0;
        for (int i = 0; i < training.Length; i++)
        {
            long pays = paying[i], known = training[i];
            long escaping = known == 0 ? pays : 0;
            unseen += escaping;
            above += (pays - escaping) * (most - Log2Table.Of(known));
        }
        long weight = seen.Distinct == alphabetSize ? seen.Total : seen.Total + seen.Distinct;
        if (payingTotal != unseen) _bits.Add(above + (payingTotal - unseen) * Ratio(seen.Largest, weight));
        if (unseen == 0) return;
        _bits.Add(unseen * (Ratio(seen.Distinct, weight) + Log2Table.Of(alphabetSize - seen.Distinct)));
        Escapes += unseen;
    }

    public void Clear()
    {
        _bits = default;
        Escapes = 0;
    }

    /// <summary>log2(total/count): from the table where that keeps eleven digits.</summary>
    private static double Ratio(long count, long total) => total < Log2Table.Limit
        ? Log2Table.Of(total) - Log2Table.Of(count)
        : Entropy.SelfInformation(count, total);
}

/// <summary>The counts of one context in one fold, summed up.</summary>
internal readonly record struct FoldSummary(long Total, int Distinct, long Largest);
