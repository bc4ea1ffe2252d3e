namespace Tallybound.Sources.Walking;

/// <summary>The order in which the folders of one folder are walked: that of the names of what lies in them.</summary>
/// <remarks>
/// A folder's bytes are compared as if <c>/</c> stood behind them, so that <c>a.b/…</c> comes before <c>a/…</c>, as those names sort.
/// The order of the system would let it decide under which of two names a folder is walked.
/// </remarks>
internal sealed class FolderOrder : IComparer<byte[]>
{
    public static FolderOrder Instance { get; } = new();

    public int Compare(byte[]? x, byte[]? y)
    {
        ReadOnlySpan<byte> a = x, b = y;
        int common = a.CommonPrefixLength(b);
        return At(a, common) - At(b, common);
    }

    private static int At(ReadOnlySpan<byte> name, int index) => index < name.Length ? name[index] : '/';
}
