namespace Tallybound.Cli.Tests;

public sealed class MemoryTests
{
    private const long LimitBytes = 600L << 20;

    [Fact]
    public void Four_gibibytes_of_zeros_and_one_of_even_bytes_stay_below_600_MiB()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux, which tells a process' peak memory");
        (string Name, long Bytes, byte[] Block)[] streams =
        [
            ("zeros", 4L << 30, new byte[1 << 20]),
            // Bytes that repeat after 7 MiB fill every table as fresh ones do, and cost the test no time.
            ("even", 1L << 30, TestData.Even(7 << 20, seed: 11)),
        ];
        foreach ((string name, long length, byte[] block) in streams)
        {
            using var folder = new FreshFolder();
            using RunningProgram program = BuiltProgram.Start(folder, ["profile", "-", "--threads", "1", "--out", name]);
            long peak = 0;
            using var ended = new CancellationTokenSource();
            var watcher = new Thread(() =>
            {
                while (!ended.IsCancellationRequested)
                {
                    peak = Math.Max(peak, program.PeakMemoryBytes());
                    Thread.Sleep(5);
                }
            });
            watcher.Start();
            for (long written = 0; written < length; written += block.Length)
                program.Write(block.AsSpan(0, (int)Math.Min(block.Length, length - written)));
            program.CloseInput();
            Outcome outcome = program.WaitForEnd(TimeSpan.FromMinutes(5));
            ended.Cancel();
            watcher.Join();
            Assert.Equal(0, outcome.ExitCode);
            Assert.Equal(length, (long)RunRecordFile.In(folder.At(name)).Corpus["bytes"]!);
            Assert.InRange(peak, 1L << 20, LimitBytes);
            TestContext.Current.SendDiagnosticMessage("{0}: peak {1} MiB", name, peak >> 20);
        }
        Assert.Equal(2, streams.Length);
    }
}
