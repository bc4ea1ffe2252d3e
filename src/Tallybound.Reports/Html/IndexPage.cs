using System.Globalization;
using System.Text;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Files;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html;

/// <summary>Writes <c>index.html</c>: the verdict, what was read, the rates of the whole, the heaviest sources, what failed, cautions, provenance.</summary>
/// <remarks>One file that needs no script and asks for nothing from anywhere.</remarks>
internal static class IndexPage
{
    private const int HeaviestShown = 50;

    /// <summary>Writes the page of a run.</summary>
    public static void Write(string path, ReportContent content) => WholeFile.Write(path, stream =>
    {
        var page = new HtmlPage();
        WriteHead(page, content);
        WriteRates(page, content.Corpus);
        WriteHeaviest(page, content);
        WriteFailures(page, content);
        WriteCautions(page);
        WriteProvenance(page, content);
        page.Raw("</main></body></html>\n");
        stream.Write(Encoding.UTF8.GetBytes(page.ToString()));
    });

    private static void WriteHead(HtmlPage page, ReportContent content)
    {
        CorpusProfile corpus = content.Corpus;
        string title = content.Run.Parameters.Inputs.Count > 0 ? string.Join(", ", content.Run.Parameters.Inputs) : "run";
        page.Raw("<!DOCTYPE html>\n<html lang=\"en\"><head><meta charset=\"utf-8\">")
            .Raw("<meta http-equiv=\"Content-Security-Policy\" content=\"default-src 'none'; style-src 'unsafe-inline'\">")
            .Raw("<meta name=\"viewport\" content=\"width=device-width, initial-scale=1\"><title>").Text(title).Raw(" — Tallybound</title><style>")
            .Raw(PageStyle.Css).Raw("</style></head>\n<body><main>\n<h1>").Text(title).Raw("</h1>\n");
        page.Raw("<p class=\"verdict\">").Text(corpus.Verdict?.Sentence ?? "Nothing was read, so there is nothing to say of sizes.").Raw("</p>\n");
        if (!content.Run.Complete) page.Raw("<p class=\"stopped\">").Text($"The run is not complete: {content.Run.EndedBecause ?? "it was stopped"}. The figures cover what was read.").Raw("</p>\n");
        page.Raw("<p>").Text(
            $"{SizeText.Count(corpus.Profiled)} sources read whole, {SizeText.Count(corpus.Partial)} in part, {SizeText.Count(corpus.Failed)} failed, " +
            $"{SizeText.Count(corpus.Skipped)} skipped, {SizeText.Count(corpus.ExcludedByRule)} kept out by --include and --exclude; {SizeText.Count(corpus.Bytes)} bytes counted, every one of them.").Raw("</p>\n");
    }

    private static void WriteRates(HtmlPage page, CorpusProfile corpus)
    {
        if (corpus.Bytes == 0) return;
        page.Raw("<section tabindex=\"0\" aria-label=\"Rates of the whole\"><h2>Rates of the whole</h2>\n<table><caption>Sizes with tables and framing; where a code would grow a source, that source is taken as stored.</caption>")
            .Raw("<thead><tr><th scope=\"col\">code</th><th scope=\"col\">bytes</th><th scope=\"col\">bit/byte</th><th scope=\"col\">raw ÷ coded</th><th scope=\"col\">saving</th></tr></thead><tbody>\n");
        foreach ((string key, long bytes) in corpus.Totals)
        {
            page.Raw(key == corpus.Verdict?.Code ? "<tr class=\"best\">" : "<tr>").Raw("<th scope=\"row\">").Text(CodeText.Of(key)).Raw("</th>");
            SizeCells(page, corpus.Bytes, bytes);
            page.Raw("</tr>\n");
        }
        page.Raw("</tbody></table>\n");
        if (corpus.Bounds is { } bounds) WriteBounds(page, corpus.Bytes, bounds);
        page.Raw("</section>\n");
    }

    private static void WriteBounds(HtmlPage page, long raw, CorpusBounds bounds)
    {
        page.Raw("<table><caption>Beside them: what the counts alone say. A bound leaves out the model; an adaptive cost leaves out nothing.</caption>")
            .Raw("<thead><tr><th scope=\"col\">figure</th><th scope=\"col\">bytes</th><th scope=\"col\">bit/byte</th><th scope=\"col\">raw ÷ coded</th><th scope=\"col\">saving</th></tr></thead><tbody>\n");
        Row("static order-0 bound (one fixed table a source, no memory)", bounds.Order0BoundBits);
        Row("adaptive cost, order 0", bounds.AdaptiveOrder0Bits);
        Row("adaptive cost, order 1", bounds.AdaptiveOrder1Bits);
        Row("adaptive cost, order 2", bounds.AdaptiveOrder2Bits);
        page.Raw("</tbody></table>\n");

        void Row(string name, long? bits)
        {
            if (bits is not { } known) return;
            page.Raw("<tr><th scope=\"row\">").Text(name).Raw("</th>");
            SizeCells(page, raw, (known + 7) / 8);
            page.Raw("</tr>\n");
        }
    }

