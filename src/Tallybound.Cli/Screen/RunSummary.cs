using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Run;
using Tallybound.Profiling.Wording;
using Tallybound.Sources;

namespace Tallybound.Cli.Screen;

/// <summary>What standard output says of a run: one screen of at most 24 lines and 80 columns.</summary>
internal static class RunSummary
{
    /// <summary>Lines of the smallest usual terminal.</summary>
    public const int ScreenLines = 24;

    /// <summary>Columns of the smallest usual terminal.</summary>
    public const int ScreenColumns = 80;

    private const int HeaviestShown = 3;
    private const int FailuresShown = 3;

    /// <summary>The summary of a run whose ledger is open.</summary>
    /// <param name="result">The run.</param>
    /// <param name="folder">The run folder, as it will be called when this is read.</param>
    public static string Of(RunResult result, string folder)
    {
        CorpusProfile corpus = result.Corpus;
        List<string> above = WhatWasRead(corpus, result);
        var below = new List<string>();
        if (corpus.Profiled + corpus.Partial > 1) below.AddRange(Heaviest(result.Ledger.Heaviest(HeaviestShown)));
        if (corpus.Failed + corpus.Partial > 0) below.AddRange(Failures(result.Ledger.Failures(FailuresShown), corpus.Failed, corpus.Partial));
        below.AddRange(["", DisplayText.Escape($"Report: {Path.Combine(folder, "index.html")}")]);
        if (corpus.Bytes > 0) above.AddRange(Rates(corpus, ScreenLines - above.Count - below.Count));
        return string.Join('\n', above.Concat(below)) + "\n";
    }

    private static List<string> WhatWasRead(CorpusProfile corpus, RunResult result)
    {
        var lines = new List<string>();
        long read = corpus.Profiled + corpus.Partial;
        string rest = "";
        if (corpus.Failed > 0) rest += $"; {SizeText.Count(corpus.Failed)} failed";
        if (corpus.Skipped > 0) rest += $"; {SizeText.Count(corpus.Skipped)} skipped";
        if (corpus.ExcludedByRule > 0) rest += $"; {SizeText.Count(corpus.ExcludedByRule)} kept out by rule";
        lines.AddRange(Wrapped($"Read {SizeText.Count(read)} {(read == 1 ? "source" : "sources")}, {SizeText.Count(corpus.Bytes)} bytes{rest}."));
        if (!result.Complete) lines.AddRange(Wrapped($"Not complete: {result.Run.EndedBecause ?? "the run was stopped"}; the figures cover what was read."));
        lines.AddRange(Wrapped(corpus.Verdict?.Sentence ?? "Nothing was read, so there is nothing to say of sizes."));
        return lines;
    }

    private static IEnumerable<string> Rates(CorpusProfile corpus, int lines)
    {
        yield return "";
        yield return Row("tables and framing included", "bytes", "ratio", "bit/byte");
        int rows = lines - 2;
        List<KeyValuePair<string, long>> codes = [.. corpus.Totals.Where(total => total.Key is not ("raw" or "bestPerSource")).OrderBy(total => total.Value)];
        bool bestApart = corpus.Profiled + corpus.Partial > 1;
        int fixedRows = bestApart ? 2 : 1;
        int shown = codes.Count <= rows - fixedRows ? codes.Count : rows - fixedRows - 1;
        yield return Rate("raw", corpus.Bytes, corpus.Bytes);
        foreach ((string key, long bytes) in codes.Take(shown)) yield return Rate(CodeText.Of(key), corpus.Bytes, bytes);
        if (shown < codes.Count) yield return $"({codes.Count - shown} more in the report)";
        if (bestApart && corpus.Totals.TryGetValue("bestPerSource", out long best)) yield return Rate(CodeText.Of("bestPerSource"), corpus.Bytes, best);
    }

    private static string Rate(string name, long raw, long coded) =>
        Row(name, SizeText.Count(coded), SizeText.Ratio(raw, coded), SizeText.Rate(8.0 * coded / raw));

    private static string Row(string name, string bytes, string ratio, string rate) => $"{name,-40}{bytes,20}{ratio,9}{rate,10}";

    private static IEnumerable<string> Heaviest(IReadOnlyList<SourceSummary> sources)
    {
        yield return "";
        yield return $"{"heaviest sources",-30}{"bytes",20}{"ratio",9}  best code";
        foreach (SourceSummary source in sources)
        {
            long bytes = source.Bytes ?? 0;
            string ratio = source.BestBytes is { } best ? SizeText.Ratio(bytes, best) : "";
            yield return Cut($"{CutStart(DisplayText.Escape(source.Name), 29),-30}{SizeText.Count(bytes),20}{ratio,9}  {source.BestCode}".TrimEnd());
        }
    }

    private static IEnumerable<string> Failures(IReadOnlyList<SourceSummary> failures, long failed, long partial)
    {
        yield return "";
        yield return $"{SizeText.Count(failed)} failed, {SizeText.Count(partial)} read in part{(failures.Count < failed + partial ? "; the first of them (all are in sources.csv)" : "")}:";
        foreach (SourceSummary failure in failures)
            yield return Cut($"  {CutStart(DisplayText.Escape(failure.Name), 36)}: {DisplayText.Escape(failure.Reason ?? "")}");
    }

    private static string Cut(string text)
    {
        if (text.Length <= ScreenColumns) return text;
        int kept = ScreenColumns - 1;
        return text[..(char.IsHighSurrogate(text[kept - 1]) ? kept - 1 : kept)] + "…";
    }

    /// <summary>The end of a path tells more than its beginning.</summary>
    private static string CutStart(string text, int columns)
    {
        if (text.Length <= columns) return text;
        int from = text.Length - columns + 1;
        return "…" + text[(char.IsLowSurrogate(text[from]) ? from + 1 : from)..];
    }

    private static List<string> Wrapped(string text)
    {
        var lines = new List<string>();
        string line = "";
        foreach (string word in text.Split(' '))
        {
            if (line.Length > 0 && line.Length + 1 + word.Length > ScreenColumns)
            {
                lines.Add(line);
                line = "";
            }
            line = line.Length == 0 ? word : $"{line} {word}";
        }
        lines.Add(line);
        return lines;
    }
}
