using System.Text.Json;
using System.Text.Json.Serialization;

namespace Tallybound.Profiling.Records;

/// <summary>The records' JSON form: camel case, absent instead of null, numbers in their shortest form that reads back equal.</summary>
[JsonSourceGenerationOptions(
    PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase,
    DefaultIgnoreCondition = JsonIgnoreCondition.WhenWritingNull,
    UseStringEnumConverter = true)]
[JsonSerializable(typeof(SourceProfile))]
[JsonSerializable(typeof(CorpusProfile))]
[JsonSerializable(typeof(RunRecord))]
[JsonSerializable(typeof(SymbolSeries))]
[JsonSerializable(typeof(DrawingCounts))]
[JsonSerializable(typeof(IReadOnlyList<Finding>))]
public sealed partial class RecordJson : JsonSerializerContext
{
    /// <summary>The bytes of one source's record, as the ledger and <c>profile.json</c> hold them.</summary>
    public static byte[] ToUtf8(SourceProfile profile) => JsonSerializer.SerializeToUtf8Bytes(profile, Default.SourceProfile);

    /// <summary>The record that <see cref="ToUtf8"/> wrote.</summary>
    /// <exception cref="JsonException">The bytes are not such a record.</exception>
    public static SourceProfile FromUtf8(ReadOnlySpan<byte> utf8) =>
        JsonSerializer.Deserialize(utf8, Default.SourceProfile) ?? throw new JsonException("The record is null.");
}
