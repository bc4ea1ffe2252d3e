namespace Tallybound.Coding.Tables;

/// <summary>A way to write down a code's table. The order is the order in which ties are decided.</summary>
public enum TableFormat
{
    /// <summary><see cref="FlatTable"/>.</summary>
    Flat,

    /// <summary>The lengths as RFC 1951 §3.2.7 sends them.</summary>
    Rfc1951DynamicHeader,

    /// <summary>The weights as RFC 8878 §4.2.1 sends them.</summary>
    Rfc8878HuffmanWeights,

    /// <summary><see cref="SparseTable"/>.</summary>
    Sparse,

    /// <summary>Normalised frequencies as RFC 8878 §4.1.1 sends them; for tANS and the range coder, not for code lengths.</summary>
    Rfc8878FseDistribution,
}

/// <summary>The formats' names as reports and records print them.</summary>
public static class TableFormatNames
{
    /// <summary>The printed name, the same in every culture.</summary>
    /// <exception cref="ArgumentOutOfRangeException">No such format.</exception>
    public static string Name(this TableFormat format) => format switch
    {
        TableFormat.Flat => "flat",
        TableFormat.Rfc1951DynamicHeader => "RFC 1951 dynamic header",
        TableFormat.Rfc8878HuffmanWeights => "RFC 8878 Huffman weights",
        TableFormat.Sparse => "sparse",
        TableFormat.Rfc8878FseDistribution => "RFC 8878 FSE distribution",
        _ => throw new ArgumentOutOfRangeException(nameof(format), format, "No such table format."),
    };
}
