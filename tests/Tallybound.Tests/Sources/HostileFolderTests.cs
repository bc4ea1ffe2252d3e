using System.Text;
using Tallybound.Sources;
using Xunit;

namespace Tallybound.Tests.Sources;

/// <summary>What a folder may hold that is no plain file, and what may happen to it meanwhile.</summary>
public sealed class HostileFolderTests : IDisposable
{
    private readonly TemporaryFolder folder = new();

    public void Dispose() => folder.Dispose();

    private static CancellationToken Stop => TestContext.Current.CancellationToken;

    private static WalkResult Find(params string[] inputs) => SourceWalk.Find(new SourceRequest(inputs, [], []), Stop);

    private static string[] NamesOf(WalkResult walk) => [.. walk.Sources.Select(source => source.Name)];

    [Fact]
    public void Names_with_control_characters_and_markup_are_kept_and_open()
    {
        string[] names = ["a\nb", "\u001b[31mred", "<script>alert(1)<", "=1+1", "tab\tname", " ", "-rf", "\u202etxt"];
        foreach (string name in names) folder.Write(name, Encoding.UTF8.GetBytes(name));
        WalkResult walk = Find(folder.Root);
        Assert.Equal(names.Order(NameOrder.Instance), NamesOf(walk));
        foreach (FoundSource source in walk.Sources)
        {
            using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
            var content = new byte[100];
            Assert.Equal(source.Name, Encoding.UTF8.GetString(content, 0, reading.Read(content, 0, Stop)));
        }
    }

    [Fact]
    public void A_thousand_levels_are_walked()
    {
        folder.Write(string.Concat(Enumerable.Repeat("d/", 1000)) + "file", "deep"u8.ToArray());
        FoundSource source = Assert.Single(Find(folder.Root).Sources);
        Assert.Equal(1000, source.Name.Count(character => character == '/'));
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        Assert.Equal(4, reading.Read(new byte[10], 0, Stop));
    }

    [Fact]
    public void A_time_that_no_calendar_reaches_is_unknown_and_harms_nothing()
    {
        folder.Write("file", [1]);
        folder.Shell("touch -d @-70000000000 file; touch -d @4611686018427387 file || touch -d @253402300800 file");
        Assert.Equal(1, Assert.Single(Find(folder.Root).Sources).Bytes);
    }

    [Fact]
    public void An_input_inside_another_and_one_named_twice_stand_once()
    {
        folder.Write("depot/one", [1]);
        folder.Shell("ln -s one depot/link; mkfifo depot/pipe");
        WalkResult walk = Find(folder.Root, folder.Root + "/depot", folder.Root, folder.Root + "/depot/one");
        Assert.Equal([folder.Root + "/depot/one"], NamesOf(walk));
        Assert.Equal([folder.Root + "/depot/link", folder.Root + "/depot/pipe"], walk.Skipped.Select(skipped => skipped.Name));
        Assert.Equal("stdin", Assert.Single(Find("-", "-").Sources).Name);
    }

    [Fact]
    public void One_file_under_two_inputs_keeps_the_first_name()
    {
        string path = folder.Write("one", [1]);
        WalkResult walk = Find(path, folder.Root + "/./one");
        Assert.Equal([folder.Root + "/./one"], NamesOf(walk));
        Assert.Equal(new SkippedSource(path, $"another name of {folder.Root}/./one"), Assert.Single(walk.Skipped));
    }

