using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>What each code costs on one view, with payload, table and framing apart.</summary>
internal static class RatesSection
{
    /// <summary>Makes it.</summary>
    /// <param name="view">The view.</param>
    /// <param name="record">Where the view stands in the record.</param>
    public static Section Of(ViewProfile view, string record)
    {
        CodeChoice best = CodeChoice.Cheapest(view);
        string message = best.Key == CodeChoice.Stored
            ? $"As one stored block it is {SizeText.Bytes(Bytes(view.StoredTotalBits))}; every code priced here is larger once its table and framing are charged."
            : $"As it stands it is {SizeText.Bytes(Bytes(view.RawBits))}; with {CodeText.Of(best.Key)} it is {SizeText.Bytes(Bytes(best.TotalBits))}, table and framing included: {SizeText.Ratio(view.RawBits, best.TotalBits)}, a saving of {SizeText.Saving(view.RawBits, best.TotalBits)}.";
        var tables = new List<Table> { Codes(view, record, best.Key) };
        if (view.Codes.Any(code => code.Radix != 2)) tables.Add(OtherRadices(view, record));
        return new Section("rates", "Rates", message)
        {
            Charts = [RatesChart.Of(view)],
            Tables = tables,
            HowToRead = "Each code is one table block over the whole source with a table of its own. Rate and efficiency leave table and framing out; the total holds them, and decides.",
            Caution = view.Codes.Any(code => !code.Exact) ? "tANS and range coding are priced from counts: their expected size in a steady state, not bits that were written." : null,
        };
    }

    private static Table Codes(ViewProfile view, string record, string best)
    {
        List<(CodePrice Code, int Index)> codes = [.. view.Codes.Select((code, index) => (code, index)).Where(pair => pair.code.TotalBits is not null)];
        var payload = new SizeColumn(codes.Select(pair => Bytes(pair.Code.PayloadBits)));
        var table = new SizeColumn(codes.Select(pair => Bytes(pair.Code.TableBits)));
        var framing = new SizeColumn(codes.Select(pair => Bytes(pair.Code.FramingBits)));
        var total = new SizeColumn(codes.Select(pair => Bytes(pair.Code.TotalBits)));
        string unit = Units.OfSymbol(view);
        Column[] columns = [new("code", IsText: true), new($"total, {total.Unit}"), new($"payload, {payload.Unit}"), new($"table, {table.Unit}"), new($"framing, {framing.Unit}"), new($"rate, {unit}"), new("efficiency, %"), new("longest code, bits"), new("wins from, symbols"), new("table format", IsText: true)];
        List<Row> rows = [.. codes.Select(pair =>
        {
            (CodePrice code, int index) = pair;
            string at = $"{record}/codes/{index.ToString(CultureInfo.InvariantCulture)}";
            string key = CodeChoice.KeyOf(code);
            return new Row(
            [
                new Cell(CodeText.Of(key)), total.Of(Bytes(code.TotalBits), at + "/totalBits"), payload.Of(Bytes(code.PayloadBits), at + "/payloadBits"),
                table.Of(Bytes(code.TableBits), at + "/tableBits"), framing.Of(Bytes(code.FramingBits), at + "/framingBits"), NumberCells.Rate(code.BitsPerSymbol, at + "/bitsPerSymbol"),
                NumberCells.Percent(code.Efficiency, at + "/efficiency"), NumberCells.Count(code.LongestCode, at + "/longestCode"), NumberCells.Count(code.BreakEvenSymbols, at + "/breakEvenSymbols"), new Cell(code.TableFormat ?? ""),
            ], key == best);
        })];
        return new Table("Codes by what they cost on the whole source. Parts are rounded up to whole bytes, the total is exact.", columns, rows);
    }

    private static Table OtherRadices(ViewProfile view, string record)
    {
        Column[] columns = [new("code", IsText: true), new("digits of the channel"), new("payload, digits"), new("rate, digit/symbol"), new("efficiency, %"), new("longest code, digits")];
        List<Row> rows = [.. view.Codes.Select((code, index) => (code, index)).Where(pair => pair.code.Radix != 2).Select(pair =>
        {
            (CodePrice code, int index) = pair;
            string at = $"{record}/codes/{index.ToString(CultureInfo.InvariantCulture)}";
            return new Row([new Cell($"{CodeText.Of(CodeChoice.KeyOf(code))}, radix {code.Radix.ToString(CultureInfo.InvariantCulture)}"), NumberCells.Count(code.Radix, at + "/radix"), NumberCells.Count(code.PayloadDigits, at + "/payloadDigits"),
                NumberCells.Rate(code.DigitsPerSymbol, at + "/digitsPerSymbol"), NumberCells.Percent(code.Efficiency, at + "/efficiency"), NumberCells.Count(code.LongestCode, at + "/longestCode")]);
        })];
        return new Table("Huffman codes for channels of more than two levels; tables left out.", columns, rows);
    }

    /// <summary>Bits as whole bytes, rounded up.</summary>
    internal static long Bytes(long bits) => (bits + 7) / 8;

    private static long? Bytes(long? bits) => bits is { } known ? Bytes(known) : null;
}
