using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Html.Sections;
using Tallybound.Reports.Html.Tables;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>The sections of the corpus page that look into its ten heaviest sources.</summary>
internal static class HeaviestSections
{
    /// <summary>Sources looked into.</summary>
    public const int Shown = 10;

    private static readonly long[] UsualBlocks = [4 << 10, 16 << 10, 64 << 10, 128 << 10, 1 << 20];

    /// <summary>What context is worth in each.</summary>
    public static Section Orders(IReadOnlyList<DrawnSource> sources)
    {
        List<Line> lines = [.. Lines(sources)];
        Column[] columns = [new("source", IsText: true), new("order-0 bound, bit/symbol"), new("adaptive order 0, bit/symbol"), new("adaptive order 1, bit/symbol"), new("adaptive order 2, bit/symbol"), new("held-out order 1, bit/symbol"), new("thin mass of order 2, %")];
        List<Row> rows = [.. lines.Select(line => new Row(
        [
            line.Name, Plugin(line, 0), Adaptive(line, 0), Adaptive(line, 1), Adaptive(line, 2),
            NumberCells.Rate(line.View.Orders.Count > 1 ? line.View.Orders[1].HeldOutBitsPerSymbol : null, line.Record + "/orders/1/heldOutBitsPerSymbol"),
            NumberCells.Percent(line.View.Orders.Count > 2 ? line.View.Orders[2].ThinMass : null, line.Record + "/orders/2/thinMass"),
        ]))];
        return new Section("orders", "Context orders", Counted("Of the {0} heaviest sources: what a coder that learns as it goes spends with no, one and two symbols of context.", lines))
        {
            Charts = [OrderMultiples.Of([.. sources.Take(Shown).Select(source => source.Profile)])],
            Tables = [new Table("Context orders of the heaviest sources.", columns, rows)],
            HowToRead = "A panel that falls to the right has structure that context reaches; one that rises pays for more contexts than its data can fill.",
            Caution = lines.Any(line => line.View.Orders.Any(order => order.ThinMass > OrderChart.ThinFrom)) ? "Where the thin mass is above 5 %, plug-in entropies of that order are far too low and are not shown here." : null,
        };
    }

