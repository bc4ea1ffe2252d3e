using System.Runtime.InteropServices;

namespace Tallybound.Cli.Tests;

public sealed class MemoryTests
{
    private const long LimitBytes = 600L << 20;

    [Fact]
    public void Four_gibibytes_of_zeros_and_one_of_even_bytes_stay_below_600_MiB()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux, which tells a process' peak memory");
        (string Name, long Bytes, Action<byte[]> Fill)[] streams =
        [
            ("zeros", 4L << 30, static _ => { }),
            // Every context and every block of three is in use: the tables have no empty corner.
            ("even", 1L << 30, new EvenBytes(seed: 11).Fill),
        ];
        foreach ((string name, long length, Action<byte[]> fill) in streams)
        {
            using var folder = new FreshFolder();
            using RunningProgram program = BuiltProgram.Start(folder, ["profile", "-", "--threads", "1", "--out", name]);
            var watch = new PeakWatch(program);
            byte[] block = new byte[1 << 20];
            for (long written = 0; written < length; written += block.Length)
            {
                fill(block);
                program.Write(block);
            }
            program.CloseInput();
            Outcome outcome = program.WaitForEnd(TimeSpan.FromMinutes(5));
            long peak = watch.End();
            Assert.Equal(0, outcome.ExitCode);
            Assert.Equal(length, (long)RunRecordFile.In(folder.At(name)).Corpus["bytes"]!);
            Assert.InRange(peak, 1L << 20, LimitBytes);
            TestContext.Current.SendDiagnosticMessage("{0}: peak {1} MiB", name, peak >> 20);
        }
        Assert.Equal(2, streams.Length);
    }

    /// <summary>Looks at a program's peak memory until it ends.</summary>
    private sealed class PeakWatch
    {
        private readonly Thread thread;
        private volatile bool ended;
        private long peak;

        public PeakWatch(RunningProgram program)
        {
            thread = new Thread(() =>
            {
                while (!ended)
                {
                    peak = Math.Max(peak, program.PeakMemoryBytes());
                    Thread.Sleep(5);
                }
            });
            thread.Start();
        }

        /// <summary>Stops looking; the most that was seen, in bytes.</summary>
        public long End()
        {
            ended = true;
            thread.Join();
            return peak;
        }
    }

    /// <summary>Bytes drawn evenly, 8 at a time. Source: Marsaglia, "Xorshift RNGs", J. Stat. Softw. 8 (2003), shifts 13, 7, 17.</summary>
    private sealed class EvenBytes(ulong seed)
    {
        private ulong state = seed;

        public void Fill(byte[] block)
        {
            foreach (ref ulong word in MemoryMarshal.Cast<byte, ulong>(block.AsSpan()))
            {
                state ^= state << 13;
                state ^= state >> 7;
                state ^= state << 17;
                word = state;
            }
        }
    }
}