    [Fact]
    public void Followed_links_give_what_they_lead_to_and_say_where_they_do_not()
    {
        folder.Write("real/file", [1]);
        folder.Shell("ln -s real alias; ln -s nowhere broken; ln -s self self; ln -s .. real/up; ln -s real/file z");
        WalkResult walk = SourceWalk.Find(new SourceRequest([folder.Root], [], [], FollowLinks: true), Stop);
        Assert.Equal(["alias/file"], NamesOf(walk));
        Assert.Contains(new SkippedSource("alias/up", $"another name of the folder {Path.GetFileName(folder.Root)}"), walk.Skipped);
        Assert.Contains(new SkippedSource("real", "another name of the folder alias"), walk.Skipped);
        Assert.Contains(new SkippedSource("broken", "a symbolic link that leads nowhere"), walk.Skipped);
        Assert.Contains(new SkippedSource("self", "a symbolic link that leads nowhere"), walk.Skipped);
        Assert.Contains(new SkippedSource("z", "another name of alias/file"), walk.Skipped);
    }

    [Fact]
    public void A_link_named_as_input_is_followed()
    {
        folder.Write("real/file", [1, 2]);
        folder.Shell("ln -s real alias; ln -s real/file one");
        Assert.Equal(["file"], NamesOf(Find(folder.Root + "/alias")));
        FoundSource one = Assert.Single(Find(folder.Root + "/one").Sources);
        Assert.Equal(("one", 2L), (one.Name, one.Bytes));
    }

    [Fact]
    public void A_device_named_as_input_is_a_stream_and_a_socket_is_no_source()
    {
        FoundSource device = Assert.Single(Find("/dev/zero").Sources);
        Assert.Equal(("zero", SourceKind.Stream, null), (device.Name, device.Kind, device.Bytes));
        using (SourceReading reading = SourceOpener.Open(device, MemberLimits.Default)) Assert.Equal(100, reading.Read(new byte[100], 0, Stop));
        using var socket = new System.Net.Sockets.Socket(System.Net.Sockets.AddressFamily.Unix, System.Net.Sockets.SocketType.Stream, System.Net.Sockets.ProtocolType.Unspecified);
        socket.Bind(new System.Net.Sockets.UnixDomainSocketEndPoint(Path.Combine(folder.Root, "socket")));
        Assert.Contains("socket", Assert.Single(Find(folder.Root + "/socket").Failed).Reason, StringComparison.Ordinal);
    }

    [Fact]
    public void Globs_see_the_name_as_it_is_and_bad_ones_are_a_wrong_command_line()
    {
        folder.Write("50%.log", [1]);
        folder.Write("50%25.log", [1]);
        Assert.Equal(["50%25.log"], NamesOf(SourceWalk.Find(new SourceRequest([folder.Root], ["50%.log"], []), Stop)));
        Assert.Contains("--exclude 'a/../b'", Assert.Throws<GlobException>(() => SourceWalk.Find(new SourceRequest([folder.Root], [], ["a/../b"]), Stop)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_walk_can_be_stopped()
    {
        folder.Write("file", [1]);
        Assert.Throws<OperationCanceledException>(() => SourceWalk.Find(new SourceRequest([folder.Root], [], []), new CancellationToken(canceled: true)));
    }

    [Fact]
    public async Task A_folder_that_changes_while_it_is_walked_gives_what_stayed()
    {
        for (int i = 0; i < 300; i++) folder.Write($"stays/{i / 30}/{i:d3}", [1]);
        using var done = CancellationTokenSource.CreateLinkedTokenSource(Stop);
        Task change = Task.Run(() =>
        {
            for (int i = 0; !done.IsCancellationRequested; i++)
            {
                string name = $"moves/{i % 50}/file";
                folder.Write(name, [1]);
                if (i % 3 == 0) Directory.Delete(Path.Combine(folder.Root, "moves", $"{i % 50}"), recursive: true);
            }
        }, Stop);
        int walks = 0;
        for (; walks < 40; walks++)
        {
            WalkResult walk = Find(folder.Root);
            Assert.Equal(300, walk.Sources.Count(source => source.Name.StartsWith("stays/", StringComparison.Ordinal)));
            Assert.All(walk.Failed, failed => Assert.Contains("vanished", failed.Reason, StringComparison.Ordinal));
        }
        await done.CancelAsync();
        await change;
        Assert.Equal(40, walks);
    }
}
