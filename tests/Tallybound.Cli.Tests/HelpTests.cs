namespace Tallybound.Cli.Tests;

public sealed class HelpTests
{
    private const int ScreenLines = 24;
    private const int ScreenColumns = 80;

    [Theory]
    [InlineData("--help")]
    [InlineData("-h")]
    [InlineData("profile", "--help")]
    [InlineData("profile", "-h")]
    [InlineData("profile", "data", "--order", "1", "--help")]
    [InlineData("render", "--help")]
    [InlineData("render", "-h")]
    [InlineData("completion", "--help")]
    public void Help_fits_a_screen_shows_examples_and_goes_to_standard_output(params string[] arguments)
    {
        using var folder = new FreshFolder();
        Outcome outcome = BuiltProgram.Run(folder, arguments);
        Assert.Equal(0, outcome.ExitCode);
        Assert.Empty(outcome.Error);
        Assert.InRange(outcome.OutputLines.Length, 10, ScreenLines);
        Assert.All(outcome.OutputLines, line => Assert.InRange(line.Length, 0, ScreenColumns));
        Assert.Contains("Examples:", outcome.Output, StringComparison.Ordinal);
        Assert.Contains($"tallybound {(arguments[0].StartsWith('-') ? "profile" : arguments[0])} ", outcome.Output, StringComparison.Ordinal);
        Assert.Empty(folder.Everything());
    }

    [Theory]
    [InlineData("profile", 19)]
    [InlineData("render", 2)]
    public void Every_option_that_help_names_is_taken(string command, int count)
    {
        using var folder = new FreshFolder();
        string help = BuiltProgram.Run(folder, command, "--help").Output;
        string[] options = [.. help.Split([' ', ',', '\n', '[', ']'], StringSplitOptions.RemoveEmptyEntries)
            .Where(word => word.StartsWith("--", StringComparison.Ordinal) && word.Length > 2).Distinct(StringComparer.Ordinal)];
        foreach (string option in options)
        {
            // Without an argument each ends as a usage error of another kind than "not an option".
            Outcome outcome = BuiltProgram.Run(folder, command, option);
            Assert.Equal(2, outcome.ExitCode);
            Assert.DoesNotContain("is not an option", outcome.Error, StringComparison.Ordinal);
        }
        Assert.Equal(count, options.Length);
    }

    [Fact]
    public void The_programs_page_names_every_command_and_each_has_a_page()
    {
        using var folder = new FreshFolder();
        string[] commands = [.. BuiltProgram.Run(folder, "--help").OutputLines.Where(line => line.StartsWith("  ", StringComparison.Ordinal) && char.IsAsciiLetterLower(line[2]) && !line.Contains("tallybound", StringComparison.Ordinal)).Select(line => line.Split(' ')[2])];
        Assert.Equal(["profile", "render", "completion"], commands);
        foreach (string command in commands) Assert.StartsWith($"Usage: tallybound {command} ", BuiltProgram.Run(folder, command, "--help").Output, StringComparison.Ordinal);
    }

    [Fact]
    public void Commands_and_options_of_other_days_are_not_offered()
    {
        using var folder = new FreshFolder();
        string help = BuiltProgram.Run(folder, "--help").Output + BuiltProgram.Run(folder, "profile", "--help").Output;
        string[] absent = ["columns", "codebook", "compare", "join", "--resume", "--dry-run", "--sample", "--time-budget", "--database", "--referee"];
        foreach (string word in absent) Assert.DoesNotContain(word, help, StringComparison.Ordinal);
        Assert.Equal(10, absent.Length);
    }

    [Fact]
    public void The_version_is_one_line()
    {
        using var folder = new FreshFolder();
        Outcome outcome = BuiltProgram.Run(folder, "--version");
        Assert.Equal(0, outcome.ExitCode);
        Assert.Matches(@"^tallybound \d+\.\d+\.\d+\n$", outcome.Output);
    }
}