    private static void SizeCells(HtmlPage page, long raw, long bytes)
    {
        page.Raw("<td title=\"").Text(SizeText.Bytes(bytes)).Raw("\">").Text(SizeText.Count(bytes)).Raw("</td><td>")
            .Text(raw == 0 ? "" : SizeText.Rate(8.0 * bytes / raw)).Raw("</td><td>").Text(SizeText.Ratio(raw, bytes)).Raw("</td><td>").Text(SizeText.Saving(raw, bytes)).Raw("</td>");
    }

    private static void WriteHeaviest(HtmlPage page, ReportContent content)
    {
        IReadOnlyList<SourceSummary> heaviest = [.. content.Listed.Take(HeaviestShown)];
        if (heaviest.Count == 0) return;
        page.Raw("<section tabindex=\"0\" aria-label=\"The heaviest sources\"><h2>The heaviest sources</h2>\n<table><caption>").Text(heaviest.Count < content.Corpus.Sources ? $"The {heaviest.Count} with the most bytes; all of them are in sources.csv and profile.json." : "All sources that were read.").Text(" A symbol is one of the first view; coded bytes include table and framing.")
            .Raw("</caption><thead><tr><th scope=\"col\">source</th><th scope=\"col\">bytes</th><th scope=\"col\">symbols in use</th><th scope=\"col\">order-0 bound, bit/symbol</th><th scope=\"col\">held-out order 1, bit/symbol</th>")
            .Raw("<th scope=\"col\">Huffman, bytes</th><th scope=\"col\">best, bytes</th><th scope=\"col\" class=\"text\">best code</th><th scope=\"col\">raw ÷ best</th></tr></thead><tbody>\n");
        foreach (SourceSummary line in heaviest)
        {
            page.Raw("<tr><th scope=\"row\" class=\"name\">").Text(line.Name).Raw("</th><td title=\"").Text(SizeText.Bytes(line.Bytes ?? 0)).Raw("\">").Text(SizeText.Count(line.Bytes ?? 0))
                .Raw("</td><td>").Text(line.SymbolsInUse is { } symbols ? SizeText.Count(symbols) : "").Raw("</td><td>").Text(line.EntropyBitsPerSymbol is { } h ? SizeText.Rate(h) : "")
                .Raw("</td><td>").Text(line.HeldOutOrder1BitsPerSymbol is { } heldOut ? SizeText.Rate(heldOut) : "")
                .Raw("</td><td>").Text(line.HuffmanBytes is { } huffman ? SizeText.Count(huffman) : "").Raw("</td><td>").Text(line.BestBytes is { } best ? SizeText.Count(best) : "")
                .Raw("</td><td class=\"text\">").Text(line.BestCode is { } code ? CodeText.Of(code) : "").Raw("</td><td>").Text(line is { Bytes: { } raw, BestBytes: { } coded } ? SizeText.Ratio(raw, coded) : "").Raw("</td></tr>\n");
        }
        page.Raw("</tbody></table></section>\n");
    }

    private static void WriteFailures(HtmlPage page, ReportContent content)
    {
        IReadOnlyList<SourceSummary> failures = [.. content.Failures, .. content.Skipped];
        if (failures.Count == 0) return;
        page.Raw("<section tabindex=\"0\" aria-label=\"Not read, or not whole\"><h2>Not read, or not whole</h2>\n<table><caption>Each with its reason; all of them are in sources.csv.</caption>")
            .Raw("<thead><tr><th scope=\"col\">source</th><th scope=\"col\" class=\"text\">what happened</th><th scope=\"col\" class=\"text\">reason</th></tr></thead><tbody>\n");
        foreach (SourceSummary line in failures)
        {
            page.Raw("<tr><th scope=\"row\" class=\"name\">").Text(line.Name).Raw("</th><td class=\"text\">").Text(line.Status.ToString().ToLowerInvariant())
                .Raw("</td><td class=\"text\">").Text(line.Reason ?? "").Raw("</td></tr>\n");
        }
        page.Raw("</tbody></table></section>\n");
    }

    private static void WriteCautions(HtmlPage page)
    {
        page.Raw("<section><h2>Cautions</h2><ul>\n");
        foreach (string caution in Cautions.Always) page.Raw("<li>").Text(caution).Raw("</li>\n");
        page.Raw("</ul></section>\n");
    }

    private static void WriteProvenance(HtmlPage page, ReportContent content)
    {
        RunRecord run = content.Run;
        page.Raw("<section data-provenance><h2>Provenance</h2><dl>\n");
        Entry("made", $"{run.FinishedUtc.ToString("yyyy-MM-dd HH:mm:ss", CultureInfo.InvariantCulture)} UTC, started {run.StartedUtc.ToString("HH:mm:ss", CultureInfo.InvariantCulture)}");
        Entry("program", "tallybound " + content.ToolVersion);
        Entry("plan", run.PlanDigest);
        Entry("seed", run.Parameters.Seed.ToString(CultureInfo.InvariantCulture));
        Entry("machine", $"{run.Machine.OperatingSystem}, {run.Machine.Architecture}, {run.Machine.Processors} processors, {run.Machine.Runtime}");
        Entry("threads", run.Parameters.Threads.ToString(CultureInfo.InvariantCulture));
        page.Raw("</dl></section>\n");

        void Entry(string name, string value) => page.Raw("<dt>").Text(name).Raw("</dt><dd>").Text(value).Raw("</dd>\n");
    }
}
