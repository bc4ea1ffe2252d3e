using System.Text.Json;
using CsCheck;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Numerics;
using Xunit;

namespace Tallybound.Tests.Coding.Measures;

public sealed class ContextMeasuresTests
{
    /// <summary>Sequences over 1 to 40 symbols, lopsided or even, long enough for every order drawn.</summary>
    private static readonly Gen<(int[] Symbols, int AlphabetSize, int Order, int FoldLength)> s_sequences =
        Gen.Select(Gen.Int[1, 40], Gen.Int[0, 3], Gen.Int[1, 50], Gen.Int[1, 3]).SelectMany((alphabet, order, fold, lopsided) =>
            Gen.Double[0, 0.9999].Select(u => (int)(Math.Pow(u, lopsided) * alphabet)).Array[order + 1, 400]
                .Select(symbols => (symbols, alphabet, order, fold)));

    [Fact]
    public void Plug_in_entropy_is_the_mean_self_information_after_each_context() =>
        s_sequences.Sample(s =>
        {
            var naive = new NaiveContexts(s.Symbols, s.AlphabetSize, s.Order, s.FoldLength);
            return Close(naive.Figures().EntropyBitsPerSymbol * naive.Predicted, naive.InformationBits());
        });

    [Fact]
    public void Adaptive_cost_is_what_the_sequential_coder_spends_at_its_best_alpha() =>
        s_sequences.Sample(s =>
        {
            var naive = new NaiveContexts(s.Symbols, s.AlphabetSize, s.Order, s.FoldLength);
            OrderFigures figures = naive.Figures();
            int grid = (int)Math.Ceiling(Math.Log2(s.AlphabetSize)) + 1;
            double best = Enumerable.Range(0, grid).Min(j => naive.AdaptiveBits(Math.Pow(2, -j)));
            double stated = figures.AdaptiveBitsPerSymbol!.Value * s.Symbols.Length - Math.Ceiling(Math.Log2(grid));
            return Close(stated, best)
                && Close(naive.AdaptiveBits(Math.Pow(2, -figures.AdaptiveAlphaExponent!.Value)), best);
        }, iter: 500);

    [Fact]
    public void Adaptive_bits_are_never_below_the_plug_in_information() =>
        s_sequences.Sample(s =>
        {
            OrderFigures figures = new NaiveContexts(s.Symbols, s.AlphabetSize, s.Order, s.FoldLength).Figures();
            return figures.AdaptiveBitsPerSymbol!.Value * s.Symbols.Length >= figures.EntropyBitsPerSymbol * figures.Predicted;
        });

    [Fact]
    public void Held_out_cost_is_what_each_fold_pays_by_the_other() =>
        s_sequences.Sample(s =>
        {
            var naive = new NaiveContexts(s.Symbols, s.AlphabetSize, s.Order, s.FoldLength);
            OrderFigures figures = naive.Figures();
            (double bits, long escapes) = naive.HeldOut();
            return Close(figures.HeldOutBitsPerSymbol!.Value * naive.Predicted, bits) && figures.HeldOutEscapes == escapes;
        });

    [Fact]
    public void Thinness_counts_contexts_and_pairs() =>
        s_sequences.Sample(s =>
        {
            OrderFigures figures = new NaiveContexts(s.Symbols, s.AlphabetSize, s.Order, s.FoldLength).Figures();
            var pairs = Enumerable.Range(s.Order, s.Symbols.Length - s.Order)
                .GroupBy(i => string.Join(',', s.Symbols[(i - s.Order)..i]), StringComparer.Ordinal)
                .Select(context => context.GroupBy(i => s.Symbols[i]).Select(pair => pair.Count()).ToList()).ToList();
            int predicted = s.Symbols.Length - s.Order, inUse = pairs.Sum(row => row.Count);
            return figures.Predicted == predicted
                && figures.ContextsInUse == pairs.Count
                && figures.ContextsSeenUnder8 == pairs.Count(row => row.Sum() < 8)
                && figures.PairsInUse == inUse
                && Close(figures.ThinMass, (double)pairs.Sum(row => row.Count(n => n == 1)) / predicted)
                && Close(figures.CorrectedBitsPerSymbol, figures.EntropyBitsPerSymbol + (inUse - pairs.Count) / (2.0 * predicted * Math.Log(2)));
        });

