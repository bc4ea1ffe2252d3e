using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Run;
using Tallybound.Reports.Json;

namespace Tallybound.Tests.Reports.Json;

/// <summary>A document written out of generated records, and the ledger it was written from.</summary>
internal sealed class WrittenRun : IDisposable
{
    private readonly string folder = Directory.CreateTempSubdirectory("tallybound-").FullName;

    /// <summary>Writes a document.</summary>
    /// <param name="sources">Its records, in document order.</param>
    /// <param name="records">What makes the rest, and counts for drawings.</param>
    public WrittenRun(IReadOnlyList<SourceProfile> sources, GeneratedRecords records)
    {
        Sources = sources;
        Ledger = RunLedger.Create(Path.Combine(folder, "ledger.sqlite"), [],
            sources.Select((source, id) => new PlannedSource(id, source.Name, source.Kind, null, source.Bytes, null)));
        for (int id = 0; id < sources.Count; id++) Ledger.Finish(id, sources[id], sources[id].Views is null ? null : records.Counts(sources[id]));
        Result = new RunResult(true, records.Corpus(), [GeneratedRecords.Finding("of-the-run") with { Sources = 2, HeaviestSource = "second" }], records.Run(), Ledger, null);
        Document = Path.Combine(folder, "profile.json");
        ProfileDocument.Write(Document, Result);
    }

    public IReadOnlyList<SourceProfile> Sources { get; }

    public RunLedger Ledger { get; }

    public RunResult Result { get; }

    /// <summary>Path of the document.</summary>
    public string Document { get; }

    public void Dispose()
    {
        Ledger.Dispose();
        Directory.Delete(folder, recursive: true);
    }
}
