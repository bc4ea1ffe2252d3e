using System.Buffers;
using System.Reflection;
using System.Text.Json;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Run;
using Tallybound.Reports.Files;

namespace Tallybound.Reports.Json;

/// <summary>Writes <c>profile.json</c>, sources last and streamed, and its JSON Schema beside it.</summary>
internal static class ProfileDocument
{
    /// <summary>The document's schema name and version.</summary>
    public const string SchemaName = "tallybound/profile/1";

    /// <summary>Sources that have a page, and so keep the counts that their drawings need.</summary>
    public const int SourcesWithPage = 200;

    /// <summary>Sources that keep pair counts.</summary>
    public const int SourcesWithPairs = 10;

    private const int FlushAfterBytes = 1 << 20;

    /// <summary>Writes the document of a run.</summary>
    public static void Write(string path, RunResult result) => WholeFile.Write(path, stream => WriteTo(stream, result));

    /// <summary>Writes the JSON Schema.</summary>
    public static void WriteSchema(string path) => WholeFile.Write(path, stream =>
    {
        using Stream schema = typeof(ProfileDocument).Assembly.GetManifestResourceStream("profile.schema.json")
            ?? throw new InvalidOperationException("The program was built without its JSON Schema.");
        schema.CopyTo(stream);
    });

    private static void WriteTo(Stream stream, RunResult result)
    {
        using var writer = new Utf8JsonWriter(stream);
        writer.WriteStartObject();
        writer.WriteString("schema", SchemaName);
        WriteTool(writer);
        writer.WritePropertyName("run");
        JsonSerializer.Serialize(writer, result.Run, RecordJson.Default.RunRecord);
        writer.WritePropertyName("corpus");
        JsonSerializer.Serialize(writer, result.Corpus, RecordJson.Default.CorpusProfile);
        writer.WritePropertyName("findings");
        JsonSerializer.Serialize(writer, result.Findings, RecordJson.Default.IReadOnlyListFinding);
        writer.WriteStartArray("sources");
        WriteSources(writer, result);
        writer.WriteEndArray();
        writer.WriteEndObject();
        writer.Flush();
        stream.Write("\n"u8);
    }

    private static void WriteTool(Utf8JsonWriter writer)
    {
        writer.WriteStartObject("tool");
        writer.WriteString("name", "tallybound");
        writer.WriteString("version", ToolVersion);
        writer.WriteEndObject();
    }

    /// <summary>Version of this program.</summary>
    public static string ToolVersion { get; } =
        typeof(ProfileDocument).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()?.InformationalVersion ?? "0";

    private static void WriteSources(Utf8JsonWriter writer, RunResult result)
    {
        IReadOnlyList<int> heaviest = result.Ledger.HeaviestIds(SourcesWithPage);
        var withPage = heaviest.ToHashSet();
        var withPairs = heaviest.Take(SourcesWithPairs).ToHashSet();
        foreach ((int id, byte[] utf8) in result.Ledger.Records())
        {
            DrawingCounts? drawing = withPage.Contains(id) ? result.Ledger.Drawing(id) : null;
            byte[] record = drawing is null ? utf8 : RecordJson.ToUtf8(drawing.AddTo(RecordJson.FromUtf8(utf8), withPairs.Contains(id)));
            writer.WriteRawValue(new ReadOnlySequence<byte>(record), skipInputValidation: true);
            if (writer.BytesPending > FlushAfterBytes) writer.Flush();
        }
    }
}
