using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Html.Sections;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>The whole under each code, the entropy figures beside it, and how the sources spread.</summary>
internal static class CorpusRatesSection
{
    /// <summary>Makes it.</summary>
    public static Section Of(CorpusProfile corpus)
    {
        var tables = new List<Table> { Totals(corpus) };
        if (corpus.Bounds is { } bounds) tables.Add(Bounds(corpus.Bytes, bounds));
        if (corpus.Quantiles is { } quantiles && corpus.Profiled + corpus.Partial > 1) tables.Add(Quantiles(quantiles));
        return new Section("rates", "Rates", corpus.Verdict?.Sentence ?? "")
        {
            Tables = tables,
            HowToRead = "Sizes hold payload, table and framing of every source; a source that a code would grow counts as stored. Bounds leave the model out and are no sizes: they say what coders of their class cannot pass.",
        };
    }

    private static Table Totals(CorpusProfile corpus)
    {
        var size = new SizeColumn(corpus.Totals.Values.Select(bytes => (long?)bytes));
        return new Table("Sizes of the whole, each source with a table of its own.", [new("code", IsText: true), new($"size, {size.Unit}"), new("bit/byte"), new("raw ÷ coded"), new("saving, %")],
            [.. corpus.Totals.Select(total => new Row(
            [
                new Cell(CodeText.Of(total.Key)), size.Of(total.Value, "/corpus/totals/" + total.Key), new Cell(SizeText.Rate(8.0 * total.Value / corpus.Bytes)) { Record = $"/corpus/totals/{total.Key} over /corpus/bytes", Unit = "bit/byte" },
                NumberCells.Ratio(corpus.Bytes, total.Value, "/corpus/bytes", "/corpus/totals/" + total.Key), Saving(corpus.Bytes, total.Value, "/corpus/totals/" + total.Key),
            ], total.Key == corpus.Verdict?.Code))]);
    }

    private static Table Bounds(long raw, CorpusBounds bounds)
    {
        (string Name, long? Bits, string Member)[] figures =
        [
            ("static order-0 bound: one fixed table a source, no memory", bounds.Order0BoundBits, "order0BoundBits"),
            ("adaptive cost, order 0", bounds.AdaptiveOrder0Bits, "adaptiveOrder0Bits"),
            ("adaptive cost, order 1", bounds.AdaptiveOrder1Bits, "adaptiveOrder1Bits"),
            ("adaptive cost, order 2", bounds.AdaptiveOrder2Bits, "adaptiveOrder2Bits"),
        ];
        var size = new SizeColumn(figures.Select(figure => figure.Bits is { } bits ? RatesSection.Bytes(bits) : (long?)null));
        return new Table("What the counts alone say, added up over sources. The bound leaves the model out; an adaptive cost leaves nothing out.", [new("figure", IsText: true), new($"{size.Unit}"), new("bit/byte")],
            [.. figures.Where(figure => figure.Bits is not null).Select(figure => new Row(
            [
                new Cell(figure.Name), size.Of(RatesSection.Bytes(figure.Bits!.Value), "/corpus/bounds/" + figure.Member), new Cell(SizeText.Rate((double)figure.Bits.Value / raw)),
            ]))]);
    }

    private static Table Quantiles(CorpusQuantiles quantiles) => new("Huffman rate of sources, table and framing included: the nearest-rank quantiles over sources of at least one byte. No mean of ratios is formed.",
        [new("share of sources at or below"), new("bit/byte")],
        [.. new (string, double, string)[] {("5 %", quantiles.P05, "p05"), ("25 %", quantiles.P25, "p25"), ("50 %", quantiles.P50, "p50"), ("75 %", quantiles.P75, "p75"), ("95 %", quantiles.P95, "p95") }
            .Select(quantile => new Row([new Cell(quantile.Item1), NumberCells.Rate(quantile.Item2, "/corpus/quantiles/" + quantile.Item3)]))]);

    private static Cell Saving(long raw, long coded, string record) => new((100.0 * (raw - coded) / raw).ToString("0.0", CultureInfo.InvariantCulture)) { Record = $"{record} over /corpus/bytes", Unit = "% saved" };
}
