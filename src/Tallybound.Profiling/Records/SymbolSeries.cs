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
        if (reader.TokenType != JsonTokenType.StartArray) throw new JsonException("A symbol series is an array.");
        var dense = new List<long>();
        var pairs = new List<long[]>();
        while (reader.Read() && reader.TokenType != JsonTokenType.EndArray)
        {
            if (reader.TokenType == JsonTokenType.StartArray) pairs.Add(Pair(ref reader));
            else dense.Add(Number(ref reader));
        }
        if (dense.Count > 0 && pairs.Count > 0) throw new JsonException("A symbol series is dense or sparse, not both.");
        return pairs.Count > 0 ? SymbolSeries.FromPairs([.. pairs]) : SymbolSeries.FromDense([.. dense]);
    }

    private static long[] Pair(ref Utf8JsonReader reader)
    {
        long[] pair = new long[2];
        for (int i = 0; i < pair.Length; i++)
        {
            reader.Read();
            pair[i] = Number(ref reader);
        }
        if (!reader.Read() || reader.TokenType != JsonTokenType.EndArray) throw new JsonException("A sparse symbol series holds pairs.");
        return pair;
    }

    private static long Number(ref Utf8JsonReader reader) =>
        reader.TokenType == JsonTokenType.Number && reader.TryGetInt64(out long number) ? number : throw new JsonException("A symbol series holds whole numbers.");

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
