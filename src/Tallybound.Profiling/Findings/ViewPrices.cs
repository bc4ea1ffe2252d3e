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

    /// <summary>Whether a saving is at least 64 bytes and 0.5 % of what it is saved from.</summary>
    public static bool Matters(long savedBytes, long ofBytes) => savedBytes >= LeastBytes && savedBytes >= ofBytes / LeastPart;
}
