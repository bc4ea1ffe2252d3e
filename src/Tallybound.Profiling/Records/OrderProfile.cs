namespace Tallybound.Profiling.Records;

/// <summary>The figures of one context order: the plug-in value and, beside it, what keeps it honest.</summary>
public sealed record OrderProfile
{
    /// <summary>Symbols of context, k.</summary>
    public required int Order { get; init; }

    /// <summary>Plug-in conditional entropy Hk in bit/symbol over the N − k predicted symbols.</summary>
    public required double EntropyBitsPerSymbol { get; init; }

    /// <summary>95 % percentile interval of order 0 by moving-block bootstrap over segments; absent below 16 segments and for other orders.</summary>
    public double[]? EntropyBitsPerSymbolInterval { get; init; }

    /// <summary>Hk with the Miller–Madow correction, not clamped.</summary>
    public required double CorrectedBitsPerSymbol { get; init; }

    /// <summary>Standard error of Hk for independent symbols, in bit/symbol; 0 on uniform counts, so never shown alone.</summary>
    public double? StandardErrorBits { get; init; }

    /// <summary>Code length of a sequential Dirichlet coder ÷ N: an upper figure that a real coder reaches. Absent for alphabets without a fixed size.</summary>
    public double? AdaptiveBitsPerSymbol { get; init; }

    /// <summary>j of the α = 2^−j that the adaptive figure uses.</summary>
    public int? AdaptiveAlphaExponent { get; init; }

    /// <summary>Cost of each half of the source under the other half's counts ÷ N_k. Absent below 8 KiB.</summary>
    public double? HeldOutBitsPerSymbol { get; init; }

    /// <summary>Symbols of the held-out figure that the training half had not seen in that context.</summary>
    public long? HeldOutEscapes { get; init; }

    /// <summary>Contexts seen at least once.</summary>
    public required long ContextsInUse { get; init; }

    /// <summary>Contexts seen fewer than 8 times.</summary>
    public required long ContextsSeenUnder8 { get; init; }

    /// <summary>Distinct (context, symbol) pairs.</summary>
    public required long PairsInUse { get; init; }

    /// <summary>Share of predictions whose (context, symbol) pair occurs once (Good–Turing).</summary>
    public required double ThinMass { get; init; }

    /// <summary>True when every context was counted.</summary>
    public required bool Exact { get; init; }
}
