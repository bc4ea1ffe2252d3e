using System.Diagnostics;
using Tallybound.Benchmarks.Runs;
using Tallybound.Tallies;
using Tallybound.Tallies.Kernels;

namespace Tallybound.Benchmarks.Kernels;

/// <summary>Kernels beside C on the same bytes in memory, the two sides in turn; figures are GB/s.</summary>
internal sealed unsafe class KernelComparisons(NativeCounting native, BenchmarkInputs inputs, int repetitions)
{
    /// <summary>Bytes handed over at a time, as a run does.</summary>
    private const int BlockBytes = 1 << 20;

    public IEnumerable<Comparison> All()
    {
        foreach ((string name, string path, double order0, double order1) in new[]
        {
            ("text", inputs.Text(), 1.0, 1.4), ("executables", inputs.Executables(), 1.0, 1.4), ("random", inputs.Random(), 1.0, 1.4), ("zeros", inputs.Zeros(), 5.0, 1.4),
        })
        {
            byte[] data = File.ReadAllBytes(path);
            using var tally = new ByteTally();
            // One pass unmeasured: C comes compiled, and our first pass would be spent in code that is still being compiled.
            Order0(data);
            Order1(data);
            Together(tally, data);
            yield return Row("order-0 kernel", name, "C, four tables", order0, data, Order0, NativeOrder0);
            yield return Row("order-1 kernel", name, "C, naive", order1, data, Order1, NativeOrder1);
            yield return Row("orders 0–2, blocks 2 and 3, folds", name, "C, naive order 2 alone", 0, data, bytes => Together(tally, bytes), NativeOrder2);
        }
    }

    private Comparison Row(string work, string input, string against, double reach, byte[] data, Action<byte[]> ours, Action<byte[]> theirs) => new(
        $"{work}, {input}", against, repetitions, () => Rate(data, ours), () => Rate(data, theirs), "GB/s", (our, their) => our / their!.Value,
        reach > 0 ? string.Create(System.Globalization.CultureInfo.InvariantCulture, $"≥ {reach}") : "–", ratio => ratio >= reach);

    private static double Rate(byte[] data, Action<byte[]> work)
    {
        long started = Stopwatch.GetTimestamp();
        work(data);
        return data.Length / Stopwatch.GetElapsedTime(started).TotalSeconds / 1e9;
    }

    private static void Order0(byte[] data)
    {
        var counts = new long[256];
        for (int at = 0; at < data.Length; at += BlockBytes) ByteHistogram.Add(data.AsSpan(at, Math.Min(BlockBytes, data.Length - at)), counts);
    }

    private static void Order1(byte[] data)
    {
        using var even = new CounterTable(1 << 16);
        using var odd = new CounterTable(1 << 16);
        fixed (byte* first = data) PairKernel.CountNeighbours(first, data.Length - 1, even.Pointer, odd.Pointer);
    }

    private static void Together(ByteTally tally, byte[] data)
    {
        tally.Clear();
        tally.Begin(0, []);
        for (int at = 0; at < data.Length; at += BlockBytes) tally.Append(data.AsSpan(at, Math.Min(BlockBytes, data.Length - at)));
    }

    private void NativeOrder0(byte[] data)
    {
        ulong* counts = stackalloc ulong[256];
        for (int i = 0; i < 256; i++) counts[i] = 0;
        fixed (byte* first = data) native.Order0(first, (nuint)data.Length, counts);
    }

    private void NativeOrder1(byte[] data)
    {
        using var counts = new CounterTable(1 << 16);
        fixed (byte* first = data) native.Order1(first, (nuint)data.Length, counts.Pointer);
    }

    private void NativeOrder2(byte[] data)
    {
        using var counts = new CounterTable(1 << 24);
        fixed (byte* first = data) native.Order2(first, (nuint)data.Length, counts.Pointer);
    }
}
