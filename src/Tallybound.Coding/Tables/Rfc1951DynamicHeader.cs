using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes;

namespace Tallybound.Coding.Tables;

/// <summary>Code lengths as a dynamic Deflate block sends them (RFC 1951 §3.2.7), without the 3 bits of block type.</summary>
/// <remarks>Length runs are taken greedily and do not cross from the literal lengths to the distance lengths. The precode is optimal within its 7 bits.</remarks>
public static class Rfc1951DynamicHeader
{
    /// <summary>Longest code length that the format can say.</summary>
    public const int LongestLength = 15;

    /// <summary>Literal and length symbols that the format can hold (§3.2.7: HLIT).</summary>
    public const int LargestLiteralAlphabet = 286;

    /// <summary>Distance symbols that the format can hold (§3.2.7: HDIST, 5 bits).</summary>
    public const int LargestDistanceAlphabet = 32;

    private const int FewestLiterals = 257, PrecodeSymbols = 19, PrecodeLimit = 7, CountBits = 5, PrecodeCountBits = 4, PrecodeLengthBits = 3;

    /// <summary>The order of precode lengths, §3.2.7.</summary>
    private static ReadOnlySpan<byte> PrecodeOrder => [16, 17, 18, 0, 8, 7, 9, 6, 10, 5, 11, 4, 12, 3, 13, 2, 14, 1, 15];

    /// <summary>Whether these lengths of a byte alphabet (no end-of-block) can be sent: at most 256 symbols, none above 15 bits, one in use.</summary>
    public static bool IsLegal(ReadOnlySpan<byte> lengths) => lengths.Length < FewestLiterals && FlatTable.Longest(lengths) is > 0 and <= LongestLength;

    /// <summary>Writes the table of a byte alphabet: 257 literal lengths, of which end-of-block has 0 because it belongs to Deflate and not to the code, and one distance length, 0.</summary>
    /// <param name="lengths">At most 256 lengths of at most 15.</param>
    /// <param name="sink">Takes the bits; one that packs the least significant bit first gives Deflate's own.</param>
    /// <exception cref="ArgumentException"><see cref="IsLegal"/> is false.</exception>
    public static void Encode<TSink>(ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        if (!IsLegal(lengths)) throw new ArgumentException($"{lengths.Length} lengths up to {FlatTable.Longest(lengths)}; the header takes 256 from 1 to {LongestLength}.", nameof(lengths));
        Span<byte> literals = stackalloc byte[FewestLiterals];
        literals.Clear();
        lengths.CopyTo(literals);
        EncodeBlock(literals, [0], ref sink);
    }

    /// <summary>Writes the header of a whole block from its literal and distance lengths, HLIT first.</summary>
    /// <param name="literals">257 to 286 lengths; all are sent.</param>
    /// <param name="distances">1 to 32 lengths; all are sent.</param>
    /// <param name="sink">Takes the bits, without the 3 of block type.</param>
    /// <exception cref="ArgumentException">Too few or too many lengths, or one above 15.</exception>
    public static void EncodeBlock<TSink>(ReadOnlySpan<byte> literals, ReadOnlySpan<byte> distances, ref TSink sink)
        where TSink : IBitSink
    {
        if (literals.Length is < FewestLiterals or > LargestLiteralAlphabet) throw new ArgumentException($"There are {literals.Length} literal lengths; the header takes {FewestLiterals} to {LargestLiteralAlphabet}.", nameof(literals));
        if (distances.Length is < 1 or > LargestDistanceAlphabet) throw new ArgumentException($"There are {distances.Length} distance lengths; the header takes 1 to {LargestDistanceAlphabet}.", nameof(distances));
        int longest = Math.Max(FlatTable.Longest(literals), FlatTable.Longest(distances));
        if (longest > LongestLength) throw new ArgumentException($"The longest length is {longest}; the header allows {LongestLength}.");
        Span<LengthRun> runs = stackalloc LengthRun[LargestLiteralAlphabet + LargestDistanceAlphabet];
        int count = LengthRun.Split(literals, runs);
        count += LengthRun.Split(distances, runs[count..]);
        Span<byte> precode = stackalloc byte[PrecodeSymbols];
        BuildPrecode(runs[..count], precode);
        int sent = PrecodeSymbols;
        while (sent > 4 && precode[PrecodeOrder[sent - 1]] == 0) sent--;
        sink.Write((ulong)(literals.Length - FewestLiterals), CountBits);
        sink.Write((ulong)(distances.Length - 1), CountBits);
        sink.Write((ulong)(sent - 4), PrecodeCountBits);
        foreach (byte symbol in PrecodeOrder[..sent]) sink.Write(precode[symbol], PrecodeLengthBits);
        Span<ushort> words = stackalloc ushort[PrecodeSymbols];
        CanonicalWords.Assign(precode, words);
        foreach (LengthRun run in runs[..count])
        {
            sink.Write(CanonicalWords.Reverse(words[run.Token], precode[run.Token]), precode[run.Token]);
            sink.Write(run.Extra, LengthRun.ExtraBits(run.Token));
        }
    }

