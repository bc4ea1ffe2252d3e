using Tallybound.Sources;
using Tallybound.Sources.Walking;
using Xunit;

namespace Tallybound.Tests.Sources;

/// <summary>The walk of systems other than Linux, through the runtime's own calls, tried where the tests run.</summary>
public sealed class PortableFolderTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    public void Dispose() => folder.Dispose();

    private WalkResult Find(bool followLinks, string? input = null) =>
        new Walk(new SourceRequest([input ?? folder.Root], [], [], FollowLinks: followLinks), new PortableFolders(), TestContext.Current.CancellationToken).Run();

    [Fact]
    public void Both_ways_of_walking_find_the_same_files()
    {
        foreach (string name in (string[])["b", "a/z", "a.txt", "Z", "é", "深/井", "a.b/c", "deep/er/still"]) folder.Write(name, [1, 2, 3]);
        WalkResult portable = Find(followLinks: false);
        WalkResult native = SourceWalk.Find(new SourceRequest([folder.Root], [], []), TestContext.Current.CancellationToken);
        Assert.Equal(8, portable.Sources.Count);
        Assert.Equal(native.Sources.Select(source => (source.Name, source.Bytes, source.ModifiedUtc)), portable.Sources.Select(source => (source.Name, source.Bytes, source.ModifiedUtc)));
    }

    [Fact]
    public void Links_are_skipped_or_followed_without_a_loop()
    {
        folder.Write("real/file", [1]);
        folder.Shell("ln -s real alias; ln -s nowhere broken; ln -s .. real/up; ln -s real/file z");
        WalkResult skipped = Find(followLinks: false);
        Assert.Equal(["real/file"], skipped.Sources.Select(source => source.Name));
        Assert.Equal(["alias", "broken", "real/up", "z"], skipped.Skipped.Select(source => source.Name));
        WalkResult followed = Find(followLinks: true);
        Assert.Equal(["alias/file", "z"], followed.Sources.Select(source => source.Name));
        Assert.Equal(["alias/up", "broken", "real"], followed.Skipped.Select(source => source.Name));
    }

    [Fact]
    public void An_input_that_does_not_exist_is_refused() => Assert.Throws<InputNotFoundException>(() => Find(followLinks: false, folder.Root + "/missing"));
}
