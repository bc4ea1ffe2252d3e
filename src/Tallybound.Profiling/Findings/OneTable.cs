using Tallybound.Coding.Codes;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Profiling.Findings;

/// <summary>The plain way that a finding's proposal is measured against: one Huffman table for the whole source, or stored symbols where they take less.</summary>
/// <param name="Huffman">The price of one Huffman table.</param>
/// <param name="Stored">Whether stored symbols take less.</param>
/// <param name="TotalBits">What the plain way takes, table and framing included.</param>
internal readonly record struct OneTable(CodePrice Huffman, bool Stored, long TotalBits)
{
    /// <summary>What a saving is against, over many sources.</summary>
    public const string AgainstOfMany = "one Huffman table for the whole source, or stored symbols where they take less";

    /// <summary>Whole bytes of the plain way.</summary>
    public long Bytes => TotalBits / 8;

    /// <summary>What a saving is against.</summary>
    public string Against => Stored ? "stored symbols" : "one Huffman table for the whole source";

    /// <summary>The plain way and its size, such as "65.7 KiB with one Huffman table".</summary>
    public string Words => SizeText.Bytes(Bytes) + (Stored ? " stored" : " with one Huffman table");

    /// <summary>The plain way as a figure.</summary>
    public FindingEvidence Evidence => FindingMaking.Bytes(Stored ? "stored, total" : "Huffman, total", TotalBits);

    /// <summary>Share of the commonest symbol, from the bound that rests on it; null where the record does not tell.</summary>
    public static double? TopShare(ViewProfile view, CodePrice huffman) =>
        view.SymbolsInUse == 1 ? 1 : huffman.RedundancyBoundBitsPerSymbol is { } bound ? bound - RedundancyBound.Sigma : null;

    /// <summary>The plain way of a view; null where Huffman was not priced.</summary>
    public static OneTable? Of(ViewProfile view)
    {
        if (view.Binary("huffman") is not { TotalBits: { } total } huffman) return null;
        bool stored = view.StoredTotalBits < total;
        return new OneTable(huffman, stored, stored ? view.StoredTotalBits : total);
    }

    /// <summary>Bytes that a way of so many bits saves against this one; null where they are too few to matter.</summary>
    public long? SavedBy(long totalBits)
    {
        long saved = Bytes - ((totalBits + 7) / 8);
        return ViewPrices.Matters(saved, Bytes) ? saved : null;
    }
}
