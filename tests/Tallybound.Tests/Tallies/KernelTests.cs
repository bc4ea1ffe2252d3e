using CsCheck;
using Tallybound.Tallies;
using Tallybound.Tallies.Kernels;
using Xunit;

namespace Tallybound.Tests.Tallies;

/// <summary>Every fast path against its plain walk, at every alignment and length.</summary>
public sealed unsafe class KernelTests
{
    private static readonly byte[] Data = MakeData();

    /// <summary>Runs, text-like and random stretches in turn.</summary>
    private static byte[] MakeData()
    {
        var random = new Random(11);
        var bytes = new byte[6000];
        for (int i = 0; i < bytes.Length; i++) bytes[i] = (i / 500 % 3) switch { 0 => (byte)7, 1 => (byte)random.Next(97, 110), _ => (byte)random.Next(256) };
        return bytes;
    }

    [Fact]
    public void The_byte_kernel_equals_the_plain_walk_at_every_alignment_and_length()
    {
        int cases = 0;
        for (int at = 0; at < 65; at++)
        {
            for (int length = 0; length <= 300; length++, cases++)
            {
                var lanes = new long[256];
                var scalar = new long[256];
                ByteHistogram.AddInLanes(Data.AsSpan(400 + at, length), lanes);
                ByteHistogram.AddScalar(Data.AsSpan(400 + at, length), scalar);
                Assert.Equal(scalar, lanes);
            }
        }
        Assert.Equal(65 * 301, cases);
    }

    [Fact]
    public void The_triple_kernel_equals_the_plain_walk_at_every_phase_and_length()
    {
        using var blocks = new CounterTable(ByteTally.Triples);
        using var rest = new CounterTable(ByteTally.Triples);
        int cases = 0;
        fixed (byte* first = Data)
        {
            for (int length = 0; length < 5000; length += length < 80 ? 1 : 617)
            {
                for (int at = 380; at < 1600; at += 233)
                {
                    for (int phase = 0; phase < 3; phase++, cases++)
                    {
                        int triples = Math.Min(length, Data.Length - at - 2);
                        var expected = new Dictionary<(bool, uint), uint>();
                        for (int i = 0; i < triples; i++)
                        {
                            var key = ((phase + i) % 3 == 0, ((uint)Data[at + i] << 16) | ((uint)Data[at + i + 1] << 8) | Data[at + i + 2]);
                            expected[key] = expected.GetValueOrDefault(key) + 1;
                        }
                        TripleKernel.CountInSixes(first + at, triples, phase, blocks.Pointer, rest.Pointer);
                        uint sum = 0;
                        foreach (((bool ofBlocks, uint key), uint count) in expected)
                        {
                            ref uint counter = ref (ofBlocks ? blocks : rest).Pointer[key];
                            Assert.Equal(count, counter);
                            sum += counter;
                            counter = 0;
                        }
                        Assert.Equal((uint)triples, sum);
                    }
                }
            }
        }
        Assert.True(cases > 1000);
        Assert.False(blocks.Slice(0, blocks.Length).ContainsAnyExcept(0u) || rest.Slice(0, rest.Length).ContainsAnyExcept(0u));
    }

    [Fact]
    public void The_pair_kernels_equal_the_plain_walk()
    {
        using var even = new CounterTable(ByteTally.Pairs);
        using var odd = new CounterTable(ByteTally.Pairs);
        int cases = 0;
        Gen.Select(Gen.Int[0, 3000], Gen.Int[0, 2900]).Sample(
            (at, length) =>
            {
                cases++;
                even.Slice(0, even.Length).Clear();
                odd.Slice(0, odd.Length).Clear();
                var expected = new uint[ByteTally.Pairs];
                fixed (byte* first = Data)
                {
                    PairKernel.CountNeighbours(first + at, length, even.Pointer, odd.Pointer);
                    for (int i = 0; i < length; i++) expected[Data[at + i] | (Data[at + i + 1] << 8)]++;
                    bool neighbours = Enumerable.Range(0, expected.Length).All(key => even.Pointer[key] + odd.Pointer[key] == expected[key]);
                    even.Slice(0, even.Length).Clear();
                    Array.Clear(expected);
                    PairKernel.CountApart(first + at, length / 2, even.Pointer);
                    for (int i = 0; i + 1 < length; i += 2) expected[Data[at + i] | (Data[at + i + 1] << 8)]++;
                    return neighbours && even.Slice(0, even.Length).SequenceEqual(expected);
                }
            }, iter: 100, threads: 1);
        Assert.Equal(100, cases);
    }
}
