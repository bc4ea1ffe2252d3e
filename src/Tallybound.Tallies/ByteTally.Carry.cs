using Tallybound.Tallies.Kernels;

namespace Tallybound.Tallies;

// Counters are 32 bits wide; what grows past 2^31 moves into a sparse carry, so that they never wrap.
public sealed unsafe partial class ByteTally
{
    private const uint Large = 1u << 31;
    private const long RestBit = 1L << 33;
    private const long FoldBit = 1L << 32;
    private const long PairBit = 1L << 34;

    private void Spill()
    {
        for (int fold = 0; fold < 2; fold++)
        {
            SpillTable(blocks[fold]!, fold * FoldBit);
            SpillTable(rest[fold]!, (fold * FoldBit) | RestBit);
        }
        SpillTable(evenPairs, PairBit);
        sinceSpill = 0;
    }

    private void SpillTable(CounterTable table, long tag)
    {
        for (int start = 0; start < table.Length; start += 256)
        {
            if (table.Length == Triples && !rowsInUse[start >> 8]) continue;
            Span<uint> row = table.Slice(start, 256);
            for (int i = 0; i < row.Length; i++)
            {
                // With a small limit (tests) every counter moves, so that the carry is met without counting 2^31 symbols.
                if (row[i] == 0 || (row[i] < Large && spillAfter >= Large)) continue;
                long key = tag | (uint)(start + i);
                carry.TryGetValue(key, out long sum);
                carry[key] = sum + row[i];
                row[i] = 0;
            }
        }
    }

    private long Count(int fold, bool ofRest, int key) =>
        (ofRest ? rest[fold] : blocks[fold])!.Pointer[key] + (carry.Count == 0 ? 0 : carry.GetValueOrDefault((fold * FoldBit) | (ofRest ? RestBit : 0) | (uint)key));

    private long EvenPair(int key) => evenPairs.Pointer[key] + (carry.Count == 0 ? 0 : carry.GetValueOrDefault(PairBit | (uint)key));

    private static bool IsPairKey(long key) => (key & PairBit) != 0;

    private static (int Fold, bool OfRest, int Key) Unpack(long key) => ((int)((key / FoldBit) & 1), (key & RestBit) != 0, (int)(key & 0xFFFFFFFF));
}
