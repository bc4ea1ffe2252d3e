using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>The symbols, their counts and their code lengths.</summary>
internal static class SymbolSection
{
    /// <summary>Makes it.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section Of(ViewProfile view, string record)
    {
        string message = $"{SizeText.Count(view.Symbols)} symbols, {SizeText.Count(view.SymbolsInUse)} different ones of {SizeText.Count(view.AlphabetSize)} possible.";
        if (view.Uniformity is { } uniformity)
        {
            message += uniformity.UpperTailProbability < 1e-6
                ? $" They are not equally frequent: chi-square {uniformity.ChiSquare.ToString("N1", CultureInfo.InvariantCulture)} on {SizeText.Count(uniformity.DegreesOfFreedom)} degrees of freedom."
                : $" Equal frequencies are not ruled out: chi-square {uniformity.ChiSquare.ToString("N1", CultureInfo.InvariantCulture)} on {SizeText.Count(uniformity.DegreesOfFreedom)} degrees of freedom, reached by chance in {(100 * uniformity.UpperTailProbability).ToString("0.00", CultureInfo.InvariantCulture)} % of uniform sources.";
        }
        IReadOnlyList<SymbolLine> symbols = SymbolLine.Ranked(view);
        return new Section("symbols", "Symbols and code lengths", message)
        {
            Charts = [CodeLengthChart.Of(view), HistogramChart.Of(view)],
            FoldedTables = symbols.Count > 0 ? [Symbols(view, symbols, record)] : [],
            HowToRead = "Where the staircase lies above the thin line the code spends more than the symbol holds, where it lies below it spends less. Chi-square says nothing about order: a counter that runs through all values is uniform too.",
            Caution = "A table of symbols and code lengths shows what the data holds.",
        };
    }

    private static Table Symbols(ViewProfile view, IReadOnlyList<SymbolLine> symbols, string record)
    {
        List<Row> rows = [.. symbols.Select(line => new Row(
        [
            new Cell(SymbolText.Of(view, line.Symbol)) { SortKey = line.Symbol.ToString(CultureInfo.InvariantCulture) },
            NumberCells.Count(line.Count, $"{record}/symbolCounts/{line.Symbol.ToString(CultureInfo.InvariantCulture)}"),
            new Cell((100 * line.Share).ToString("0.0000", CultureInfo.InvariantCulture)), NumberCells.Rate(line.SelfInformationBits),
            NumberCells.Count(line.CodeLength, $"{record}/codeLengths/{line.Symbol.ToString(CultureInfo.InvariantCulture)}"),
        ]))];
        return new Table($"All {SizeText.Count(symbols.Count)} symbols in use, the most frequent first.", [new("symbol", IsText: true), new("count"), new("share, %"), new("log2(1/p), bits"), new("Huffman code, bits")], rows);
    }
}
