using System.Runtime.CompilerServices;

namespace Tallybound.Coding.Numerics;

/// <summary>log2 of counts, looked up where they are small: most counts of a context are.</summary>
internal static class Log2Table
{
    /// <summary>Counts below this are looked up. 4,096 doubles stay in the first cache.</summary>
    public const int Limit = 4096;

    private static readonly double[] s_log2 = Build();

    /// <summary>log2(n) for n ≥ 1, the bits of <see cref="Math.Log2"/>; 0 for 0, so that an absent symbol can be multiplied away.</summary>
    [MethodImpl(MethodImplOptions.AggressiveInlining)]
    public static double Of(long n) => (ulong)n < Limit
        ? Unsafe.Add(ref System.Runtime.InteropServices.MemoryMarshal.GetArrayDataReference(s_log2), (nint)n)
        : Math.Log2(n);

    private static double[] Build()
    {
        var log2 = new double[Limit];
        for (int n = 2; n < Limit; n++) log2[n] = Math.Log2(n);
        return log2;
    }
}
