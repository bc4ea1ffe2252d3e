namespace Tallybound.Cli.Tests;

public sealed class UsageTests
{
    /// <summary>What is typed, and what the one line must say, the mend included.</summary>
    public static TheoryData<string[], string> Mistakes => new()
    {
        { [], "tallybound profile INPUT..." },
        { ["prfile", "x"], "did you mean profile?" },
        { ["columns", "x"], "not a command" },
        { ["--quiet", "profile", "x"], "stands before the command" },
        { ["profile"], "INPUT is missing" },
        { ["profile", ""], "INPUT '' is empty" },
        { ["profile", "x", "--ordr", "3"], "did you mean --order?" },
        { ["profile", "x", "--thread=2"], "did you mean --threads?" },
        { ["profile", "x", "--resume"], "--resume is not an option of profile" },
        { ["profile", "x", "--sample", "10%"], "--sample is not an option of profile" },
        { ["profile", "x", "-q"], "put -- before a name that begins with a dash" },
        { ["profile", "x", "--order", "99"], "for example --order 2" },
        { ["profile", "x", "--order", "-1"], "for example --order 2" },
        { ["profile", "x", "--order", "two"], "for example --order 2" },
        { ["profile", "x", "--order"], "--order is given without a value" },
        { ["profile", "x", "--order", "1", "--order", "2"], "given 2 times" },
        { ["profile", "x", "--block-length", "0"], "from 1 to 24" },
        { ["profile", "x", "--order", "3"], "bytes reach 2" },
        { ["profile", "x", "--order", "6", "--view", "bytes,nibbles"], "bytes reach 2, nibbles reach 5" },
        { ["profile", "x", "--block-length", "4"], "bytes reach 3" },
        { ["profile", "x", "--block-length", "2", "--view", "words-le"], "words-le reach 1" },
        { ["profile", "x", "--length-limit", "11,,12"], "for example --length-limit 11,12,15" },
        { ["profile", "x", "--length-limit", "64"], "from 1 to 63" },
        { ["profile", "x", "--radix", "17"], "from 2 to 16" },
        { ["profile", "x", "--view", "bites"], "did you mean bytes?" },
        { ["profile", "x", "--view", "bytes,word-le"], "did you mean words-le?" },
        { ["profile", "x", "--threads", "0"], "from 1 to 1024" },
        { ["profile", "x", "--memory", "64MB"], "write --memory 64MiB" },
        { ["profile", "x", "--memory", "1GB"], "write --memory 1GiB" },
        { ["profile", "x", "--memory", "1k"], "write --memory 1KiB" },
        { ["profile", "x", "--memory", "64MiB"], "takes at least" },
        { ["profile", "x", "--memory", "lots"], "for example --memory 600MiB" },
        { ["profile", "x", "--segment", "5000"], "4KiB and 8KiB" },
        { ["profile", "x", "--segment", "2048"], "takes at least 4KiB" },
        { ["profile", "x", "--seed", "one"], "for example --seed 1" },
        { ["profile", "x", "--inside", "--inside-ratio", "0"], "from 1 up" },
        { ["profile", "x", "--inside-size", "1GiB"], "add --inside" },
        { ["profile", "x", "--quiet=false"], "--quiet takes no value" },
        { ["profile", "x", "--log-format", "jsn"], "did you mean json?" },
        { ["profile", "x", "--referee", "deflate"], "--referee none" },
        { ["profile", "x", "--include"], "--include is given without a value" },
        { ["profile", "x", "--out", ""], "for example --out reports/review" },
        { ["profile", "not-there"], "INPUT not-there: there is no such file or folder" },
        { ["profile", "x", "not-there/deeper"], "INPUT not-there/deeper: there is no such file or folder" },
        { ["rendr", "x"], "did you mean render?" },
        { ["reder"], "did you mean render?" },
        { ["--quiet", "render", "x"], "as in tallybound render RUN [options]" },
        { ["render"], "RUN is missing" },
        { ["render", ""], "RUN '' is empty" },
        { ["render", "x", "y"], "RUN y is one too many" },
        { ["render", "not-there"], "RUN not-there: there is no such run folder" },
        { ["render", "x"], "RUN x: a run is named by its folder" },
        { ["render", "x", "--picture", "all"], "did you mean --pictures?" },
        { ["render", "x", "--out", "y"], "--out is not an option of render; see tallybound render --help" },
        { ["render", "x", "--pictures", "al"], "--pictures al: takes usual or all; did you mean all?" },
        { ["render", "x", "--pictures"], "--pictures is given without a value; see tallybound render --help" },
        { ["render", "x", "--pictures", "all", "--pictures", "all"], "given 2 times" },
        { ["render", "x", "--quiet=yes"], "--quiet takes no value" },
        { ["completions", "bash"], "did you mean completion?" },
        { ["completion"], "SHELL is missing; takes bash, zsh or powershell" },
        { ["completion", "fish"], "SHELL fish: takes bash, zsh or powershell" },
        { ["completion", "bahs"], "did you mean bash?" },
        { ["completion", "bash", "zsh"], "SHELL zsh is one too many" },
        { ["completion", "bash", "--quiet"], "--quiet is not an option of completion" },
        { ["profile", "x", "--view", "two\nlines"], "there is no view" },
        { ["profile", "no\nsuch\u001b[31mfile"], "there is no such file or folder" },
    };

