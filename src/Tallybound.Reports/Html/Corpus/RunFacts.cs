using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Json;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>What page one says below the findings: what was read, how, and what was not looked at.</summary>
internal static class RunFacts
{
    /// <summary>Name of the fact that tells the plan, times of files included, and so differs between copies of the same bytes.</summary>
    public const string Manifest = "manifest";

    /// <summary>Names and sentences, in reading order.</summary>
    public static IEnumerable<(string Name, string Text)> Of(ReportContent content)
    {
        CorpusProfile corpus = content.Corpus;
        RunParametersRecord parameters = content.Run.Parameters;
        yield return ("read", $"{Sources(corpus.Profiled)} whole, {SizeText.Count(corpus.Partial)} in part, {SizeText.Count(corpus.Bytes)} bytes"
            + (corpus.Empty > 0 ? $"; {SizeText.Count(corpus.Empty)} of them {(corpus.Empty == 1 ? "is" : "are")} empty" : ""));
        yield return ("not read", $"{SizeText.Count(corpus.Failed)} failed, {SizeText.Count(corpus.Skipped)} skipped"
            + (corpus.ExcludedByRule > 0 ? $", {SizeText.Count(corpus.ExcludedByRule)} left out by the globs that were given" : "") + (corpus.Failed + corpus.Partial + corpus.Skipped > 0 ? "; each with its reason below" : ""));
        if (corpus.Bytes > 0) yield return ("sampling", "every byte that was read was counted; only table blocks smaller than a segment are estimates from sample windows, and say so");
        if (corpus.Bytes > 0) yield return ("blocks", $"sizes are of whole sources with one table each; symbol blocks up to {Number(parameters.BlockLength)}, context orders up to {Number(parameters.Order)}; block sizes of tables are compared below");
        yield return ("views", string.Join(", ", parameters.View) + (parameters.View.Count > 1 ? $"; totals are of the first, {parameters.View[0]}" : ""));
        yield return ("not tested", NotTested(parameters));
        yield return (Manifest, $"SHA-256 of the plan {content.Run.PlanDigest}");
    }

    /// <summary>Details of how the run was made; nothing here is a figure.</summary>
    public static IEnumerable<(string Name, string Text)> Provenance(ReportContent content)
    {
        RunRecord run = content.Run;
        RunParametersRecord parameters = run.Parameters;
        yield return ("made", $"{Time(run.StartedUtc)} to {Time(run.FinishedUtc)} UTC");
        yield return ("program", $"tallybound {content.ToolVersion}");
        yield return ("inputs", string.Join(", ", parameters.Inputs));
        yield return ("parameters", string.Join("; ", Parameters(parameters)));
        yield return ("seed", Number(parameters.Seed));
        yield return ("threads and memory", $"{Number(parameters.Threads)} threads, {Number(parameters.DenseThreads)} of them with large tables at one time; {SizeText.Bytes(parameters.Memory)} planned at most");
        yield return ("machine", $"{run.Machine.OperatingSystem}, {run.Machine.Architecture}, {Number(run.Machine.Processors)} processors, {run.Machine.Runtime}");
        yield return ("plan", run.PlanDigest);
    }

    private static IEnumerable<string> Parameters(RunParametersRecord parameters)
    {
        yield return $"order {Number(parameters.Order)}";
        yield return $"block length {Number(parameters.BlockLength)}";
        yield return $"length limits {string.Join(", ", parameters.LengthLimit.Select(limit => Number(limit)))}";
        if (parameters.Radix.Count > 0) yield return $"radix {string.Join(", ", parameters.Radix.Select(radix => Number(radix)))}";
        yield return parameters.Segment is { } segment ? $"segments of {SizeText.Bytes(segment)}" : "segments by size of source";
        if (parameters.Include.Count > 0) yield return $"include {string.Join(", ", parameters.Include)}";
        if (parameters.Exclude.Count > 0) yield return $"exclude {string.Join(", ", parameters.Exclude)}";
        yield return parameters.Inside ? $"compressed files read as what they hold, up to {SizeText.Bytes(parameters.InsideSize)} or {Number(parameters.InsideRatio)} times their size" : "compressed files read as they stand";
        yield return parameters.Digest ? "digests taken" : "no digests";
    }

    private static string NotTested(RunParametersRecord parameters)
    {
        var missing = new List<string> { "general-purpose codecs on the same bytes", "strides and lanes", "one table for several sources", $"context orders above {Number(parameters.Order)}" };
        if (parameters.Radix.Count == 0) missing.Add("channels of more than two levels");
        if (parameters.View is ["bytes"]) missing.Add("views other than bytes");
        return string.Join(", ", missing);
    }

    private static string Sources(long count) => $"{SizeText.Count(count)} {(count == 1 ? "source" : "sources")}";

    private static string Time(DateTime time) => time.ToString("yyyy-MM-dd HH:mm:ss", CultureInfo.InvariantCulture);

    private static string Number(long number) => number.ToString(CultureInfo.InvariantCulture);
}