    /// <summary>Blocks of symbols, and blocks that one table serves.</summary>
    public static Section Blocks(IReadOnlyList<DrawnSource> sources)
    {
        List<Line> lines = [.. Lines(sources)];
        Column[] columns = [new("source", IsText: true), new("best table block", IsText: true), .. UsualBlocks.Select(bytes => new Column($"above it at {SizeText.Whole(bytes)}, %")), new("best symbol block", IsText: true), new("saves against Huffman, %")];
        List<Row> rows = [.. lines.Select(line =>
        {
            TableBlockPrice? best = line.View.TableBlocks is { Count: > 0 } points ? BlockSizeChart.Best(points) : null;
            SymbolBlockProfile? block = line.View.SymbolBlocks.MinBy(candidate => candidate.Observed.TotalBits);
            long? huffman = line.View.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2 })?.TotalBits;
            return new Row(
            [
                line.Name, new Cell(best is null ? "" : SizeText.Whole(best.BlockBytes)) { SortKey = best?.BlockBytes.ToString(CultureInfo.InvariantCulture) },
                .. UsualBlocks.Select(bytes => new Cell(Above(line.View, bytes, best))),
                new Cell(block is null ? "" : $"{block.BlockLength.ToString(CultureInfo.InvariantCulture)} symbols"), new Cell(block is null || huffman is null ? "" : Percent(huffman.Value - block.Observed.TotalBits, huffman.Value)),
            ]);
        })];
        return new Section("blocks", "Blocks", Counted("Of the {0} heaviest sources: how much data one table should serve, what other sizes cost, and whether coding several symbols at a time pays.", lines))
        {
            Tables = [new Table("Table blocks and symbol blocks of the heaviest sources, tables and framing charged; a saving below 0 is a loss.", columns, rows)],
            HowToRead = "A table block is the stretch that one table serves; a symbol block is several symbols coded as one. Sizes above the source's own are one block, and equal the largest.",
        };
    }

    /// <summary>Whether the statistics change within each.</summary>
    public static Section Drift(IReadOnlyList<DrawnSource> sources)
    {
        List<Line> lines = [.. Lines(sources).Where(line => line.View is { Segments: not null, AdaptiveSplit: not null })];
        if (lines.Count == 0) return new Section("segments", "Segments and drift", "None of the heaviest sources is longer than one segment, so nothing can be said of change within them.");
        Column[] columns = [new("source", IsText: true), new("segments"), new("stretches found"), new("split saves against one table, %"), new("greatest divergence, bits")];
        List<Row> rows = [.. lines.Select(line =>
        {
            AdaptiveSplitProfile split = line.View.AdaptiveSplit!;
            long? huffman = line.View.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2 })?.TotalBits;
            return new Row(
            [
                line.Name, NumberCells.Count(line.View.Segments!.OwnTableBits.Count), NumberCells.Count(split.Starts.Count),
                new Cell(huffman is null ? "" : Percent(huffman.Value - split.TotalBits, huffman.Value)), NumberCells.Rate(line.View.Segments.DivergenceBits.Max()),
            ]);
        })];
        return new Section("segments", "Segments and drift", Counted("Of the {0} heaviest sources: whether the statistics change within them, and what tables for stretches would save.", lines))
        {
            Tables = [new Table("Change within the heaviest sources. Divergence is Jensen–Shannon from the whole source, 0 for alike, 1 for nothing in common.", columns, rows)],
            HowToRead = "The split is the best found, not proved best; its tables are charged. Below 0 it costs more than one table would.",
        };
    }

    /// <summary>Symbols and code lengths of each.</summary>
    public static Section Symbols(IReadOnlyList<DrawnSource> sources)
    {
        List<Line> lines = [.. Lines(sources)];
        Column[] columns = [new("source", IsText: true), new("symbols in use"), new("most frequent, %"), new("Huffman above the bound, bit/symbol"), new("longest code, bits"), new("least limit that costs nothing, bits")];
        List<Row> rows = [.. lines.Select(line =>
        {
            int huffman = Array.FindIndex([.. line.View.Codes], code => code is { Code: "huffman", Radix: 2 });
            CodePrice? code = huffman < 0 ? null : line.View.Codes[huffman];
            string at = $"{line.Record}/codes/{huffman.ToString(CultureInfo.InvariantCulture)}";
            IReadOnlyList<SymbolLine> ranked = SymbolLine.Ranked(line.View);
            return new Row(
            [
                line.Name, NumberCells.Count(line.View.SymbolsInUse, line.Record + "/symbolsInUse"), ranked.Count == 0 ? Cell.Empty : NumberCells.Percent(ranked[0].Share),
                NumberCells.Rate(code?.RedundancyBitsPerSymbol, at + "/redundancyBitsPerSymbol"), NumberCells.Count(code?.LongestCode, at + "/longestCode"),
                NumberCells.Count(line.View.Codes.FirstOrDefault(limited => limited.LimitCostBits == 0)?.LengthLimit),
            ]);
        })];
        return new Section("symbols", "Symbols and code lengths", Counted("Of the {0} heaviest sources: how many symbols they use, and what whole code lengths and limits cost.", lines))
        {
            Tables = [new Table("Symbols and Huffman codes of the heaviest sources.", columns, rows)],
        };
    }

    private static IEnumerable<Line> Lines(IReadOnlyList<DrawnSource> sources) => sources.Take(Shown).Where(source => source.Profile.Views is [{ Symbols: > 0 }, ..])
        .Select(source => new Line(new Cell(source.Profile.Name) { Link = SourceFile.Of(source) }, source.Profile.Views![0], $"/sources/{source.Place.ToString(CultureInfo.InvariantCulture)}/views/0"));

    private static string Counted(string sentence, List<Line> lines) => sentence.Replace("{0}", lines.Count.ToString(CultureInfo.InvariantCulture), StringComparison.Ordinal);

    private static Cell Plugin(Line line, int order) => NumberCells.Rate(order < line.View.Orders.Count ? line.View.Orders[order].EntropyBitsPerSymbol : null, $"{line.Record}/orders/{order.ToString(CultureInfo.InvariantCulture)}/entropyBitsPerSymbol");

    private static Cell Adaptive(Line line, int order) => NumberCells.Rate(order < line.View.Orders.Count ? line.View.Orders[order].AdaptiveBitsPerSymbol : null, $"{line.Record}/orders/{order.ToString(CultureInfo.InvariantCulture)}/adaptiveBitsPerSymbol");

    private static string Above(ViewProfile view, long bytes, TableBlockPrice? best)
    {
        TableBlockPrice? point = view.TableBlocks?.FirstOrDefault(candidate => candidate.BlockBytes == bytes);
        return point is null || best is null || best.TotalBits == 0 ? "" : (point.Exact ? "" : "about ") + Percent(point.TotalBits - best.TotalBits, best.TotalBits);
    }

    private static string Percent(long part, long whole) => whole == 0 ? "" : (100.0 * part / whole).ToString("0.0;−0.0;0.0", CultureInfo.InvariantCulture);

    private readonly record struct Line(Cell Name, ViewProfile View, string Record);
}
