using System.Text.Json;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>A run folder with its pages.</summary>
internal sealed class ReportRun(string folder) : IDisposable
{
    /// <summary>A run of more pages than this is looked at in samples.</summary>
    private const int AllPagesUpTo = 60;

    /// <summary>Pages of sources that are looked at where looking takes long.</summary>
    private const int Some = 6;

    private readonly Lazy<JsonDocument> record = new(() => JsonDocument.Parse(File.ReadAllBytes(Path.Combine(folder, "profile.json"))));

    /// <summary>The run folder.</summary>
    public string Folder => folder;

    /// <summary>The first page.</summary>
    public string Index => Path.Combine(folder, "index.html");

    /// <summary>Pages of single sources, in ordinal order; empty where the run has none.</summary>
    public string[] SourcePages { get; } = Directory.Exists(Path.Combine(folder, "sources"))
        ? [.. Directory.EnumerateFiles(Path.Combine(folder, "sources"), "*.html").Order(StringComparer.Ordinal)] : [];

    /// <summary>The pages to look at: all of a small run; of a large one the index and the first, middle and last page of a source.</summary>
    public IReadOnlyList<string> Pages => [Index, .. Spread(SourcePages.Length <= AllPagesUpTo ? SourcePages.Length : 3)];

    /// <summary>The pages to look at where looking takes long: the index and a few pages of sources, from the first to the last.</summary>
    public IReadOnlyList<string> SomePages => [Index, .. Spread(SourcePages.Length <= AllPagesUpTo ? Some : 3)];

    /// <summary>The record beside the pages.</summary>
    public JsonElement Record => record.Value.RootElement;

    /// <summary>Bytes that were counted.</summary>
    public long Bytes => Record.GetProperty("corpus").GetProperty("bytes").GetInt64();

    /// <summary>Names of the sources as the record has them.</summary>
    public string[] Names => [.. Record.GetProperty("sources").EnumerateArray().Select(source => source.GetProperty("name").GetString()!)];

    private IEnumerable<string> Spread(int count) => SourcePages.Length <= count
        ? SourcePages
        : Enumerable.Range(0, count).Select(i => SourcePages[i * (SourcePages.Length - 1) / (count - 1)]);

    public void Dispose()
    {
        if (record.IsValueCreated) record.Value.Dispose();
    }
}