    [Theory]
    [MemberData(nameof(Mistakes))]
    public void A_mistake_is_answered_by_one_line_that_mends_it_and_nothing_is_written(string[] arguments, string says)
    {
        using var folder = new FreshFolder();
        folder.Write("x", "unit 1 door shut\n"u8.ToArray());
        Outcome outcome = BuiltProgram.Run(folder, arguments);
        Assert.Equal(2, outcome.ExitCode);
        Assert.Empty(outcome.Output);
        string line = Assert.Single(outcome.ErrorLines);
        Assert.StartsWith("tallybound: ", line, StringComparison.Ordinal);
        Assert.Contains(says, line, StringComparison.Ordinal);
        Assert.DoesNotContain(line, character => char.IsControl(character));
        Assert.Equal(["x"], folder.Everything());
    }

    [Fact]
    public void A_name_that_begins_with_a_dash_or_an_at_sign_is_an_input_like_any_other()
    {
        using var folder = new FreshFolder();
        folder.Write("-x", "door"u8.ToArray());
        folder.Write("@x", "door"u8.ToArray());
        Assert.Equal(0, BuiltProgram.Run(folder, "profile", "--out", "run", "@x", "--", "-x").ExitCode);
        Assert.Equal(["-x", "@x"], RunRecordFile.In(folder.At("run")).Names);
    }

    [Fact]
    public void Every_view_is_counted_as_far_as_the_command_line_allows()
    {
        using var folder = new FreshFolder();
        folder.Write("x", TestData.Skewed(5000, seed: 1));
        (string View, int Order, int Block)[] reaches = [("bytes", 2, 3), ("nibbles", 5, 6), ("bits", 23, 24), ("words-le", 0, 1), ("words-be", 0, 1)];
        foreach ((string view, int order, int block) in reaches)
        {
            Assert.Equal(0, BuiltProgram.Run(folder, "profile", "x", "--out", view, "--view", view, "--order", $"{order}", "--block-length", $"{block}").ExitCode);
            var figures = RunRecordFile.In(folder.At(view)).Source("x")["views"]![0]!;
            Assert.Equal(order + 1, figures["orders"]!.AsArray().Count);
            Assert.Equal(block - 1, figures["symbolBlocks"]!.AsArray().Count);
            Assert.Equal(2, BuiltProgram.Run(folder, "profile", "x", "--view", view, "--order", $"{order + 1}").ExitCode);
            Assert.Equal(2, BuiltProgram.Run(folder, "profile", "x", "--view", view, "--block-length", $"{block + 1}").ExitCode);
        }
        Assert.Equal(5, reaches.Length);
    }
}
