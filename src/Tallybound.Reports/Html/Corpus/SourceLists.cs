using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Html.Tables;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>The lists of sources on the corpus page: all that were read, what was not, what is there twice.</summary>
internal static class SourceLists
{
    /// <summary>Above this many rows sizes are written out exactly instead of rounded with the exact number in a title: the page stays small.</summary>
    private const int RoundedUpTo = 1000;

    /// <summary>Sources that were read, by bytes.</summary>
    public static Table Read(ReportContent content)
    {
        IReadOnlyList<SourceSummary> listed = content.Listed;
        bool rounded = listed.Count <= RoundedUpTo;
        var raw = new SizeColumn(listed.Select(source => source.Bytes));
        var best = new SizeColumn(listed.Select(source => source.BestBytes));
        Column[] columns = [new("source", IsText: true), new(rounded ? $"size, {raw.Unit}" : "size, bytes"), new(rounded ? $"best, {best.Unit}" : "best, bytes"), new("raw ÷ best"), new("best code", IsText: true), new("order-0 bound, bit/symbol"), new("held-out order 1, bit/symbol")];
        var rows = new List<Row>(listed.Count);
        for (int i = 0; i < listed.Count; i++)
        {
            SourceSummary source = listed[i];
            string? at = i < content.Drawn.Count ? $"/sources/{content.Drawn[i].Place.ToString(CultureInfo.InvariantCulture)}" : null;
            rows.Add(new Row(
            [
                new Cell(source.Name) { Link = i < content.Drawn.Count ? SourceFile.Of(content.Drawn[i]) : null },
                rounded ? raw.Of(source.Bytes, at is null ? null : at + "/bytes") : NumberCells.Count(source.Bytes), rounded ? best.Of(source.BestBytes) : NumberCells.Count(source.BestBytes),
                NumberCells.Ratio(source.Bytes, source.BestBytes), new Cell(source.BestCode is { } code ? CodeText.Of(code) : ""),
                NumberCells.Rate(source.EntropyBitsPerSymbol, at is null ? null : at + "/views/0/orders/0/entropyBitsPerSymbol"), NumberCells.Rate(source.HeldOutOrder1BitsPerSymbol, at is null ? null : at + "/views/0/orders/1/heldOutBitsPerSymbol"),
            ]));
        }
        long read = content.Corpus.Profiled + content.Corpus.Partial;
        string caption = listed.Count < read
            ? $"The {SizeText.Count(listed.Count)} heaviest of {SizeText.Count(read)} sources that were read; all of them are in sources.csv."
            : $"All {SizeText.Count(read)} sources that were read, table and framing included; names with a page of their own are links.";
        return new Table(caption, columns, rows);
    }

    /// <summary>Sources that were not read, or not whole; null where there are none.</summary>
    public static Table? NotRead(ReportContent content)
    {
        List<SourceSummary> lines = [.. content.Failures, .. content.Skipped];
        if (lines.Count == 0) return null;
        long all = content.Corpus.Failed + content.Corpus.Partial + content.Corpus.Skipped;
        string caption = lines.Count < all ? $"The first {SizeText.Count(lines.Count)} of {SizeText.Count(all)} that were not read, or not whole; all of them are in sources.csv." : "Every source that was not read, or not whole, and why.";
        return new Table(caption, [new("source", IsText: true), new("what happened", IsText: true), new("reason", IsText: true)],
            [.. lines.Select(line => new Row([new Cell(line.Name), new Cell(InWords(line.Status)), new Cell(line.Reason ?? "")]))]);
    }

    /// <summary>Sources that hold the same bytes; null where there are none.</summary>
    public static Table? Duplicates(CorpusProfile corpus)
    {
        if (corpus.Duplicates is not { Count: > 0 } sets) return null;
        var size = new SizeColumn(sets.Select(set => (long?)set.Bytes));
        return new Table("Sets of sources with equal digests, heaviest first.", [new("sources", IsText: true), new("how many"), new($"size of each, {size.Unit}")],
            [.. sets.Select((set, index) => new Row(
            [
                new Cell(string.Join(", ", set.Names) + (set.Count > set.Names.Count ? $" and {SizeText.Count(set.Count - set.Names.Count)} more" : "")),
                NumberCells.Count(set.Count, $"/corpus/duplicates/{index.ToString(CultureInfo.InvariantCulture)}/count"), size.Of(set.Bytes, $"/corpus/duplicates/{index.ToString(CultureInfo.InvariantCulture)}/bytes"),
            ]))]);
    }

    private static string InWords(SourceStatus status) => status switch { SourceStatus.Failed => "failed", SourceStatus.Partial => "read in part", SourceStatus.Skipped => "skipped", _ => "read" };
}
