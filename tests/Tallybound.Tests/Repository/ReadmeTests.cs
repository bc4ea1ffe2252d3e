using System.Text.RegularExpressions;
using Xunit;

namespace Tallybound.Tests.Repository;

/// <summary>Holds the README's commands against what exists.</summary>
public sealed partial class ReadmeTests
{
    private static readonly string Readme = File.ReadAllText(Checkout.PathOf("README.md"));

    [Fact]
    public void Every_path_in_a_dotnet_command_exists()
    {
        int checkedPaths = 0;
        foreach (Match command in DotnetCommand().Matches(Readme))
        {
            foreach (string word in command.Value.Split(' ').Where(word => word.StartsWith("src/", StringComparison.Ordinal) || word.StartsWith("tests/", StringComparison.Ordinal) || word.EndsWith(".sln", StringComparison.Ordinal) || word == "corpora-demo"))
            {
                Assert.True(Directory.Exists(Checkout.PathOf(word)) || File.Exists(Checkout.PathOf(word)), $"README names {word}.");
                checkedPaths++;
            }
        }
        Assert.True(checkedPaths >= 4);
    }

    [Fact]
    public void The_script_of_a_new_machine_runs_the_readmes_test_command()
    {
        string command = Assert.Single(DotnetCommand().Matches(Readme), match => match.Value.StartsWith("dotnet test", StringComparison.Ordinal)).Value;
        Assert.Contains("\n" + command, File.ReadAllText(Checkout.PathOf(".ci", "run")), StringComparison.Ordinal);
    }

    [Fact]
    public void Every_option_in_the_readme_is_one_of_the_program()
    {
        string program = string.Concat(Checkout.Files().Where(file => file.StartsWith("src/Tallybound.Cli/", StringComparison.Ordinal) && file.EndsWith(".cs", StringComparison.Ordinal)).Select(file => File.ReadAllText(Checkout.PathOf(file))));
        string[] options = [.. Option().Matches(Readme).Select(match => match.Value).Distinct().Except(["--project", "--solution"])];
        Assert.NotEmpty(options);
        Assert.All(options, option => Assert.Contains(option, program, StringComparison.Ordinal));
    }

    [Fact]
    public void The_readme_shows_every_command_of_the_program_and_no_other()
    {
        string program = string.Concat(Checkout.Files().Where(file => file.StartsWith("src/Tallybound.Cli/Options/", StringComparison.Ordinal)).Select(file => File.ReadAllText(Checkout.PathOf(file))));
        string[] declared = [.. DeclaredCommand().Matches(program).Select(match => match.Groups["name"].Value).Order(StringComparer.Ordinal)];
        string[] shown = [.. ShownCommand().Matches(Readme).Select(match => match.Groups["name"].Value).Distinct().Order(StringComparer.Ordinal)];
        Assert.Equal(["completion", "profile", "render"], declared);
        Assert.Equal(declared, shown);
    }

    [GeneratedRegex(": base\\(\"(?<name>[a-z]+)\"", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 5000)]
    private static partial Regex DeclaredCommand();

    [GeneratedRegex("tallybound (?<name>[a-z]+)", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 5000)]
    private static partial Regex ShownCommand();

    [GeneratedRegex("^dotnet .*$", RegexOptions.Multiline | RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 5000)]
    private static partial Regex DotnetCommand();

    [GeneratedRegex("--[a-z][a-z-]+", RegexOptions.None, matchTimeoutMilliseconds: 5000)]
    private static partial Regex Option();
}
