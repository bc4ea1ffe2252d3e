using Tallybound.Profiling.Run;
using Tallybound.Reports.Csv;
using Tallybound.Reports.Html;
using Tallybound.Reports.Json;
using Tallybound.Reports.Parquet;

namespace Tallybound.Reports.Run;

/// <summary>Writes the files of a run folder from the ledger and the roll-up.</summary>
public static class RunReport
{
    /// <summary>Writes <c>profile.json</c>, its schema, <c>sources.csv</c> and <c>index.html</c>, and <c>tallies.parquet</c> where counts were kept.</summary>
    /// <param name="folder">The run folder.</param>
    /// <param name="result">The run.</param>
    /// <exception cref="IOException">A file cannot be written.</exception>
    public static void Write(string folder, RunResult result)
    {
        ProfileDocument.WriteSchema(Path.Combine(folder, "profile.schema.json"));
        ProfileDocument.Write(Path.Combine(folder, "profile.json"), result);
        SourcesTable.Write(Path.Combine(folder, "sources.csv"), result.Ledger);
        IndexPage.Write(Path.Combine(folder, "index.html"), result);
        if (result.KeptTallies is { } tallies) TalliesTable.Write(Path.Combine(folder, "tallies.parquet"), tallies);
    }
}
