using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Charts;

/// <summary>One symbol in use: its count and what it costs.</summary>
/// <param name="Symbol">The symbol.</param>
/// <param name="Count">How often it occurs.</param>
/// <param name="Share">Count ÷ symbols.</param>
/// <param name="SelfInformationBits">−log2 of the share.</param>
/// <param name="CodeLength">Bits of its word in the free Huffman code.</param>
internal readonly record struct SymbolLine(int Symbol, long Count, double Share, double SelfInformationBits, long CodeLength)
{
    /// <summary>Symbols in use, the most frequent first, equal ones by number; empty where the record keeps no counts, or keeps them sparse.</summary>
    public static IReadOnlyList<SymbolLine> Ranked(ViewProfile view)
    {
        if (view.SymbolCounts?.Dense is not { } counts || view.CodeLengths?.Dense is not { } lengths || counts.Length != lengths.Length) return [];
        var lines = new List<SymbolLine>(counts.Length);
        for (int symbol = 0; symbol < counts.Length; symbol++)
        {
            if (counts[symbol] == 0) continue;
            lines.Add(new SymbolLine(symbol, counts[symbol], (double)counts[symbol] / view.Symbols, Coding.Measures.Entropy.SelfInformation(counts[symbol], view.Symbols), lengths[symbol]));
        }
        lines.Sort(static (a, b) => a.Count != b.Count ? b.Count.CompareTo(a.Count) : a.Symbol.CompareTo(b.Symbol));
        return lines;
    }
}