    [Fact]
    public void Order_0_says_bit_for_bit_what_the_entropy_says() =>
        Gen.Long[0, 1L << 40].Array[1, 64].Where(counts => counts.Sum() > 0).Sample(counts =>
        {
            var measures = new ContextMeasures(256, 0);
            measures.AddContext(counts, new long[counts.Length]);
            OrderFigures figures = measures.Finish(counts.Sum(), heldOut: false);
            return figures.EntropyBitsPerSymbol == Entropy.BitsPerSymbol(counts)
                && Close(figures.CorrectedBitsPerSymbol, Entropy.Corrected(figures.EntropyBitsPerSymbol, counts.Count(n => n > 0), counts.Sum()))
                && Close(figures.StandardErrorBits, Entropy.StandardErrorBits(counts))
                && figures.ContextsInUse == 1;
        });

    /// <summary>The variance over all pairs, the second way: E[I²] - E[I]².</summary>
    [Fact]
    public void The_standard_error_spreads_over_all_contexts() =>
        Gen.Long[0, 5000].Array[2, 30].List[1, 20].Where(rows => rows.Sum(row => row.Sum()) > 0).Sample(rows =>
        {
            var measures = new ContextMeasures(30, 1);
            double total = rows.Sum(row => row.Sum()), mean = 0, square = 0;
            foreach (long[] row in rows)
            {
                measures.AddContext(row, new long[row.Length]);
                foreach (long n in row.Where(n => n > 0))
                {
                    double information = Math.Log2((double)row.Sum() / n);
                    mean += n / total * information;
                    square += n / total * information * information;
                }
            }
            double variance = Math.Max(0, square - mean * mean);
            return Math.Abs(Math.Pow(measures.Finish((long)total, heldOut: false).StandardErrorBits, 2) * total - variance) <= 1e-10;
        });

    [Fact]
    public void Reset_leaves_nothing_behind() =>
        Gen.Select(s_sequences, s_sequences).Sample((a, b) =>
        {
            var used = new ContextMeasures(b.AlphabetSize, b.Order);
            if (a.AlphabetSize <= b.AlphabetSize) new NaiveContexts(a.Symbols, a.AlphabetSize, a.Order, a.FoldLength).Feed(used);
            used.AddContext([1_000_000], [1_000_000_000_000]);
            used.Reset();
            var naive = new NaiveContexts(b.Symbols, b.AlphabetSize, b.Order, b.FoldLength);
            naive.Feed(used);
            return used.Finish(b.Symbols.Length, true) == naive.Figures();
        });

    [Fact]
    public void Absent_symbols_may_be_left_in_or_out() =>
        Gen.Select(Gen.Int[0, 3], Gen.Int[0, 3]).Array[1, 40].List[1, 10].Where(rows => rows.Any(row => row.Any(n => n.Item1 + n.Item2 > 0))).Sample(rows =>
        {
            ContextMeasures dense = new(40, 1), sparse = new(40, 1);
            foreach ((int, int)[] row in rows)
            {
                dense.AddContext([.. row.Select(n => (long)n.Item1)], [.. row.Select(n => (long)n.Item2)]);
                var kept = row.Where(n => n.Item1 + n.Item2 > 0).ToList();
                sparse.AddContext([.. kept.Select(n => (long)n.Item1)], [.. kept.Select(n => (long)n.Item2)]);
            }
            return dense.Finish(1000, true) == sparse.Finish(1000, true);
        });

