namespace Tallybound.Cli.Tests;

public sealed class SameBytesTests
{
    [Fact]
    public void Threads_and_memory_change_no_byte_outside_provenance()
    {
        using var folder = new FreshFolder();
        folder.Write("depot/a.log", TestData.Log(20_000, seed: 1));
        folder.Write("depot/even.bin", TestData.Even(3_000_001, seed: 2));
        folder.Write("depot/empty", []);
        folder.Write("depot/one", [200]);
        // Longer than a work unit of 64 MiB, and not a multiple of anything.
        folder.Write("depot/long.bin", [.. TestData.Skewed((80 << 20) + 4097, seed: 3), .. new byte[(60 << 20) + 1]]);
        for (int i = 0; i < 60; i++) folder.Write($"depot/small/{i:00}", TestData.Skewed(i * 97, seed: i));
        string[][] settings =
        [
            ["--threads", "1", "--memory", "600MiB"],
            ["--threads", "2", "--memory", "600MiB"],
            ["--threads", "2", "--memory", "1200MiB"],
            ["--threads", "3", "--memory", "2GiB", "--log-format", "json"],
        ];
        for (int run = 0; run < settings.Length; run++)
            Assert.Equal(0, BuiltProgram.Run(folder, ["profile", "depot", "--out", $"run-{run}", .. settings[run]], input: null).ExitCode);
        string first = RunRecordFile.In(folder.At("run-0")).OutsideProvenance();
        for (int run = 1; run < settings.Length; run++)
        {
            Assert.Equal(first, RunRecordFile.In(folder.At($"run-{run}")).OutsideProvenance());
            Assert.Equal(File.ReadAllBytes(folder.At("run-0", "sources.csv")), File.ReadAllBytes(folder.At($"run-{run}", "sources.csv")));
        }
        Assert.Equal(4, settings.Length);
    }
}
