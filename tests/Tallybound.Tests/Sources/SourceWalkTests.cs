using System.Diagnostics;
using System.Text;
using Tallybound.Sources;
using Xunit;

namespace Tallybound.Tests.Sources;

public sealed class SourceWalkTests : IDisposable
{
    private readonly string root = Directory.CreateTempSubdirectory("tallybound-").FullName;

    /// <summary>By the shell: the runtime cannot remove names that are not UTF-8.</summary>
    public void Dispose() => Shell($"rm -rf '{root}'");

    private string Make(string name, string content = "x")
    {
        string path = Path.Combine(root, name);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        File.WriteAllText(path, content);
        return path;
    }

    private static void Shell(string script)
    {
        var start = new ProcessStartInfo("/bin/bash") { UseShellExecute = false };
        start.ArgumentList.Add("-c");
        start.ArgumentList.Add(script);
        using Process process = Process.Start(start)!;
        process.WaitForExit();
        Assert.Equal(0, process.ExitCode);
    }

    private static WalkResult Find(params string[] inputs) => SourceWalk.Find(new SourceRequest(inputs, [], []), TestContext.Current.CancellationToken);

    [Fact]
    public void A_folder_gives_its_files_in_the_order_of_their_names_bytes()
    {
        foreach (string name in (string[])["b", "a/z", "a.txt", "Z", "é", "深/井"]) Make(name);
        Assert.Equal(["Z", "a.txt", "a/z", "b", "é", "深/井"], Find(root).Sources.Select(source => source.Name));
    }

    [Fact]
    public void One_file_is_called_by_its_last_component_and_several_inputs_by_what_was_typed()
    {
        string one = Make("depot/one"), two = Make("depot/two");
        Assert.Equal(["one"], Find(one).Sources.Select(source => source.Name));
        Assert.Equal([one, two], Find(two, one).Sources.Select(source => source.Name));
        Assert.Equal([root + "/depot/one", root + "/depot/two"], Find(root + "/depot/", one).Sources.Select(source => source.Name).Concat(Find(root + "/depot/", one).Skipped.Select(skipped => skipped.Name.Split('~')[0])).Distinct().Order(StringComparer.Ordinal));
    }

    [Fact]
    public void A_file_reached_twice_is_one_source_and_the_second_name_says_of_which()
    {
        string first = Make("a");
        Shell($"ln '{first}' '{root}/b'");
        WalkResult walk = Find(root);
        Assert.Equal(["a"], walk.Sources.Select(source => source.Name));
        SkippedSource second = Assert.Single(walk.Skipped);
        Assert.Equal(("b", "another name of a"), (second.Name, second.Reason));
    }

    [Fact]
    public void Links_pipes_and_sockets_in_a_folder_are_skipped_in_words_and_never_waited_for()
    {
        Make("file");
        Shell($"cd '{root}' && ln -s file link && ln -s . loop && mkfifo pipe");
        using var socket = new System.Net.Sockets.Socket(System.Net.Sockets.AddressFamily.Unix, System.Net.Sockets.SocketType.Stream, System.Net.Sockets.ProtocolType.Unspecified);
        socket.Bind(new System.Net.Sockets.UnixDomainSocketEndPoint(Path.Combine(root, "socket")));
        WalkResult walk = Find(root);
        Assert.Equal(["file"], walk.Sources.Select(source => source.Name));
        Assert.Equal(["link", "loop", "pipe", "socket"], walk.Skipped.Select(skipped => skipped.Name));
    }

    [Fact]
    public void Following_links_meets_each_folder_once()
    {
        Make("inner/file");
        Shell($"cd '{root}' && ln -s ../inner inner/again && ln -s inner other");
        WalkResult walk = SourceWalk.Find(new SourceRequest([root], [], [], FollowLinks: true), TestContext.Current.CancellationToken);
        Assert.Single(walk.Sources);
        Assert.Equal(2, walk.Skipped.Count);
    }

    [Fact]
    public void A_pipe_named_as_input_is_a_stream()
    {
        Shell($"mkfifo '{root}/pipe'");
        FoundSource source = Assert.Single(Find(Path.Combine(root, "pipe")).Sources);
        Assert.Equal((SourceKind.Stream, null), (source.Kind, source.Bytes));
    }

    [Fact]
    public void Bytes_that_are_not_utf8_stand_as_hexadecimal_and_the_file_opens()
    {
        Shell($"cd '{root}' && printf y > \"$(printf 'a\\377b%%')\"");
        FoundSource source = Assert.Single(Find(root).Sources);
        Assert.Equal("a%FFb%25", source.Name);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        var buffer = new byte[4];
        Assert.Equal(1, reading.Read(buffer, 0, TestContext.Current.CancellationToken));
        Assert.Equal((byte)'y', buffer[0]);
    }

    [Fact]
    public void Globs_take_and_leave_files_and_what_is_left_is_counted()
    {
        foreach (string name in (string[])["a.csv", "sub/b.csv", "sub/c.log", "d.log"]) Make(name);
        WalkResult csv = SourceWalk.Find(new SourceRequest([root], ["**/*.csv"], []), TestContext.Current.CancellationToken);
        Assert.Equal((2, 2L), (csv.Sources.Count, csv.ExcludedByRule));
        WalkResult rest = SourceWalk.Find(new SourceRequest([root], [], ["sub/**"]), TestContext.Current.CancellationToken);
        Assert.Equal(["a.csv", "d.log"], rest.Sources.Select(source => source.Name));
    }

    [Fact]
    public void An_input_that_does_not_exist_is_refused_before_anything_else()
    {
        Make("a");
        Assert.Throws<InputNotFoundException>(() => Find(root, Path.Combine(root, "missing")));
        Assert.Throws<InputNotFoundException>(() => Find(""));
    }

    [Fact]
    public void A_tree_deeper_than_the_longest_path_is_walked_and_its_file_opens()
    {
        string name = new('d', 60);
        Shell($"cd '{root}' && stretch=$(printf '{name}/%.0s' $(seq 50)) && for i in 1 2 3 4; do mkdir -p $stretch && cd -P $stretch || exit 1; done; printf deep > file");
        FoundSource source = Assert.Single(Find(root).Sources);
        Assert.True(source.Path.RawBytes.Length > 4096);
        using SourceReading reading = SourceOpener.Open(source, MemberLimits.Default);
        Assert.Equal(4, reading.Length);
    }

    [Fact]
    public void Names_sort_as_their_utf8_bytes_do()
    {
        string[] names = ["a", "a\uFFFF", "a\U0001F6A2", "b", "é", "\uE000", ""];
        string[] expected = [.. names.OrderBy(name => Convert.ToHexString(Encoding.UTF8.GetBytes(name)), StringComparer.Ordinal)];
        Assert.Equal(expected, names.Order(NameOrder.Instance));
    }
}
