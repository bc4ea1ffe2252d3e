namespace Tallybound.Profiling.Wording;

/// <summary>What a code's key means, in words.</summary>
public static class CodeText
{
    /// <summary>The key of <see cref="Records.CorpusProfile.Totals"/> in words, such as "Huffman, codes of at most 12 bits".</summary>
    public static string Of(string key)
    {
        if (key.StartsWith("huffman-limited-", StringComparison.Ordinal)) return $"Huffman, at most {key["huffman-limited-".Length..]} bits";
        if (key.StartsWith("block-huffman-", StringComparison.Ordinal)) return $"Huffman of {key["block-huffman-".Length..]}-symbol blocks";
        return key switch
        {
            "raw" => "as it stands",
            "stored" => "stored",
            "fixed" => "fixed-length codes",
            "huffman" => "Huffman",
            "context-huffman" => "Huffman per previous symbol",
            "tans" => "tANS",
            "range" => "range coding",
            "bestPerSource" => "the best code of each source",
            _ => key,
        };
    }

    /// <summary>The same as the first words of a sentence.</summary>
    public static string AtTheStart(string key)
    {
        string words = Of(key);
        return key == "tans" ? words : char.ToUpperInvariant(words[0]) + words[1..];
    }
}
