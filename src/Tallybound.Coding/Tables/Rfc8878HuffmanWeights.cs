using System.Numerics;
using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Tables;

/// <summary>Code lengths as the Huffman tree description of RFC 8878 §4.2.1 sends them: weights (longest + 1 − length, 0 for a symbol not in use) up to the symbol before the last one
/// in use, whose weight follows from a Kraft sum of 1; 4 bits each, or coded with FSE, whichever takes fewer bytes (direct on a tie).</summary>
public static class Rfc8878HuffmanWeights
{
    /// <summary>Longest code length of the format.</summary>
    public const int LongestLength = 11;

    internal const int LargestAlphabet = 256, MostDirectWeights = 128, LargestFseBody = 127;

    private const int HeaderBits = 8, DirectWeightBits = 4;

    /// <summary>Bits of the table, a multiple of 8.</summary>
    /// <param name="lengths">One length a symbol, 0 for a symbol not in use.</param>
    /// <param name="bits">The price, 0 where there is none.</param>
    /// <returns>False where the format cannot hold the lengths: fewer than two symbols in use, an alphabet above 256, a length above 11, a Kraft sum other than 1,
    /// or a last symbol above 128 and weights whose FSE form has no end or is longer than 127 bytes.</returns>
    public static bool TryPrice(ReadOnlySpan<byte> lengths, out long bits)
    {
        Span<byte> weights = stackalloc byte[LargestAlphabet];
        Plan plan = Choose(lengths, weights);
        bits = plan.TableBytes * 8L;
        return plan.TableBytes > 0;
    }

    /// <summary>Writes the table.</summary>
    /// <param name="lengths">As for <see cref="TryPrice"/>.</param>
    /// <param name="sink">Takes the bits; one that packs the least significant bit first gives the RFC's own. It stands on a byte boundary.</param>
    /// <exception cref="ArgumentException">The format cannot hold these lengths.</exception>
    public static void Encode<TSink>(ReadOnlySpan<byte> lengths, ref TSink sink)
        where TSink : IBitSink
    {
        Span<byte> buffer = stackalloc byte[LargestAlphabet];
        Plan plan = Choose(lengths, buffer);
        if (plan.TableBytes == 0) throw new ArgumentException("The format cannot hold these lengths.", nameof(lengths));
        ReadOnlySpan<byte> weights = buffer[..plan.Weights];
        if (plan.FseLog > 0)
        {
            sink.Write((ulong)plan.TableBytes - 1, HeaderBits);
            FseWeights.Encode(weights, plan.FseLog, ref sink);
            return;
        }
        sink.Write((ulong)(LargestFseBody + weights.Length), HeaderBits);
        for (int i = 0; i < weights.Length; i += 2)
        {
            // The first weight of a pair stands in the upper half of its byte.
            sink.Write(i + 1 < weights.Length ? weights[i + 1] : 0UL, DirectWeightBits);
            sink.Write(weights[i], DirectWeightBits);
        }
    }

    /// <summary>Reads a table of an alphabet of <c>lengths.Length</c> symbols; the reader stands on a byte boundary before and after it.</summary>
    /// <exception cref="InvalidDataException">The bits end early, or make no complete code of this alphabet.</exception>
    public static void Decode(ref LowBitReader reader, scoped Span<byte> lengths)
    {
        Span<byte> weights = stackalloc byte[LargestAlphabet];
        int header = (int)reader.Read(HeaderBits), sent = header - LargestFseBody;
        if (sent <= 0)
        {
            sent = FseWeights.Decode(ref reader, header, weights[..(LargestAlphabet - 1)]);
        }
        else
        {
            for (int i = 0; i < sent; i += 2)
            {
                weights[i + 1] = (byte)reader.Read(DirectWeightBits);
                weights[i] = (byte)reader.Read(DirectWeightBits);
            }
        }
        FromWeights(weights[..sent], lengths);
    }

    /// <summary>Lengths from the weights sent; the last symbol's follows.</summary>
    /// <exception cref="InvalidDataException">The weights make no complete code of at most 11 bits, or not of this alphabet.</exception>
    public static void FromWeights(ReadOnlySpan<byte> weights, Span<byte> lengths)
    {
        long units = 0;
        foreach (byte weight in weights)
        {
            if (weight > LongestLength) throw new InvalidDataException($"A weight is {weight}; the largest is {LongestLength}.");
            units += weight == 0 ? 0 : 1L << (weight - 1);
        }
        if (units == 0 || weights.Length >= lengths.Length) throw new InvalidDataException($"{weights.Length} weights with a sum of {units} make no code of {lengths.Length} symbols.");
        int longest = BitOperations.Log2((ulong)units) + 1;
        long missing = (1L << longest) - units;
        if (longest > LongestLength || !BitOperations.IsPow2(missing)) throw new InvalidDataException($"The weights add up to {units}; no last weight completes a code of at most {LongestLength} bits.");
        lengths.Clear();
        for (int symbol = 0; symbol < weights.Length; symbol++) lengths[symbol] = weights[symbol] == 0 ? (byte)0 : (byte)(longest + 1 - weights[symbol]);
        lengths[weights.Length] = (byte)(longest - BitOperations.Log2((ulong)missing));
    }

    private static Plan Choose(ReadOnlySpan<byte> lengths, Span<byte> weights)
    {
        if (lengths.Length > LargestAlphabet) return default;
        int last = lengths.LastIndexOfAnyExcept((byte)0), longest = FlatTable.Longest(lengths);
        if (last < 1 || longest > LongestLength) return default;
        int kraft = 0;
        for (int symbol = 0; symbol <= last; symbol++)
        {
            byte length = lengths[symbol];
            weights[symbol] = length == 0 ? (byte)0 : (byte)(longest + 1 - length);
            kraft += length == 0 ? 0 : 1 << (longest - length);
        }
        if (kraft != 1 << longest) return default;
        var plan = default(Plan);
        if (last <= MostDirectWeights) plan = new Plan(last, 1 + ((last + 1) / 2), 0);
        for (int log = FseWeights.SmallestLog; log <= FseWeights.LargestLog; log++)
        {
            int body = FseWeights.BodyBytes(weights[..last], log);
            if (body > 0 && (plan.TableBytes == 0 || 1 + body < plan.TableBytes)) plan = new Plan(last, 1 + body, log);
        }
        return plan;
    }

    /// <summary>Weights to send, bytes with the header byte (0: none possible), and the FSE accuracy log (0: direct).</summary>
    private readonly record struct Plan(int Weights, int TableBytes, int FseLog);
}
