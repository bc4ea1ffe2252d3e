using Tallybound.Profiling.Records;

namespace Tallybound.Profiling.Findings;

/// <summary>Looks prices up in a view, and weighs savings.</summary>
internal static class ViewPrices
{
    /// <summary>A saving below this is not worth a reader's time, whatever it is of.</summary>
    private const long LeastBytes = 64;

    /// <summary>A saving below one part in so many of what it is saved from is not either.</summary>
    private const long LeastPart = 200;

    /// <summary>The first binary code of a name; null: the view has none.</summary>
    public static CodePrice? Binary(this ViewProfile view, string code)
    {
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i] is { Radix: 2, TotalBits: not null } price && price.Code == code) return price;
        return null;
    }

    /// <summary>The cheapest binary code whose lengths are not bound to whole bits a symbol: tANS, range coding, symbol blocks. Null: the view has none.</summary>
    public static CodePrice? CheapestWithoutWholeBits(this ViewProfile view)
    {
        CodePrice? cheapest = null;
        for (int i = 0; i < view.Codes.Count; i++)
            if (HasNoWholeBits(view.Codes[i]) && (cheapest is null || view.Codes[i].TotalBits < cheapest.TotalBits)) cheapest = view.Codes[i];
        return cheapest;
    }

    /// <summary>Total of each code that <see cref="CheapestWithoutWholeBits"/> chooses from.</summary>
    public static IEnumerable<FindingEvidence> WithoutWholeBits(this ViewProfile view) =>
        view.Codes.Where(HasNoWholeBits).Select(code => FindingMaking.Bytes(FindingMaking.TotalOf(code), code.TotalBits!.Value));

    /// <summary>Bits of the cheapest binary code or stored block, and that code; null: stored.</summary>
    public static (long TotalBits, CodePrice? Code) Cheapest(this ViewProfile view)
    {
        (long TotalBits, CodePrice? Code) best = (view.StoredTotalBits, null);
        for (int i = 0; i < view.Codes.Count; i++)
            if (view.Codes[i].TotalBits is { } bits && bits < best.TotalBits) best = (bits, view.Codes[i]);
        return best;
    }

    /// <summary>Whether the free Huffman code saves at least 1 % against stored symbols, so that its tables are worth a word.</summary>
    public static bool IsWorthCoding(this ViewProfile view, CodePrice huffman) => 100 * huffman.TotalBits <= 99 * view.StoredTotalBits;

    /// <summary>Whether a saving is at least 64 bytes and 0.5 % of what it is saved from.</summary>
    public static bool Matters(long savedBytes, long ofBytes) => savedBytes >= LeastBytes && savedBytes >= ofBytes / LeastPart;

    private static bool HasNoWholeBits(CodePrice code) => code is { Radix: 2, TotalBits: not null, Code: "tans" or "range" or "block-huffman" };
}
