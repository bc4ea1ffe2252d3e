using System.Diagnostics;

namespace Tallybound.Cli.Tests;

public sealed class StopTests
{
    [Theory]
    [InlineData(Posix.Interrupt)]
    [InlineData(Posix.Terminate)]
    public void A_stopped_stream_keeps_the_record_of_what_was_read(int signal)
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        byte[] written = TestData.Skewed(3 << 20, seed: 8);
        using RunningProgram program = BuiltProgram.Start(folder, ["profile", "-"]);
        program.Write(written);
        program.WaitUntil(() => program.BytesWaitingInInput() == 0, "its input was read");
        program.Signal(signal);
        Outcome outcome = program.WaitForEnd(TimeSpan.FromMinutes(1));
        Assert.Equal(130, outcome.ExitCode);
        Assert.False(Directory.Exists(folder.At("reports", "stdin")));
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "stdin.partial"));
        Assert.False(record.Complete);
        Assert.Equal("partial", (string)record.Source("stdin")["status"]!);
        Assert.Equal(written.Length, (int)record.Source("stdin")["bytes"]!);
        Assert.Equal(Convert.ToHexStringLower(System.Security.Cryptography.SHA256.HashData(written)), (string)record.Source("stdin")["sha256"]!);
        Assert.Contains("reports/stdin.partial/index.html", outcome.Output, StringComparison.Ordinal);
        Assert.True(File.Exists(folder.At("reports", "stdin.partial", "sources.csv")));
    }

    [Fact]
    public void A_named_pipe_that_never_opens_can_be_stopped()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(100, seed: 1));
        Posix.MakeFifo(folder.At("pipe"));
        using RunningProgram program = BuiltProgram.Start(folder, ["profile", "a.log", "pipe", "--out", "run"]);
        program.WaitUntil(() => Directory.Exists(folder.At("run.partial")), "the run began");
        Thread.Sleep(300);
        program.Signal(Posix.Interrupt);
        Assert.Equal(130, program.WaitForEnd(TimeSpan.FromSeconds(30)).ExitCode);
        Assert.False(RunRecordFile.In(folder.At("run.partial")).Complete);
    }

    [Fact]
    public void A_second_signal_ends_the_run_at_once()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        using RunningProgram program = BuiltProgram.Start(folder, ["profile", "-"]);
        program.Write(TestData.Skewed(1 << 20, seed: 9));
        program.WaitUntil(() => program.BytesWaitingInInput() == 0, "its input was read");
        var watch = Stopwatch.StartNew();
        program.Signal(Posix.Interrupt);
        // Two signals of one kind that come at the same moment are one; and the first one may have been enough by then.
        Thread.Sleep(20);
        _ = Posix.Kill(program.Id, Posix.Interrupt);
        Assert.Equal(130, program.WaitForEnd(TimeSpan.FromSeconds(30)).ExitCode);
        Assert.InRange(watch.Elapsed, TimeSpan.Zero, TimeSpan.FromSeconds(10));
        Assert.False(Directory.Exists(folder.At("reports", "stdin")));
    }
}
