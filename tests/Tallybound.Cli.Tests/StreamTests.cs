namespace Tallybound.Cli.Tests;

public sealed class StreamTests
{
    [Theory]
    [InlineData(0)]
    [InlineData(1)]
    [InlineData(2)]
    [InlineData(300_000)]
    public void Standard_input_is_profiled_whole(int length)
    {
        using var folder = new FreshFolder();
        Outcome outcome = BuiltProgram.Run(folder, ["profile", "-"], TestData.Skewed(length, seed: 5));
        Assert.Equal(0, outcome.ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "stdin"));
        Assert.True(record.Complete);
        Assert.Equal("stream", (string)record.Source("stdin")["kind"]!);
        Assert.Equal(length, (int)record.Source("stdin")["bytes"]!);
    }

    [Fact]
    public void A_file_and_the_same_bytes_as_a_stream_have_the_same_figures()
    {
        using var folder = new FreshFolder();
        byte[] bytes = TestData.Skewed(400_000, seed: 6);
        folder.Write("stdin", bytes);
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "stdin", "--out", "file").ExitCode);
        Assert.Equal(0, BuiltProgram.Run(folder, ["profile", "-", "--out", "stream"], bytes).ExitCode);
        var file = RunRecordFile.In(folder.At("file")).Source("stdin");
        var stream = RunRecordFile.In(folder.At("stream")).Source("stdin");
        Assert.Equal((string)file["sha256"]!, (string)stream["sha256"]!);
        Assert.Equal(file["views"]!.ToJsonString(), stream["views"]!.ToJsonString());
    }

    [Fact]
    public void A_named_pipe_as_input_is_a_stream()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        Posix.MakeFifo(folder.At("pipe"));
        using RunningProgram program = BuiltProgram.Start(folder, ["profile", "pipe"]);
        using (var writer = new FileStream(folder.At("pipe"), FileMode.Open, FileAccess.Write)) writer.Write(TestData.Log(5000, seed: 7));
        Outcome outcome = program.WaitForEnd(TimeSpan.FromMinutes(1));
        Assert.Equal(0, outcome.ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "pipe"));
        Assert.Equal("stream", (string)record.Source("pipe")["kind"]!);
        Assert.Equal(TestData.Log(5000, seed: 7).Length, (int)record.Source("pipe")["bytes"]!);
    }

    [Fact]
    public void A_named_pipe_inside_a_folder_is_skipped_with_its_reason_and_never_waited_for()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(10, seed: 1));
        Posix.MakeFifo(folder.At("depot", "pipe"));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot");
        Assert.Equal(0, outcome.ExitCode);
        var pipe = RunRecordFile.In(folder.At("reports", "depot")).Source("pipe");
        Assert.Equal("skipped", (string)pipe["status"]!);
        Assert.Contains("pipe", (string)pipe["reason"]!, StringComparison.Ordinal);
    }

    [Fact]
    public void Results_that_nobody_reads_on_are_no_error()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(100, seed: 1));
        Outcome outcome = BuiltProgram.Shell(folder, """
            $TALLYBOUND profile a.log | head -c 1 > /dev/null
            echo "profile: ${PIPESTATUS[0]}"
            $TALLYBOUND profile a.log --quiet | true
            echo "early: ${PIPESTATUS[0]}"
            $TALLYBOUND profile --help | true
            echo "help: ${PIPESTATUS[0]}"
            $TALLYBOUND profile a.log >&- 2>&-
            echo "closed: $?"
            """);
        Assert.Equal("profile: 0\nearly: 0\nhelp: 0\nclosed: 0\n", outcome.Output);
        Assert.Equal(3, Directory.GetDirectories(folder.At("reports")).Length);
    }
}
