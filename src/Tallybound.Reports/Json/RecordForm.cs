using System.Text.Json;
using System.Text.Json.Serialization;
using System.Text.Json.Serialization.Metadata;
using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Json;

/// <summary>Reads records out of a document that anyone may have written: what a record must have is there, and is not null.</summary>
internal static class RecordForm
{
    private static readonly JsonSerializerOptions Strict = new(RecordJson.Default.Options)
    {
        RespectNullableAnnotations = true,
        TypeInfoResolver = JsonTypeInfoResolver.Combine(RecordJson.Default, HeadJson.Default).WithAddedModifier(AskForWhatIsNeverNull),
    };

    /// <summary>A record.</summary>
    /// <exception cref="JsonException">The bytes are no such record.</exception>
    public static T Read<T>(ReadOnlySpan<byte> utf8)
        where T : class =>
        JsonSerializer.Deserialize(utf8, (JsonTypeInfo<T>)Strict.GetTypeInfo(typeof(T))) ?? throw new JsonException("null stands where an object should.");

    /// <summary>A record's own parameters are not required in JSON by themselves, since those that may be null are absent then.</summary>
    private static void AskForWhatIsNeverNull(JsonTypeInfo type)
    {
        foreach (JsonPropertyInfo property in type.Properties)
            if (property.AssociatedParameter is { IsNullable: false, HasDefaultValue: false }) property.IsRequired = true;
    }
}

/// <summary>The program that made a run, as its document names it.</summary>
/// <param name="Version">Its version.</param>
internal sealed record ToolRecord(string Version);

/// <summary>What stands in a document beside records.</summary>
[JsonSourceGenerationOptions(PropertyNamingPolicy = JsonKnownNamingPolicy.CamelCase)]
[JsonSerializable(typeof(string))]
[JsonSerializable(typeof(ToolRecord))]
internal sealed partial class HeadJson : JsonSerializerContext;
