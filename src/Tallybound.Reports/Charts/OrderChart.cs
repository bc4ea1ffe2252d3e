using System.Globalization;
using ScottPlot;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>Rates by context order: the plug-in figure, broken where counts are thin, its correction, and the costs of coders that must learn.</summary>
internal static class OrderChart
{
    /// <summary>Thin mass from which a plug-in figure is drawn broken.</summary>
    public const double ThinFrom = 0.05;

    /// <summary>Savings below this many per cent are called next to nothing.</summary>
    public const double LeastSaving = 0.5;

    /// <summary>Draws it.</summary>
    public static Chart Of(ViewProfile view)
    {
        if (view.Orders.Count < 2) return Chart.Instead("Only order 0 was counted, so there is no curve over context orders.");
        string unit = Units.OfSymbol(view);
        List<Curve> curves =
        [
            new("plug-in bound", CurveKind.Bound, CodeFamily.Context, [.. view.Orders.Select(order => new CurvePoint(order.Order, order.EntropyBitsPerSymbol, order.ThinMass > ThinFrom))]),
            new("corrected", CurveKind.Estimate, CodeFamily.Raw, [.. view.Orders.Select(order => new CurvePoint(order.Order, order.CorrectedBitsPerSymbol, order.ThinMass > ThinFrom))], MarkerShape.FilledDiamond),
        ];
        CurvePoint[] heldOut = [.. view.Orders.Where(order => order.HeldOutBitsPerSymbol is not null).Select(order => new CurvePoint(order.Order, order.HeldOutBitsPerSymbol!.Value))];
        if (heldOut.Length > 0) curves.Add(new Curve("held-out cost", CurveKind.OtherCodedSize, CodeFamily.Context, heldOut, MarkerShape.OpenSquare));
        CurvePoint[] adaptive = [.. view.Orders.Where(order => order.AdaptiveBitsPerSymbol is not null).Select(order => new CurvePoint(order.Order, order.AdaptiveBitsPerSymbol!.Value))];
        if (adaptive.Length > 0) curves.Add(new Curve("adaptive cost", CurveKind.CodedSize, CodeFamily.Context, adaptive));
        string title = Title(view, unit);
        string alternative = $"{title}. " + string.Join("; ", view.Orders.Select(order => InWords(order, unit))) + ".";
        return Chart.Of(Curves.Draw("order-curve", title, $"{unit} by symbols of context; broken line, hollow points: more than 5 % of predictions rest on pairs seen once", alternative, curves,
            [.. view.Orders.Select(order => ((double)order.Order, "order " + order.Order.ToString(CultureInfo.InvariantCulture)))]));
    }

    private static string Title(ViewProfile view, string unit)
    {
        List<OrderProfile> learned = [.. view.Orders.Where(order => order.AdaptiveBitsPerSymbol is not null)];
        if (learned.Count == 0) return $"Plug-in entropy falls from {SizeText.Rate(view.Orders[0].EntropyBitsPerSymbol)} to {SizeText.Rate(view.Orders[^1].EntropyBitsPerSymbol)} {unit} over {view.Orders.Count} orders";
        OrderProfile best = learned.MinBy(order => order.AdaptiveBitsPerSymbol)!;
        double zero = learned[0].AdaptiveBitsPerSymbol!.Value, least = best.AdaptiveBitsPerSymbol!.Value;
        if (best.Order == 0) return $"Context gains nothing: a coder that learns spends {SizeText.Rate(zero)} {unit} without it, more with it";
        double saving = 100 * (zero - least) / zero;
        if (saving < LeastSaving) return $"Context gains next to nothing: a coder that learns spends {SizeText.Rate(zero)} {unit} without it, {SizeText.Rate(least)} at best with it";
        return $"{Symbols(best.Order)} of context save a coder that learns {saving.ToString(saving < 10 ? "0.0" : "0", CultureInfo.InvariantCulture)} %: {SizeText.Rate(zero)} to {SizeText.Rate(least)} {unit}";
    }

    private static string Symbols(int order) => order switch { 1 => "One symbol", 2 => "Two symbols", _ => $"{order.ToString(CultureInfo.InvariantCulture)} symbols" };

    private static string InWords(OrderProfile order, string unit)
    {
        string words = $"order {order.Order.ToString(CultureInfo.InvariantCulture)}: plug-in {SizeText.Rate(order.EntropyBitsPerSymbol)}, corrected {SizeText.Rate(order.CorrectedBitsPerSymbol)}";
        if (order.AdaptiveBitsPerSymbol is { } adaptive) words += $", adaptive {SizeText.Rate(adaptive)}";
        if (order.HeldOutBitsPerSymbol is { } heldOut) words += $", held-out {SizeText.Rate(heldOut)}";
        return $"{words} {unit}{(order.ThinMass > ThinFrom ? ", plug-in on thin counts" : "")}";
    }
}
