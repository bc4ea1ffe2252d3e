using Tallybound.Profiling.Run;

namespace Tallybound.Reports.Run;

/// <summary>Writes the files of a run folder from the ledger and the roll-up.</summary>
public static class RunReport
{
    /// <summary>Writes <c>profile.json</c>, its schema, <c>sources.csv</c> and <c>index.html</c>, and <c>tallies.parquet</c> where counts were kept.</summary>
    /// <param name="folder">The run folder.</param>
    /// <param name="result">The run.</param>
    /// <exception cref="IOException">A file cannot be written.</exception>
    public static void Write(string folder, RunResult result) => throw new InvalidOperationException("Under construction.");
}