    /// <summary>Reads the table of a byte alphabet of <c>lengths.Length</c> symbols, as <see cref="Encode"/> writes it.</summary>
    /// <exception cref="InvalidDataException">The bits end early or make no table of this alphabet.</exception>
    public static void Decode(ref LowBitReader reader, scoped Span<byte> lengths)
    {
        (byte[] literals, byte[] distances) = DecodeBlock(ref reader);
        if (distances.AsSpan().ContainsAnyExcept((byte)0) || literals.AsSpan(lengths.Length).ContainsAnyExcept((byte)0)) throw new InvalidDataException($"The header has lengths outside an alphabet of {lengths.Length}.");
        literals.AsSpan(0, lengths.Length).CopyTo(lengths);
    }

    /// <summary>Reads the header of a whole block, HLIT first; runs may cross from literals to distances, as §3.2.7 allows.</summary>
    /// <exception cref="InvalidDataException">The bits end early or make no header.</exception>
    public static (byte[] Literals, byte[] Distances) DecodeBlock(ref LowBitReader reader)
    {
        int literals = (int)reader.Read(CountBits) + FewestLiterals, distances = (int)reader.Read(CountBits) + 1, sent = (int)reader.Read(PrecodeCountBits) + 4;
        Span<byte> precode = stackalloc byte[PrecodeSymbols];
        precode.Clear();
        foreach (byte symbol in PrecodeOrder[..sent]) precode[symbol] = (byte)reader.Read(PrecodeLengthBits);
        CanonicalWords.RequireRoom(precode);
        Span<ushort> words = stackalloc ushort[PrecodeSymbols];
        CanonicalWords.Assign(precode, words);
        byte[] lengths = new byte[literals + distances];
        for (int at = 0; at < lengths.Length;)
        {
            int token = ReadToken(ref reader, precode, words);
            int repeats = LengthRun.Repeats(token, (int)reader.Read(LengthRun.ExtraBits(token)));
            if (repeats > lengths.Length - at || (token == LengthRun.CopyToken && at == 0)) throw new InvalidDataException("A run of lengths leaves the table.");
            byte length = token == LengthRun.CopyToken ? lengths[at - 1] : token > LengthRun.CopyToken ? (byte)0 : (byte)token;
            lengths.AsSpan(at, repeats).Fill(length);
            at += repeats;
        }
        return (lengths[..literals], lengths[literals..]);
    }

    private static void BuildPrecode(ReadOnlySpan<LengthRun> runs, Span<byte> precode)
    {
        Span<long> counts = stackalloc long[PrecodeSymbols];
        counts.Clear();
        foreach (LengthRun run in runs) counts[run.Token]++;
        LengthLimited.TryLengths(counts, PrecodeLimit, precode);
    }

    private static int ReadToken(ref LowBitReader reader, scoped ReadOnlySpan<byte> precode, scoped ReadOnlySpan<ushort> words)
    {
        ulong word = 0;
        for (int bits = 1; bits <= PrecodeLimit; bits++)
        {
            word = (word << 1) | reader.Read(1);
            int token = CanonicalWords.Find(precode, words, word, bits);
            if (token >= 0) return token;
        }
        throw new InvalidDataException("The header holds a word that its precode does not have.");
    }
}
