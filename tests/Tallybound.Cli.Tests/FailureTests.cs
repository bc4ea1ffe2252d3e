namespace Tallybound.Cli.Tests;

public sealed class FailureTests
{
    [Fact]
    public void An_unreadable_file_is_a_record_and_the_run_goes_on()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("depot/good.log", TestData.Log(300, seed: 1));
        folder.Write("depot/locked.log", TestData.Log(300, seed: 2));
        Outcome outcome = AsOrdinaryUser(folder, "chmod 000 depot/locked.log", "profile depot");
        Assert.Equal(1, outcome.ExitCode);
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "depot"));
        Assert.True(record.Complete);
        Assert.Equal("profiled", (string)record.Source("good.log")["status"]!);
        var locked = record.Source("locked.log");
        Assert.Equal("failed", (string)locked["status"]!);
        Assert.NotEmpty((string)locked["reason"]!);
        Assert.Null(locked["views"]);
        Assert.Contains("locked.log", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("1 failed", outcome.Output, StringComparison.Ordinal);
        Assert.Contains("locked.log", outcome.Error, StringComparison.Ordinal);
    }

    [Fact]
    public void An_unreadable_folder_is_a_record_and_the_run_goes_on()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("depot/good.log", TestData.Log(300, seed: 1));
        folder.Write("depot/locked/inner.log", TestData.Log(300, seed: 2));
        Outcome outcome = AsOrdinaryUser(folder, "chmod 000 depot/locked", "profile depot");
        Assert.Equal(1, outcome.ExitCode);
        Assert.Equal("failed", (string)RunRecordFile.In(folder.At("reports", "depot")).Source("locked")["status"]!);
    }

    [Fact]
    public void A_folder_that_may_not_be_written_is_answered_by_3_and_one_line()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(30, seed: 1));
        Outcome outcome = AsOrdinaryUser(folder, "mkdir shut && chmod 555 shut", "profile a.log --out shut/run");
        Assert.Equal(3, outcome.ExitCode);
        Assert.Contains("name another folder with --out", Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
    }

    [Fact]
    public void A_full_disk_is_answered_by_3_and_one_line()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("a.log", TestData.Log(3000, seed: 1));
        // No file may grow beyond 8 blocks of 1 KiB: the kernel refuses a write as it does on a full disk.
        Outcome outcome = BuiltProgram.Shell(folder, "trap '' XFSZ; export DOTNET_EnableWriteXorExecute=0 DOTNET_EnableDiagnostics=0; ulimit -f 8; $TALLYBOUND profile a.log --quiet --out run");
        Assert.Equal(3, outcome.ExitCode);
        Assert.StartsWith("tallybound: the run could not be kept", Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
        Assert.False(Directory.Exists(folder.At("run")));
    }

    /// <summary>Runs the program as a user whom file rights bind, which the superuser is not.</summary>
    private static Outcome AsOrdinaryUser(FreshFolder folder, string before, string arguments)
    {
        if (!Environment.IsPrivilegedProcess) return BuiltProgram.Shell(folder, $"{before} && $TALLYBOUND {arguments}; code=$?; chmod -R u+rwX .; exit $code");
        Prerequisites.RequireFile("/usr/bin/setpriv", "util-linux");
        // The built program may lie where only the superuser can look.
        return BuiltProgram.Shell(folder, $"""
            cp -r '{Path.GetDirectoryName(BuiltProgram.Assembly)}' ../$(basename "$PWD").program && chmod -R a+rX ../$(basename "$PWD").program
            chmod 755 . && chown -R 65534:65534 .
            export HOME="$PWD" PROGRAM="$(readlink -f ../$(basename "$PWD").program)"
            setpriv --reuid=65534 --regid=65534 --clear-groups /bin/bash -c '{before} && {BuiltProgram.DotNet} "$PROGRAM/tallybound.dll" {arguments}'
            code=$?
            rm -r "$PROGRAM"
            chmod -R u+rwX .
            exit $code
            """);
    }
}
