namespace Tallybound.Coding.Measures;

/// <summary>What one order of context says about a source: the plug-in bound, and beside it the figures that keep it honest.</summary>
/// <param name="Order">Symbols of context, 0 or more.</param>
/// <param name="Predicted">N_k: how many symbols were predicted, at least 1 (N - k for one source without breaks).</param>
/// <param name="EntropyBitsPerSymbol">Hk, the plug-in conditional entropy: a bound for one fixed table a context, model left out. 0 or more; far too low on thin data.</param>
/// <param name="CorrectedBitsPerSymbol">Hk + (pairs in use - contexts in use)/(2 N_k ln 2), the correction of G. Miller (Note on the bias of information estimates, 1955), context by context; not clamped.</param>
/// <param name="StandardErrorBits">sqrt(Var(log2 1/p)/N_k) in bits a symbol, for independent symbols; exactly 0 on uniform counts, and so never to be shown alone.</param>
/// <param name="AdaptiveBitsPerSymbol">Bits per symbol of the whole source (÷ N) that a sequential Dirichlet coder spends, the start and the choice of α charged: achievable. Absent without a fixed alphabet.</param>
/// <param name="AdaptiveAlphaExponent">j of the α = 2^-j that was cheapest; the smallest of equals. Absent with the figure.</param>
/// <param name="HeldOutBitsPerSymbol">Bits per predicted symbol (÷ N_k) when each fold pays by the counts of the other. Absent without a fixed alphabet or when it was not asked for.</param>
/// <param name="HeldOutEscapes">Symbols among N_k that the other fold had not seen after their context, contexts it had not seen at all included. Absent with the figure.</param>
/// <param name="ContextsInUse">Contexts that predicted at least one symbol; 1 for order 0.</param>
/// <param name="ContextsSeenUnder8">Contexts among them that predicted fewer than 8.</param>
/// <param name="PairsInUse">Distinct (context, symbol) pairs seen.</param>
/// <param name="ThinMass">Share of N_k in pairs seen exactly once, 0 to 1: the Good-Turing estimate of the chance that the next pair is new (I. Good, The population frequencies of species and the estimation of population parameters, Biometrika 40, 1953).</param>
public sealed record OrderFigures(
    int Order,
    long Predicted,
    double EntropyBitsPerSymbol,
    double CorrectedBitsPerSymbol,
    double StandardErrorBits,
    double? AdaptiveBitsPerSymbol,
    int? AdaptiveAlphaExponent,
    double? HeldOutBitsPerSymbol,
    long? HeldOutEscapes,
    long ContextsInUse,
    long ContextsSeenUnder8,
    long PairsInUse,
    double ThinMass);
