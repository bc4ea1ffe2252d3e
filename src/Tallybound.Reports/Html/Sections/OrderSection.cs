using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>What symbols of context are worth, with the figures that keep the plug-in entropy honest.</summary>
internal static class OrderSection
{
    /// <summary>Makes it.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section Of(ViewProfile view, string record) => new("orders", "Context orders", Message(view))
    {
        Charts = [OrderChart.Of(view)],
        Tables = [Orders(view, record)],
        HowToRead = "The plug-in entropy is a bound for coders that know all counts beforehand, at no cost. A coder that starts knowing nothing spends the adaptive cost; the held-out cost is what one half of the source costs under the other half's counts.",
        Caution = view.Orders.Any(order => order.ThinMass > OrderChart.ThinFrom)
            ? "Where the thin mass passes 5 %, the plug-in entropy is far too low: many pairs were seen once, and a count of one predicts itself. Take the adaptive cost."
            : null,
    };

    private static string Message(ViewProfile view)
    {
        string unit = Units.OfSymbol(view);
        OrderProfile zero = view.Orders[0];
        string first = $"Without context no coder with one fixed table could go below {SizeText.Rate(zero.EntropyBitsPerSymbol)} {unit}";
        if (zero.EntropyBitsPerSymbolInterval is [double low, double high]) first += $" (of sources like this one about {SizeText.Rate(low)} to {SizeText.Rate(high)})";
        List<OrderProfile> learned = [.. view.Orders.Where(order => order is { Order: > 0, AdaptiveBitsPerSymbol: not null })];
        if (learned.Count == 0 || zero.AdaptiveBitsPerSymbol is not { } without) return first + ".";
        OrderProfile best = learned.MinBy(order => order.AdaptiveBitsPerSymbol)!;
        double with = best.AdaptiveBitsPerSymbol!.Value;
        return with < without * (1 - OrderChart.LeastSaving / 100)
            ? $"{first}. With {best.Order.ToString(CultureInfo.InvariantCulture)} {(best.Order == 1 ? "symbol" : "symbols")} of context a coder that learns as it goes spends {SizeText.Rate(with)} {unit}, {SizeText.Rate(without - with)} less than without."
            : $"{first}. Context helps little or not at all: a coder that learns as it goes spends {SizeText.Rate(without)} {unit} without it and {SizeText.Rate(with)} with it.";
    }

    private static Table Orders(ViewProfile view, string record)
    {
        string unit = Units.OfSymbol(view);
        Column[] columns = [new("order"), new($"plug-in bound, {unit}"), new($"corrected, {unit}"), new($"adaptive cost, {unit}"), new($"held-out cost, {unit}"), new("contexts in use"), new("seen under 8 times"), new("pairs in use"), new("thin mass, %")];
        List<Row> rows = [.. view.Orders.Select((order, index) =>
        {
            string at = $"{record}/orders/{index.ToString(CultureInfo.InvariantCulture)}";
            return new Row(
            [
                NumberCells.Count(order.Order, at + "/order"), NumberCells.Rate(order.EntropyBitsPerSymbol, at + "/entropyBitsPerSymbol"), NumberCells.Rate(order.CorrectedBitsPerSymbol, at + "/correctedBitsPerSymbol"),
                NumberCells.Rate(order.AdaptiveBitsPerSymbol, at + "/adaptiveBitsPerSymbol"), NumberCells.Rate(order.HeldOutBitsPerSymbol, at + "/heldOutBitsPerSymbol"), NumberCells.Count(order.ContextsInUse, at + "/contextsInUse"),
                NumberCells.Count(order.ContextsSeenUnder8, at + "/contextsSeenUnder8"), NumberCells.Count(order.PairsInUse, at + "/pairsInUse"), NumberCells.Percent(order.ThinMass, at + "/thinMass"),
            ]);
        })];
        return new Table("Context orders. Thin mass is the share of predictions whose context and symbol were seen together once.", columns, rows);
    }
}