    /// <summary>Counts of every size in one order, below and above every table.</summary>
    [Fact]
    public void Counts_of_any_size_give_the_figures_of_the_formulas() =>
        Gen.Select(Gen.Int[8, 36], Gen.Long[0, 1L << 36], Gen.Long[0, 1L << 36]).Select((shift, a, b) => (A: a >> shift, B: b >> shift)).Array[1, 17].List[1, 12]
            .Where(rows => rows.Any(row => row.Any(n => n.A + n.B > 0))).Sample(rows =>
        {
            var measures = new ContextMeasures(17, 1);
            long predicted = 0;
            double information = 0, heldOut = 0;
            var adaptive = new double[6];
            foreach ((long A, long B)[] row in rows)
            {
                long[] fold0 = [.. row.Select(n => n.A)], fold1 = [.. row.Select(n => n.B)], both = [.. row.Select(n => n.A + n.B)];
                measures.AddContext(fold0, fold1);
                predicted += both.Sum();
                information += Entropy.Bound(both).Bits;
                heldOut += HeldOutBits(fold0, fold1, 17) + HeldOutBits(fold1, fold0, 17);
                for (int j = 0; j < adaptive.Length; j++) adaptive[j] += AdaptiveCost.Bits(both, 17, Math.Pow(2, -j));
            }
            OrderFigures figures = measures.Finish(predicted + 1, heldOut: true);
            return Close(figures.EntropyBitsPerSymbol * predicted, information)
                && Close(figures.HeldOutBitsPerSymbol!.Value * predicted, heldOut)
                && Close(figures.AdaptiveBitsPerSymbol!.Value * (predicted + 1), adaptive.Min() + Math.Log2(17) + 3);
        });

    private static double HeldOutBits(long[] training, long[] paying, int alphabetSize)
    {
        long total = training.Sum(), distinct = training.Count(n => n > 0), weight = distinct == alphabetSize ? total : total + distinct;
        double bits = 0;
        for (int i = 0; i < training.Length; i++)
        {
            if (paying[i] == 0) continue;
            bits += paying[i] * (total == 0 ? Math.Log2(alphabetSize)
                : training[i] > 0 ? Entropy.SelfInformation(training[i], weight)
                : Entropy.SelfInformation(distinct, weight) + Math.Log2(alphabetSize - distinct));
        }
        return bits;
    }

    /// <summary>Counts past every table, where lnΓ itself has too few digits: the excess over the information is that of a closed form.</summary>
    [Fact]
    public void Adaptive_cost_of_one_long_run_keeps_its_digits()
    {
        var measures = new ContextMeasures(2, 0);
        const long n = 1_000_000_000_000;
        measures.AddContext([n, 0], [0, 0]);
        OrderFigures figures = measures.Finish(n, heldOut: true);
        // α = ½: log2 of Γ(n+1)Γ(½)/Γ(n+½), ½ log2(πn) + log2(e)/(8n); one bit names α.
        double expected = 0.5 * Math.Log2(Math.PI * n) + 1;
        Assert.Equal(1, figures.AdaptiveAlphaExponent);
        Assert.Equal(expected / n, figures.AdaptiveBitsPerSymbol!.Value, 1e-12 * expected / n);
    }

    [Fact]
    public void The_bit_string_of_de_Bruijn_hides_its_rule_up_to_order_3()
    {
        JsonElement vector = MeasureVectors.Of("debruijn");
        int[] bits = [.. vector.Text().Select(c => c - '0')];
        double[] expected = vector.Expected();
        for (int order = 0; order < expected.Length; order++)
            Assert.Equal(expected[order], new NaiveContexts(bits, 2, order, 4096).Figures().EntropyBitsPerSymbol, vector.Tolerance());
        Assert.Equal(5, expected.Length);
    }

