namespace Tallybound.Profiling.Records;

/// <summary>One line on a source: what lists and tables show without opening the whole record.</summary>
public sealed record SourceSummary
{
    /// <summary>The source's name.</summary>
    public required string Name { get; init; }

    /// <summary>Where the bytes came from.</summary>
    public required SourceProfileKind Kind { get; init; }

    /// <summary>How far it was read.</summary>
    public required SourceStatus Status { get; init; }

    /// <summary>Why it is not plainly profiled; null when it is.</summary>
    public string? Reason { get; init; }

    /// <summary>Bytes counted; null when nothing was read.</summary>
    public long? Bytes { get; init; }

    /// <summary>The digest, whichever form it has.</summary>
    public string? Digest { get; init; }

    /// <summary>Distinct symbols of the first view.</summary>
    public long? SymbolsInUse { get; init; }

    /// <summary>Static order-0 bound of the first view in bit/symbol.</summary>
    public double? EntropyBitsPerSymbol { get; init; }

    /// <summary>Held-out cost of order 1 of the first view in bit/symbol.</summary>
    public double? HeldOutOrder1BitsPerSymbol { get; init; }

    /// <summary>Bytes as one stored block, framing included.</summary>
    public long? StoredBytes { get; init; }

    /// <summary>Bytes under the free Huffman code, table and framing included.</summary>
    public long? HuffmanBytes { get; init; }

    /// <summary>Key of the cheapest code of the first view, <c>stored</c> where none beats a stored block.</summary>
    public string? BestCode { get; init; }

    /// <summary>Bytes under the cheapest code or stored, whichever is less.</summary>
    public long? BestBytes { get; init; }

    /// <summary>The line of a record.</summary>
    public static SourceSummary Of(SourceProfile profile)
    {
        ViewProfile? view = profile.Views is { Count: > 0 } views ? views[0] : null;
        CodeChoice? best = view is null ? null : CodeChoice.Cheapest(view);
        return new SourceSummary
        {
            Name = profile.Name,
            Kind = profile.Kind,
            Status = profile.Status,
            Reason = profile.Reason,
            Bytes = profile.Bytes,
            Digest = profile.Sha256 ?? profile.Sha256Pieces,
            SymbolsInUse = view?.SymbolsInUse,
            EntropyBitsPerSymbol = view is { Orders.Count: > 0 } ? view.Orders[0].EntropyBitsPerSymbol : null,
            HeldOutOrder1BitsPerSymbol = view is { Orders.Count: > 1 } ? view.Orders[1].HeldOutBitsPerSymbol : null,
            StoredBytes = view?.StoredTotalBits / 8,
            HuffmanBytes = view?.Codes.FirstOrDefault(code => code is { Code: "huffman", Radix: 2 })?.TotalBits / 8,
            BestCode = best?.Key,
            BestBytes = best?.TotalBits / 8,
        };
    }
}

/// <summary>A code of a view by the key that totals and lists use, with its total.</summary>
/// <param name="Key">Key, as <see cref="KeyOf"/> makes it; <c>stored</c> for a stored block.</param>
/// <param name="TotalBits">Payload + table + framing.</param>
public readonly record struct CodeChoice(string Key, long TotalBits)
{
    /// <summary>The key of a stored block.</summary>
    public const string Stored = "stored";

    /// <summary>The cheapest of a view's binary codes and a stored block; the earlier one of equals, stored first.</summary>
    public static CodeChoice Cheapest(ViewProfile view)
    {
        var best = new CodeChoice(Stored, view.StoredTotalBits);
        foreach (CodePrice code in view.Codes)
            if (code.TotalBits is { } bits && bits < best.TotalBits) best = new CodeChoice(KeyOf(code), bits);
        return best;
    }

    /// <summary>A code's name with what tells it from its siblings: <c>huffman-limited-12</c>, <c>block-huffman-2</c>.</summary>
    /// <remarks>The parameter of <c>tans</c> and <c>range</c> follows from the source's size and is no part of the key.</remarks>
    public static string KeyOf(CodePrice code)
    {
        string key = code.Code;
        if (code.LengthLimit is { } limit) key += string.Create(System.Globalization.CultureInfo.InvariantCulture, $"-{limit}");
        if (code.BlockLength > 1) key += string.Create(System.Globalization.CultureInfo.InvariantCulture, $"-{code.BlockLength}");
        return key;
    }
}
