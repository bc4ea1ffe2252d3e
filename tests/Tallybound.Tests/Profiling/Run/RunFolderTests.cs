using Tallybound.Profiling.Run;
using Xunit;

namespace Tallybound.Tests.Profiling.Run;

public sealed class RunFolderTests : IDisposable
{
    private readonly string root = Directory.CreateTempSubdirectory("tallybound-").FullName;

    public void Dispose() => Directory.Delete(root, recursive: true);

    [Fact]
    public void A_run_lives_in_a_partial_folder_until_it_is_whole()
    {
        string name = Path.Combine(root, "night");
        using RunFolder folder = RunFolder.CreateNamed(name);
        Assert.Equal(name + ".partial", folder.WorkPath);
        Assert.True(Directory.Exists(folder.WorkPath));
        folder.Complete();
        Assert.Equal(name, folder.WorkPath);
        Assert.Empty(Directory.GetFileSystemEntries(name));
        Assert.False(Directory.Exists(name + ".partial"));
    }

    [Fact]
    public void A_run_that_is_given_up_keeps_its_partial_name_and_no_lock()
    {
        RunFolder folder = RunFolder.CreateNamed(Path.Combine(root, "night"));
        folder.Dispose();
        Assert.EndsWith(".partial", folder.WorkPath, StringComparison.Ordinal);
        Assert.Empty(Directory.GetFileSystemEntries(folder.WorkPath));
    }

    [Theory]
    [InlineData("night")]
    [InlineData("night.partial")]
    public void A_named_folder_that_is_taken_is_refused(string taken)
    {
        Directory.CreateDirectory(Path.Combine(root, taken));
        RunFolderTakenException refusal = Assert.Throws<RunFolderTakenException>(() => RunFolder.CreateNamed(Path.Combine(root, "night")));
        Assert.Equal(Path.Combine(root, taken), refusal.TakenPath);
    }

    [Fact]
    public void A_default_name_counts_up_past_whole_and_partial_folders()
    {
        Directory.CreateDirectory(Path.Combine(root, "night"));
        Directory.CreateDirectory(Path.Combine(root, "night-2.partial"));
        using RunFolder folder = RunFolder.CreateNumbered(root, "night");
        Assert.Equal(Path.Combine(root, "night-3"), folder.FinalPath);
    }
}
