using System.Globalization;
using System.Text.Json;
using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Json;

/// <summary>Reads <c>profile.json</c> back, one source at a time, so that a million of them need no more memory than what a report shows.</summary>
/// <remarks>Members may stand in any order, and members of other versions are passed over.</remarks>
internal sealed class RunDocument
{
#if DEBUG
    // Small, so that every kind of token is cut by the end of a block where the program is tested.
    private const int UsualBlockBytes = 61;
#else
    private const int UsualBlockBytes = 1 << 17;
#endif

    private readonly string path;
    private readonly JsonBlocks blocks;
    private readonly SourceGathering sources = new();
    private readonly HashSet<string> seen = new(StringComparer.Ordinal);
    private string? toolVersion;
    private RunRecord? run;
    private CorpusProfile? corpus;
    private IReadOnlyList<Finding> findings = [];
    private long sourcesRead;

    /// <summary>The value that is read now, as a message names it.</summary>
    private string place = "the document";

    private RunDocument(string path, JsonBlocks blocks) => (this.path, this.blocks) = (path, blocks);

    /// <summary>Reads a document.</summary>
    /// <param name="path">The file.</param>
    /// <exception cref="RunDocumentException">It is not there or cannot be opened, is cut off, is no JSON, is of another schema, or lacks what a report needs.</exception>
    /// <exception cref="IOException">Reading broke off.</exception>
    public static ReportContent Read(string path) => Read(path, UsualBlockBytes);

    /// <summary>Reads a document in blocks of a size.</summary>
    /// <param name="path">The file.</param>
    /// <param name="blockBytes">Bytes read at a time, at least 1.</param>
    /// <exception cref="RunDocumentException">As for <see cref="Read(string)"/>.</exception>
    /// <exception cref="IOException">Reading broke off.</exception>
    public static ReportContent Read(string path, int blockBytes)
    {
        using FileStream stream = Open(path);
        var document = new RunDocument(path, new JsonBlocks(stream, blockBytes));
        try
        {
            return document.Read();
        }
        catch (JsonBlocksException e)
        {
            throw document.Damaged(e);
        }
        catch (JsonException e)
        {
            throw document.NoRecord(e.Path is { Length: > 1 } inside ? $"{document.place}, {inside.TrimStart('$', '.')}," : document.place, e);
        }
    }

    private ReportContent Read()
    {
        if (blocks.Next(out _) != JsonTokenType.StartObject) throw Foreign("is no profile.json: it does not begin with an object");
        while (blocks.Next(out string? name) == JsonTokenType.PropertyName) ReadMember(name!);
        blocks.Next(out _);
        if (!seen.Contains("schema")) throw Foreign("is no profile.json: it names no schema");
        return new ReportContent
        {
            ToolVersion = toolVersion ?? throw Lacks("tool"),
            Run = run ?? throw Lacks("run"),
            Corpus = corpus ?? throw Lacks("corpus"),
            Findings = findings,
            Drawn = seen.Contains("sources") ? sources.TakeDrawn() : throw Lacks("sources"),
            Listed = sources.TakeListed(),
            Failures = sources.Failures,
            Skipped = sources.Skipped,
        };
    }

    private void ReadMember(string name)
    {
        place = name;
        if (!seen.Add(name)) throw Mendable($"holds {name} twice", "take the one that is wrong out");
        switch (name)
        {
            case "schema":
                string schema = Value<string>();
                if (schema != ProfileDocument.SchemaName) throw Foreign($"is of schema {Shown(schema)}, and this program reads {ProfileDocument.SchemaName}");
                break;
            case "tool":
                toolVersion = Value<ToolRecord>().Version;
                break;
            case "run":
                run = Value<RunRecord>();
                break;
            case "corpus":
                corpus = Value<CorpusProfile>();
                break;
            case "findings":
                findings = Value<IReadOnlyList<Finding>>();
                if (RecordShape.Fault(findings) is { } fault) throw NoRecord($"{place}, {fault}:", null);
                break;
            case "sources":
                ReadSources();
                break;
            default:
                blocks.Skip();
                break;
        }
    }

    private void ReadSources()
    {
        if (blocks.Next(out _) != JsonTokenType.StartArray) throw NoRecord(place, null);
        while (true)
        {
            place = $"source {Number(sourcesRead + 1)}";
            if (!blocks.TryValue(out ReadOnlySpan<byte> utf8)) break;
            SourceProfile profile = RecordForm.Read<SourceProfile>(utf8);
            if (RecordShape.Fault(profile) is { } fault) throw NoRecord($"{place}, {fault}:", null);
            sources.Add(profile);
            sourcesRead++;
        }
        place = "the end of sources";
    }

    private T Value<T>()
        where T : class
    {
        blocks.TryValue(out ReadOnlySpan<byte> utf8);
        return RecordForm.Read<T>(utf8);
    }

    private static FileStream Open(string path)
    {
        try
        {
            return new FileStream(path, FileMode.Open, FileAccess.Read, FileShare.Read, bufferSize: 0);
        }
        catch (Exception e) when (e is FileNotFoundException or DirectoryNotFoundException)
        {
            throw new RunDocumentException(path, "is not there", "name a run folder, or its profile.json", e);
        }
        catch (UnauthorizedAccessException e)
        {
            throw new RunDocumentException(path, "cannot be opened", "name a file that you may read", e);
        }
    }

    private RunDocumentException Damaged(JsonBlocksException e) => e.Fault switch
    {
        JsonFault.CutOff => new RunDocumentException(path, $"is cut off in {place}: it ends near byte {Number(e.Position)}", Again, e),
        JsonFault.NullInList => new RunDocumentException(path, $"is damaged in {place}: a list holds null at byte {Number(e.Position)}", Again, e),
        JsonFault.TooLarge => new RunDocumentException(path, $"is damaged in {place}: a value from byte {Number(e.Position)} on is too large", Again, e),
        _ => new RunDocumentException(path, $"is damaged in {place}: what stands at byte {Number(e.Position)} is not JSON", Again, e),
    };

    private RunDocumentException NoRecord(string where, JsonException? e) =>
        new(path, $"is damaged: {where} before byte {Number(blocks.Position)} is not as {ProfileDocument.SchemaName} has it", Again, e);

    private RunDocumentException Lacks(string member) => Mendable($"holds no {member}", Again);

    private RunDocumentException Foreign(string what) => new(path, what, "name a run folder of this program, or draw it with the version that made it");

    private RunDocumentException Mendable(string what, string mend) => new(path, what, mend);

    private const string Again = "copy it again from where it is whole, or profile the data again";

    private static string Number(long number) => number.ToString(CultureInfo.InvariantCulture);

    private static string Shown(string schema) => schema.Length <= 64 ? $"'{schema}'" : $"'{schema[..64]}…'";
}
