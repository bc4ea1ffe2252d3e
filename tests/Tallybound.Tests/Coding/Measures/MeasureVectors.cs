using System.Text.Json;

namespace Tallybound.Tests.Coding.Measures;

/// <summary>The entries of tests/vectors/measures/measures.json by id. Each names its source and status there.</summary>
internal static class MeasureVectors
{
    private static readonly Dictionary<string, JsonElement> s_entries = Read();

    public static JsonElement Of(string id) => s_entries[id];

    public static int Count => s_entries.Count;

    public static double Tolerance(this JsonElement entry) => entry.GetProperty("tolerance").GetDouble();

    public static double[] Expected(this JsonElement entry) => entry.GetProperty("expected").ValueKind == JsonValueKind.Array
        ? [.. entry.GetProperty("expected").EnumerateArray().Select(value => value.GetDouble())]
        : [entry.GetProperty("expected").GetDouble()];

    public static long[] Counts(this JsonElement entry) => [.. entry.GetProperty("input").EnumerateArray().Select(value => value.GetInt64())];

    public static string Text(this JsonElement entry) => entry.GetProperty("input").GetString()!;

    private static Dictionary<string, JsonElement> Read()
    {
        string path = Path.Combine(AppContext.BaseDirectory, "vectors", "measures", "measures.json");
        using JsonDocument document = JsonDocument.Parse(File.ReadAllBytes(path));
        return document.RootElement.EnumerateArray().ToDictionary(entry => entry.GetProperty("id").GetString()!, entry => entry.Clone(), StringComparer.Ordinal);
    }
}
