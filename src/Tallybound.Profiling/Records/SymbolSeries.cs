using System.Text.Json;
using System.Text.Json.Serialization;

namespace Tallybound.Profiling.Records;

/// <summary>One number a symbol: dense for alphabets of at most 256 symbols, else ascending [symbol, number] pairs.</summary>
[JsonConverter(typeof(SymbolSeriesConverter))]
public sealed record SymbolSeries
{
    private SymbolSeries(long[]? dense, long[][]? pairs) => (Dense, Pairs) = (dense, pairs);

    /// <summary>Number of each symbol of the alphabet; null when the series is sparse.</summary>
    public long[]? Dense { get; }

    /// <summary>[symbol, number] of each symbol in use, ascending; null when the series is dense.</summary>
    public long[][]? Pairs { get; }

    /// <summary>A series over a small alphabet.</summary>
    public static SymbolSeries FromDense(long[] numbers) => new(numbers, null);

    /// <summary>A series over the symbols in use.</summary>
    public static SymbolSeries FromPairs(long[][] pairs) => new(null, pairs);
}

/// <summary>Writes a dense series as an array of numbers, a sparse one as an array of pairs.</summary>
internal sealed class SymbolSeriesConverter : JsonConverter<SymbolSeries>
{
    public override SymbolSeries Read(ref Utf8JsonReader reader, Type typeToConvert, JsonSerializerOptions options)
    {
        using JsonDocument document = JsonDocument.ParseValue(ref reader);
        JsonElement root = document.RootElement;
        if (root.ValueKind != JsonValueKind.Array) throw new JsonException("A symbol series is an array.");
        if (root.GetArrayLength() > 0 && root[0].ValueKind == JsonValueKind.Array)
        {
            long[][] pairs = root.EnumerateArray().Select(pair => new[] { pair[0].GetInt64(), pair[1].GetInt64() }).ToArray();
            return SymbolSeries.FromPairs(pairs);
        }
        return SymbolSeries.FromDense(root.EnumerateArray().Select(number => number.GetInt64()).ToArray());
    }

    public override void Write(Utf8JsonWriter writer, SymbolSeries value, JsonSerializerOptions options)
    {
        writer.WriteStartArray();
        foreach (long number in value.Dense ?? []) writer.WriteNumberValue(number);
        foreach (long[] pair in value.Pairs ?? [])
        {
            writer.WriteStartArray();
            writer.WriteNumberValue(pair[0]);
            writer.WriteNumberValue(pair[1]);
            writer.WriteEndArray();
        }
        writer.WriteEndArray();
    }
}
