using CsCheck;

namespace Tallybound.Tests.Profiling.Segments;

/// <summary>Random sources made of stretches of several characters, so that every kind of table block has its place.</summary>
internal sealed record MixedSource(byte[] Symbols, int AlphabetSize, int SegmentSymbols)
{
    public static readonly Gen<MixedSource> Any =
        Gen.Select(OneOf(2, 3, 16, 200, 256), OneOf(32, 64, 256, 1024)).SelectMany((alphabetSize, segment) =>
            Stretch(alphabetSize, segment).List[1, 12].Select(stretches => new MixedSource([.. stretches.SelectMany(s => s)], alphabetSize, segment))
                .Where(source => source.Symbols.Length > 0));

    public int Segments => (Symbols.Length + SegmentSymbols - 1) / SegmentSymbols;

    /// <summary>Counts of each segment, one row after the other.</summary>
    public long[] Counts()
    {
        long[] counts = new long[Segments * AlphabetSize];
        for (int i = 0; i < Symbols.Length; i++) counts[(i / SegmentSymbols * AlphabetSize) + Symbols[i]]++;
        return counts;
    }

    /// <summary>Counts of one stretch of symbols.</summary>
    public long[] Counts(int from, int to)
    {
        long[] counts = new long[AlphabetSize];
        foreach (byte symbol in Symbols.AsSpan(from, to - from)) counts[symbol]++;
        return counts;
    }

    private static Gen<int> OneOf(params int[] values) => Gen.Int[0, values.Length - 1].Select(i => values[i]);

    private static Gen<byte[]> Stretch(int alphabetSize, int segment) =>
        Gen.Select(Gen.Int[0, 3], Gen.Int[1, 4 * segment], Gen.Int[0, 3], Gen.Int[0, int.MaxValue]).Select((character, length, variant, seed) =>
        {
            // A stretch is told by few numbers, so that shrinking stays quick.
            var random = new Random(character == 0 ? variant : seed);
            byte[] symbols = new byte[length];
            for (int i = 0; i < length; i++)
            {
                symbols[i] = character switch
                {
                    0 => (byte)(variant * 7 % alphabetSize),
                    1 => (byte)random.Next(alphabetSize),
                    _ => (byte)(((int)Math.Min(-Math.Log(1 - random.NextDouble()) * (1 + variant), alphabetSize - 1) + (5 * variant)) % alphabetSize),
                };
            }
            return symbols;
        });
}
