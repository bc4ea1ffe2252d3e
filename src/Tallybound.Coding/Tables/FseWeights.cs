using System.Numerics;
using Tallybound.Coding.Bits;
using Tallybound.Coding.Codes.Tans;

namespace Tallybound.Coding.Tables;

/// <summary>Huffman weights coded with FSE, RFC 8878 §4.2.1.2: the distribution of the weights, then a stream of two states that take turns, read from its end.</summary>
/// <remarks>The states start in the lowest cells of the last two weights, which cost nothing. A decoder finds the end by a state that asks for bits when none are left, so each start cell must
/// read at least one; it does where two distinct weights are sent, for then no weight has all the cells.</remarks>
internal static class FseWeights
{
    public const int SmallestLog = 5, LargestLog = 6;

    private const int Weights = Rfc8878HuffmanWeights.LongestLength + 1;

    /// <summary>Bytes of distribution and stream, or 0 where they make no legal body: one weight throughout, or more than 127 bytes.</summary>
    public static int BodyBytes(ReadOnlySpan<byte> weights, int log)
    {
        if (!weights.ContainsAnyExcept(weights[0])) return 0;
        Span<int> frequencies = stackalloc int[Weights];
        Fit(weights, log, frequencies);
        var counter = default(BitCounter);
        Encode(weights, frequencies, log, ref counter);
        long bytes = counter.Bits / 8;
        return bytes <= Rfc8878HuffmanWeights.LargestFseBody ? (int)bytes : 0;
    }

    /// <summary>Writes distribution and stream; at least two distinct weights.</summary>
    public static void Encode<TSink>(ReadOnlySpan<byte> weights, int log, ref TSink sink)
        where TSink : IBitSink
    {
        Span<int> frequencies = stackalloc int[Weights];
        Fit(weights, log, frequencies);
        Encode(weights, frequencies, log, ref sink);
    }

    /// <summary>Reads a body of <paramref name="bytes"/> bytes.</summary>
    /// <returns>How many weights it holds.</returns>
    /// <exception cref="InvalidDataException">The bits end early, or make no stream of at most <c>weights.Length</c> weights.</exception>
    public static int Decode(ref LowBitReader reader, int bytes, scoped Span<byte> weights)
    {
        long end = reader.Position + (bytes * 8L);
        Span<int> frequencies = stackalloc int[Weights];
        int log = Rfc8878FseDistribution.Decode(ref reader, frequencies);
        if (log > LargestLog) throw new InvalidDataException($"The weights have accuracy log {log}; the largest is {LargestLog}.");
        int left = (int)(end - reader.Position) / 8;
        if (left < 1) throw new InvalidDataException("The weights' stream is empty.");
        byte[] stream = new byte[left];
        for (int i = 0; i < left; i++) stream[i] = (byte)reader.Read(8);
        return new Stream(stream).Decode(new TansTable(frequencies, log), weights);
    }

    private static void Fit(ReadOnlySpan<byte> weights, int log, Span<int> frequencies)
    {
        Span<long> counts = stackalloc long[Weights];
        counts.Clear();
        foreach (byte weight in weights) counts[weight]++;
        QuantizedFrequencies.TryFit(counts, log, frequencies);
    }

    private static void Encode<TSink>(ReadOnlySpan<byte> weights, ReadOnlySpan<int> frequencies, int log, ref TSink sink)
        where TSink : IBitSink
    {
        Rfc8878FseDistribution.Encode(frequencies, log, ref sink);
        int size = 1 << log;
        Span<int> symbolOfCell = stackalloc int[size];
        Span<byte> cells = stackalloc byte[size], next = stackalloc byte[Weights];
        Span<sbyte> rankOffset = stackalloc sbyte[Weights];
        TansSpread.Fill(frequencies, log, symbolOfCell);
        int before = 0;
        for (int weight = 0; weight < Weights; weight++)
        {
            next[weight] = (byte)before;
            rankOffset[weight] = (sbyte)(before - frequencies[weight]);
            before += frequencies[weight];
        }
        for (int cell = 0; cell < size; cell++) cells[next[symbolOfCell[cell]]++] = (byte)cell;
        int last = weights.Length - 1;
        int state = size + cells[rankOffset[weights[last]] + frequencies[weights[last]]];
        int other = size + cells[rankOffset[weights[last - 1]] + frequencies[weights[last - 1]]];
        for (int i = last - 2; i >= 0; i--)
        {
            int weight = weights[i], frequency = frequencies[weight], bits = log - BitOperations.Log2((uint)frequency);
            if (state >> bits < frequency) bits--;
            sink.Write((ulong)state & ((1UL << bits) - 1), bits);
            state = size + cells[(state >> bits) + rankOffset[weight]];
            (state, other) = (other, state);
        }
        // The states stand as they take turns: `state` codes the next index down, −1 after the loop, so `other` is the one of index 0.
        sink.Write((ulong)(state - size), log);
        sink.Write((ulong)(other - size), log);
        sink.Write(1, 1);
        sink.Write(0, (int)(-sink.Bits & 7));
    }

    /// <summary>A stream read from its end: below the highest set bit of the last byte.</summary>
    private ref struct Stream(ReadOnlySpan<byte> bytes)
    {
        private readonly ReadOnlySpan<byte> bytes = bytes;
        private int left;

        public int Decode(TansTable table, scoped Span<byte> weights)
        {
            if (bytes[^1] == 0) throw new InvalidDataException("The weights' stream has no end mark.");
            left = ((bytes.Length - 1) * 8) + BitOperations.Log2(bytes[^1]);
            if (left < 2 * table.TableLog) throw new InvalidDataException("The weights' stream is shorter than its two states.");
            int cell = Read(table.TableLog), other = Read(table.TableLog);
            for (int i = 0; i < weights.Length - 1; i++)
            {
                weights[i] = (byte)table.SymbolOf(cell);
                int bits = table.BitsOf(cell);
                if (bits > left)
                {
                    weights[i + 1] = (byte)table.SymbolOf(other);
                    return i + 2;
                }
                cell = table.BaselineOf(cell) + Read(bits);
                (cell, other) = (other, cell);
            }
            throw new InvalidDataException($"The weights' stream goes on behind {weights.Length} weights.");
        }

        private int Read(int bits)
        {
            int value = 0;
            for (int i = 0; i < bits; i++)
            {
                left--;
                value = (value << 1) | ((bytes[left >> 3] >> (left & 7)) & 1);
            }
            return value;
        }
    }
}
