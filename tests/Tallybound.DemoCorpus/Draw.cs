namespace Tallybound.DemoCorpus;

/// <summary>Seeded numbers that are the same on every machine: SplitMix64 (Steele, Lea &amp; Flood 2014), whole numbers only.</summary>
internal sealed class Draw(ulong seed)
{
    private ulong state = seed;

    public ulong Next()
    {
        unchecked
        {
            state += 0x9E3779B97F4A7C15UL;
            ulong z = state;
            z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9UL;
            z = (z ^ (z >> 27)) * 0x94D049BB133111EBUL;
            return z ^ (z >> 31);
        }
    }

    /// <summary>A number from 0 to below the limit.</summary>
    public int Below(int limit) => (int)(Next() % (ulong)limit);

    /// <summary>True in so many of a thousand cases.</summary>
    public bool Chance(int ofThousand) => Below(1000) < ofThousand;

    /// <summary>About bell-shaped around 0: the sum of six draws from −spread to spread, over 3.</summary>
    public int Bell(int spread)
    {
        int sum = 0;
        for (int i = 0; i < 6; i++) sum += Below((2 * spread) + 1) - spread;
        return sum / 3;
    }

    public T Of<T>(IReadOnlyList<T> items) => items[Below(items.Count)];

    public void Shuffle<T>(Span<T> items)
    {
        for (int i = items.Length - 1; i > 0; i--)
        {
            int other = Below(i + 1);
            (items[i], items[other]) = (items[other], items[i]);
        }
    }
}
