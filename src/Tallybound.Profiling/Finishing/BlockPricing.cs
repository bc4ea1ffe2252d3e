using System.Numerics;
using System.Runtime.CompilerServices;
using Tallybound.Coding.Codes;
using Tallybound.Coding.Measures;
using Tallybound.Coding.Tables;
using Tallybound.Profiling.Records;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Finishing;

/// <summary>Prices symbols coded n at a time: the blocks that stand in the source, and the independent extension.</summary>
internal sealed class BlockPricing
{
    /// <summary>An extension of at most this many blocks is always priced; a larger one where the source has at least an eighth as many blocks.</summary>
    private const long ExtensionAlwaysAtMost = 1 << 15;

    private const int CollectAboveItems = 1 << 20;
    private const long CollectAboveSymbols = 256L << 20;

    private readonly long[] histogram = new long[256];

    /// <summary>Prices one block length; null where the source has no whole block.</summary>
    /// <param name="facts">The view.</param>
    /// <param name="tally">Its counts.</param>
    /// <param name="n">Symbols in a block.</param>
    public (SymbolBlockProfile Profile, CodePrice Price)? Price(ViewFacts facts, ISymbolTally tally, int n)
    {
        long whole = facts.Symbols / n;
        if (whole == 0) return null;
        long leftOverBits = facts.Symbols % n * facts.PlainBits;
        // One after the other: each may take a hundred million bytes for a moment, and both together would pass the memory that was promised.
        if (facts.Symbols > CollectAboveSymbols) Collect();
        IndependentExtension? extension = Extension(facts, n, whole, leftOverBits);
        ObservedCode observed = Observe(facts, tally, n, leftOverBits);
        if (observed.InUse > CollectAboveItems) Collect();
        (long payload, double entropyBits, long tableBits, TableFormat format, int inUse) = observed;
        double bound = ((whole * entropyBits) + leftOverBits) / facts.Symbols;
        CodePrice price = new PriceMaker(facts, bound, "block").Make("block-huffman", payload, tableBits, format.Name()) with
        {
            BlockLength = n,
            LongestCode = histogram.AsSpan().LastIndexOfAnyExcept(0L),
        };
        var profile = new SymbolBlockProfile
        {
            BlockLength = n,
            Blocks = whole,
            BlocksInUse = inUse,
            BlockEntropyBitsPerSymbol = entropyBits / n,
            Independent = extension,
            Observed = new ObservedBlocks(payload, tableBits, price.FramingBits!.Value, price.TotalBits!.Value),
        };
        return (profile, price);
    }

    private readonly record struct ObservedCode(long PayloadBits, double EntropyBits, long TableBits, TableFormat Format, int InUse);

    /// <summary>Apart, and never inlined: when it returns, nothing holds the blocks any more, however the code was compiled.</summary>
    [MethodImpl(MethodImplOptions.NoInlining)]
    private ObservedCode Observe(ViewFacts facts, ISymbolTally tally, int n, long leftOverBits)
    {
        BlockCounts blocks = tally.Blocks(n);
        long payload = BlockHuffman.PayloadBits(blocks.Counts, histogram) + leftOverBits;
        (long tableBits, TableFormat format) = Table(facts.AlphabetSize, n, blocks.Symbols, histogram);
        return new ObservedCode(payload, Entropy.BitsPerSymbol(blocks.Counts), tableBits, format, blocks.Symbols.Length);
    }

    /// <summary>Gives the memory of large arrays back at once, where some were made: the next ones may be as large.</summary>
    private static void Collect() => GC.Collect(GC.MaxGeneration, GCCollectionMode.Aggressive, blocking: true, compacting: true);

    private static IndependentExtension? Extension(ViewFacts facts, int n, long whole, long leftOverBits)
    {
        double blocksOfExtension = Math.Pow(facts.SymbolsInUse, n);
        if (blocksOfExtension > ExtensionAlwaysAtMost && blocksOfExtension > 8.0 * whole) return null;
        HuffmanExtension extension = HuffmanExtension.Of(facts.Counts, n);
        // Without lengths there were very many combinations, and their arrays are large.
        if (extension.LengthHistogram is null) Collect();
        if (extension.LengthHistogram is null) return new IndependentExtension { ExpectedBitsPerSymbol = extension.ExpectedBitsPerSymbol };
        var inUse = new int[facts.SymbolsInUse];
        for (int symbol = 0, at = 0; symbol < facts.Counts.Length; symbol++)
            if (facts.Counts[symbol] > 0) inUse[at++] = symbol;
        long sparse = SparseTable.BitsOfExtension(inUse, facts.AlphabetSize, n, extension.LengthHistogram);
        long flat = FlatTable.Bits((long)BigInteger.Pow(facts.AlphabetSize, n), extension.LengthHistogram.AsSpan().LastIndexOfAnyExcept(0L));
        long table = Math.Min(sparse, flat);
        long payload = (long)Math.Round(extension.ExpectedBitsPerSymbol * n * whole) + leftOverBits;
        long framing = Framing.Bits(facts.Symbols, table, payload) + facts.OutsideBits;
        return new IndependentExtension { ExpectedBitsPerSymbol = extension.ExpectedBitsPerSymbol, TableBits = table, ExpectedTotalBits = payload + table + framing };
    }

    private static (long Bits, TableFormat Format) Table(int alphabetSize, int n, ReadOnlySpan<int> symbols, ReadOnlySpan<long> histogram)
    {
        long alphabet = (long)BigInteger.Pow(alphabetSize, n);
        long sparse = SparseTable.BitsByHistogram(symbols, histogram);
        long flat = FlatTable.Bits(alphabet, histogram.LastIndexOfAnyExcept(0L));
        return flat <= sparse ? (flat, TableFormat.Flat) : (sparse, TableFormat.Sparse);
    }
}
