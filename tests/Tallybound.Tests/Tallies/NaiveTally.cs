using Tallybound.Tallies;

namespace Tallybound.Tests.Tallies;

/// <summary>What a tally says, gathered into dictionaries, and the same counted symbol by symbol in the plainest way.</summary>
internal sealed class TallyContent : IContextVisitor
{
    private int order;

    public Dictionary<(int Order, long Context, int Symbol), (long Fold0, long Fold1)> Contexts { get; } = [];

    public Dictionary<(int Length, int Block), long> Blocks { get; } = [];

    public long Symbols { get; private set; }

    public static TallyContent Of(ISymbolTally tally)
    {
        var content = new TallyContent { Symbols = tally.Symbols };
        for (content.order = 0; content.order <= tally.HighestOrder; content.order++) tally.VisitContexts(content.order, content);
        for (int length = 2; length <= tally.LongestBlock; length++)
        {
            BlockCounts blocks = tally.Blocks(length);
            for (int i = 0; i < blocks.Symbols.Length; i++)
            {
                if (i > 0 && blocks.Symbols[i] <= blocks.Symbols[i - 1]) throw new InvalidOperationException("Blocks do not ascend.");
                content.Blocks.Add((length, blocks.Symbols[i]), blocks.Counts[i]);
            }
        }
        return content;
    }

    public static TallyContent Counted(ReadOnlySpan<byte> bytes, int symbolBits, int highestOrder, int longestBlock, bool highByteFirst = true)
    {
        var symbols = new List<(int Symbol, int Fold)>();
        if (symbolBits == 16)
        {
            for (int i = 0; i + 1 < bytes.Length; i += 2) symbols.Add((highByteFirst ? (bytes[i] << 8) | bytes[i + 1] : (bytes[i + 1] << 8) | bytes[i], (i >> 12) & 1));
        }
        else
        {
            for (int i = 0; i < bytes.Length; i++)
                for (int shift = 8 - symbolBits; shift >= 0; shift -= symbolBits) symbols.Add(((bytes[i] >> shift) & ((1 << symbolBits) - 1), (i >> 12) & 1));
        }
        var content = new TallyContent { Symbols = symbols.Count };
        for (int k = 0; k <= highestOrder; k++)
        {
            for (int i = k; i < symbols.Count; i++)
            {
                long context = 0;
                for (int back = k; back > 0; back--) context = (context << symbolBits) | (long)symbols[i - back].Symbol;
                var key = (k, context, symbols[i].Symbol);
                content.Contexts.TryGetValue(key, out (long Fold0, long Fold1) sum);
                content.Contexts[key] = symbols[i].Fold == 0 ? (sum.Fold0 + 1, sum.Fold1) : (sum.Fold0, sum.Fold1 + 1);
            }
        }
        for (int n = 2; n <= longestBlock; n++)
        {
            for (int i = 0; i + n <= symbols.Count; i += n)
            {
                int block = 0;
                for (int at = 0; at < n; at++) block = (block << symbolBits) | symbols[i + at].Symbol;
                content.Blocks[(n, block)] = content.Blocks.GetValueOrDefault((n, block)) + 1;
            }
        }
        return content;
    }

    public bool Same(TallyContent other) =>
        Symbols == other.Symbols && Contexts.Count == other.Contexts.Count && Blocks.Count == other.Blocks.Count
        && Contexts.All(entry => other.Contexts.TryGetValue(entry.Key, out (long, long) count) && count == entry.Value)
        && Blocks.All(entry => other.Blocks.TryGetValue(entry.Key, out long count) && count == entry.Value);

    public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
    {
        for (int i = 0; i < symbols.Length; i++) Contexts.Add((order, context, symbols[i]), (fold0[i], fold1[i]));
    }
}
