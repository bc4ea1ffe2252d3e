namespace Tallybound.Sources;

/// <summary>The order of names: that of their UTF-8 bytes, the same on every machine.</summary>
/// <remarks>Ordinal order of UTF-16 differs from it where characters beyond the basic plane meet those at its end.</remarks>
public sealed class NameOrder : IComparer<string>
{
    /// <summary>The one instance.</summary>
    public static NameOrder Instance { get; } = new();

    int IComparer<string>.Compare(string? x, string? y) => Compare(x ?? "", y ?? "");

    /// <summary>Below 0 where <paramref name="a"/> comes first.</summary>
    public static int Compare(string a, string b)
    {
        int at = a.AsSpan().CommonPrefixLength(b);
        if (at == a.Length || at == b.Length) return a.Length - b.Length;
        // A surrogate stands for a character above all others of the basic plane.
        bool high = char.IsSurrogate(a[at]), otherHigh = char.IsSurrogate(b[at]);
        return high == otherHigh ? a[at] - b[at] : high ? 1 : -1;
    }
}