    [Fact]
    public void Orders_0_and_1_of_a_short_text()
    {
        JsonElement vector = MeasureVectors.Of("abra");
        int[] text = [.. vector.Text().Select(c => (int)c)];
        Assert.Equal(vector.Expected()[0], new NaiveContexts(text, 256, 0, 4096).Figures().EntropyBitsPerSymbol, vector.Tolerance());
        Assert.Equal(vector.Expected()[1], new NaiveContexts(text, 256, 1, 4096).Figures().EntropyBitsPerSymbol, vector.Tolerance());
    }

    [Fact]
    public void Order_1_of_a_source_that_repeats_half_of_the_time()
    {
        JsonElement vector = MeasureVectors.Of("lntwww-q1-order1");
        var measures = new ContextMeasures(4, 1);
        foreach (JsonElement row in vector.GetProperty("input").EnumerateArray())
            measures.AddContext([.. row.EnumerateArray().Select(n => n.GetInt64())], new long[4]);
        Assert.Equal(vector.Expected()[0], measures.Finish(201, heldOut: false).EntropyBitsPerSymbol, vector.Tolerance());
    }

    /// <summary>The known bias of plug-in figures on thin data: 64 KiB of random bytes, whose truth is 8.</summary>
    [Fact]
    public void On_thin_data_only_adaptive_and_held_out_figures_stay_honest()
    {
        var random = new SplitMix64(20_260_101);
        var bytes = new int[65_536];
        for (int i = 0; i < bytes.Length; i++) bytes[i] = random.Below(256);
        OrderFigures one = new NaiveContexts(bytes, 256, 1, 4096).Figures(), two = new NaiveContexts(bytes, 256, 2, 4096).Figures();
        Assert.Equal(7.17, one.EntropyBitsPerSymbol, 0.02);
        Assert.Equal(7.63, one.CorrectedBitsPerSymbol, 0.02);
        Assert.Equal(0.83, two.EntropyBitsPerSymbol, 0.02);
        Assert.Equal(1.09, two.CorrectedBitsPerSymbol, 0.02);
        Assert.InRange(one.ThinMass, 0.3, 0.45);
        foreach (OrderFigures figures in (OrderFigures[])[one, two])
        {
            Assert.InRange(figures.AdaptiveBitsPerSymbol!.Value, 8, 8.5);
            Assert.InRange(figures.HeldOutBitsPerSymbol!.Value, 8, 9.5);
        }
    }

    [Fact]
    public void What_was_not_computed_is_absent()
    {
        var open = new ContextMeasures(0, 1);
        open.AddContext([3, 1], [1, 1]);
        OrderFigures figures = open.Finish(7, heldOut: true);
        Assert.Null(figures.AdaptiveBitsPerSymbol);
        Assert.Null(figures.AdaptiveAlphaExponent);
        Assert.Null(figures.HeldOutBitsPerSymbol);
        Assert.Null(figures.HeldOutEscapes);

        var waived = new ContextMeasures(4, 1);
        Assert.Throws<InvalidOperationException>(() => waived.Finish(0, heldOut: false));
        waived.Reset(foldsWanted: false);
        waived.AddContext([3, 1], [1, 1]);
        Assert.Null(waived.Finish(7, heldOut: false).HeldOutBitsPerSymbol);
        Assert.Throws<InvalidOperationException>(() => waived.Finish(7, heldOut: true));
    }

    [Fact]
    public void What_cannot_be_is_refused()
    {
        var measures = new ContextMeasures(2, 1);
        Assert.Throws<ArgumentException>(() => measures.AddContext([1, 2], [1]));
        Assert.Throws<ArgumentException>(() => measures.AddContext([1, 2, 3], [1, 2, 3]));
        Assert.Throws<ArgumentOutOfRangeException>(() => new ContextMeasures(2, -1));
        Assert.Throws<ArgumentOutOfRangeException>(() => new ContextMeasures(-1, 1));
    }

    private static bool Close(double a, double b) => Math.Abs(a - b) <= 1e-10 * Math.Max(1, Math.Abs(b));
}
