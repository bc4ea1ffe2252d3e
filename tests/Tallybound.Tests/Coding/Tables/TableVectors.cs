using System.Text.Json;

namespace Tallybound.Tests.Coding.Tables;

/// <summary>The entries of tests/vectors/tables/tables.json by id. Each names its source and status there.</summary>
internal static class TableVectors
{
    private static readonly Dictionary<string, JsonElement> s_entries = Read();

    public static JsonElement Of(string id) => s_entries[id];

    public static int[] Integers(this JsonElement entry, string property) => [.. entry.GetProperty(property).EnumerateArray().Select(value => value.GetInt32())];

    public static byte[] Bytes(this JsonElement entry, string property) => entry.GetProperty(property).ValueKind == JsonValueKind.String
        ? Convert.FromHexString(entry.GetProperty(property).GetString()!)
        : [.. entry.Integers(property).Select(value => (byte)value)];

    private static Dictionary<string, JsonElement> Read()
    {
        string path = Path.Combine(AppContext.BaseDirectory, "vectors", "tables", "tables.json");
        using JsonDocument document = JsonDocument.Parse(File.ReadAllBytes(path));
        return document.RootElement.EnumerateArray().ToDictionary(entry => entry.GetProperty("id").GetString()!, entry => entry.Clone(), StringComparer.Ordinal);
    }
}
