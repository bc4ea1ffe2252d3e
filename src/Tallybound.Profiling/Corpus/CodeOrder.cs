using System.Globalization;

namespace Tallybound.Profiling.Corpus;

/// <summary>The order in which codes are listed: from the plainest to the most elaborate, limits and block lengths ascending.</summary>
internal static class CodeOrder
{
    private static readonly string[] Codes = ["fixed", "huffman", "huffman-limited", "block-huffman", "context-huffman", "tans", "range"];

    /// <summary>Place of a key of <see cref="Records.CodeChoice.KeyOf"/>: by code, then by its number, then by the key itself.</summary>
    public static (int Code, int Number, string Key) RankOf(string key)
    {
        int cut = key.LastIndexOf('-');
        bool numbered = int.TryParse(key.AsSpan(cut + 1), NumberStyles.None, CultureInfo.InvariantCulture, out int number);
        int code = Array.IndexOf(Codes, numbered ? key[..cut] : key);
        return (code < 0 ? Codes.Length : code, number, key);
    }
}
