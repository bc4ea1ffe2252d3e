using Tallybound.Profiling.Run;
using Tallybound.Reports.Csv;
using Tallybound.Reports.Html;
using Tallybound.Reports.Json;
using Tallybound.Reports.Parquet;

namespace Tallybound.Reports.Run;

/// <summary>Writes the files of a run folder: records from the ledger and the roll-up, pages from the records.</summary>
public static class RunReport
{
    /// <summary>Name of the document in a run folder that pages are drawn from.</summary>
    public const string DocumentName = "profile.json";

    /// <summary>Name of the page in a run folder that a reader opens.</summary>
    public const string PageName = "index.html";

    /// <summary>Writes <c>profile.json</c>, its schema, <c>sources.csv</c>, and <c>tallies.parquet</c> where counts were kept; then draws the pages.</summary>
    /// <param name="folder">The run folder.</param>
    /// <param name="result">The run.</param>
    /// <exception cref="IOException">A file cannot be written.</exception>
    public static void Write(string folder, RunResult result)
    {
        ProfileDocument.WriteSchema(Path.Combine(folder, "profile.schema.json"));
        ProfileDocument.Write(Path.Combine(folder, DocumentName), result);
        SourcesTable.Write(Path.Combine(folder, "sources.csv"), result.Ledger);
        if (result.KeptTallies is { } tallies) TalliesTable.Write(Path.Combine(folder, "tallies.parquet"), tallies);
        Draw(folder, PictureChoice.Usual);
    }

    /// <summary>Draws the pages of a run from its <c>profile.json</c> and nothing else: the same document gives the same bytes.</summary>
    /// <param name="folder">The run folder, whole or partial.</param>
    /// <param name="pictures">Which pictures are written as files.</param>
    /// <exception cref="RunDocumentException">The document is not there, or is not one that can be drawn from; nothing was written.</exception>
    /// <exception cref="IOException">The document cannot be read to its end, or a file cannot be written.</exception>
    /// <exception cref="UnauthorizedAccessException">A file may not be written.</exception>
    public static void Draw(string folder, PictureChoice pictures) =>
        ReportPages.Draw(folder, RunDocument.Read(Path.Combine(folder, DocumentName)), pictures);
}
