using System.Text.RegularExpressions;

namespace Tallybound.Cli.Tests;

public sealed partial class CompletionTests : IDisposable
{
    private static readonly string[] Shells = ["bash", "zsh", "powershell"];

    /// <summary>What is typed before the key, and what the shell must make of it: the arguments with bars between.</summary>
    private static readonly (string Typed, string Arguments)[] OnTerminal =
    [
        ("tallybound profTAB", "profile"),
        ("tallybound --vTAB", "--version"),
        ("tallybound profile --viTABniTAB", "profile|--view|nibbles"),
        ("tallybound profile --view bytes,niTAB", "profile|--view|bytes,nibbles"),
        ("tallybound profile --log-format=jsTAB", "profile|--log-format=json"),
        ("tallybound profile --out naTAB", "profile|--out|name with space.bin"),
        ("tallybound profile naTAB --keTAB", "profile|name with space.bin|--keep-tallies"),
        ("tallybound profile -- naTAB", "profile|--|name with space.bin"),
        ("tallybound render naTAB --pictures alTAB", "render|name with space.bin|--pictures|all"),
        ("tallybound completion poTAB", "completion|powershell"),
        ("tallybound profile --view naTAB", "profile|--view|na"),
        ("tallybound profile --order naTAB", "profile|--order|na"),
    ];

    private readonly FreshFolder folder = new();

    public void Dispose() => folder.Dispose();

    private string Script(string shell)
    {
        Outcome outcome = BuiltProgram.Run(folder, "completion", shell);
        Assert.Equal((0, ""), (outcome.ExitCode, outcome.Error));
        Assert.DoesNotContain('\r', outcome.Output);
        return outcome.Output;
    }

    private static string[] OptionsIn(string text) => [.. OptionName().Matches(Comment().Replace(text, "")).Select(match => match.Value).Distinct().Order(StringComparer.Ordinal)];

    [Fact]
    public void Bash_gets_commands_options_and_words_of_fixed_lists()
    {
        folder.Write("completion.bash", System.Text.Encoding.ASCII.GetBytes(Script("bash")));
        (string Words, string Reply)[] cases =
        [
            ("''", "profile render completion --help -h --version"),
            ("re", "render"),
            ("xyz", ""),
            ("render --", "--pictures --quiet --help"),
            ("profile --l", "--length-limit --log-format"),
            ("profile depot --view ''", "bytes nibbles bits words-le words-be"),
            ("profile depot --view w", "words-le words-be"),
            ("profile depot --view bits,w", "bits,words-le bits,words-be"),
            ("profile depot --view = b", "bytes bits"),
            ("profile depot --view =", "bytes nibbles bits words-le words-be"),
            ("profile --log-format ''", "text json"),
            ("render run --pictures ''", "usual all"),
            ("completion ''", "bash zsh powershell"),
            ("completion z", "zsh"),
            // Names are bash's own business: the answer is empty.
            ("profile --out ''", ""),
            ("profile ''", ""),
            ("render r", ""),
            ("profile -- --o", ""),
            ("profile --order ''", ""),
        ];
        string script = "source ./completion.bash\nreply() { COMP_WORDS=(tallybound \"$@\"); COMP_CWORD=$#; _tallybound; echo \"<${COMPREPLY[*]}>\"; }\n"
            + string.Concat(cases.Select(each => $"reply {each.Words}\n")) + "complete -p tallybound\n";
        using RunningProgram bash = BuiltProgram.StartCommand(folder, "/bin/bash", ["--norc", "-c", script]);
        bash.CloseInput();
        Outcome outcome = bash.WaitForEnd(TimeSpan.FromMinutes(1));
        Assert.Equal((0, ""), (outcome.ExitCode, outcome.Error));
        Assert.Equal([.. cases.Select(each => $"<{each.Reply}>"), "complete -o default -F _tallybound tallybound"], outcome.OutputLines);
        Assert.Equal(19, cases.Length);
    }

    [Fact]
    public void Bash_completes_on_a_terminal()
    {
        folder.Write("name with space.bin", []);
        folder.Write("completion", System.Text.Encoding.ASCII.GetBytes(Script("bash")));
        string[] answers = ShellOnTerminal.Answers(folder, "bash --norc --noprofile -i",
            ["bind 'set enable-bracketed-paste off'; source ./completion; tallybound() { local IFS='|'; echo \"<$*>\"; }; tallybound ready", .. OnTerminal.Select(each => each.Typed)]);
        Assert.Equal(["ready", .. OnTerminal.Select(each => each.Arguments)], answers);
    }

    [Theory]
    [InlineData("source ./_tallybound")]
    [InlineData("fpath=($PWD $fpath); autoload -Uz compinit; compinit -u -D")]
    public void Zsh_completes_on_a_terminal(string loading)
    {
        Prerequisites.RequireFile("/usr/bin/zsh", "zsh");
        folder.Write("name with space.bin", []);
        folder.Write("_tallybound", System.Text.Encoding.ASCII.GetBytes(Script("zsh")));
        string[] answers = ShellOnTerminal.Answers(folder, "zsh -f -i",
            [$"unsetopt zle_bracketed_paste 2>/dev/null; {loading}; tallybound() {{ echo \"<${{(j:|:)@}}>\"; }}; tallybound ready", .. OnTerminal.Select(each => each.Typed)]);
        Assert.Equal(["ready", .. OnTerminal.Select(each => each.Arguments)], answers);
    }

    /// <summary>No PowerShell runs here: this checks that the script is in balance, registers a completer, and names what the others name.</summary>
    [Fact]
    public void The_script_for_PowerShell_is_in_balance_and_holds_the_same_words_as_that_for_bash()
    {
        string script = Script("powershell");
        Assert.StartsWith("# Completion of tallybound for PowerShell.\nRegister-ArgumentCompleter -Native -CommandName tallybound -ScriptBlock {\n", script, StringComparison.Ordinal);
        string code = QuotedOrComment().Replace(script, "");
        Assert.DoesNotContain('\'', code);
        Assert.DoesNotContain('"', code);
        foreach ((char open, char close) in (ReadOnlySpan<(char, char)>)[('{', '}'), ('(', ')'), ('[', ']')])
        {
            int depth = 0;
            foreach (char character in code)
            {
                depth += character == open ? 1 : character == close ? -1 : 0;
                Assert.True(depth >= 0);
            }
            Assert.Equal(0, depth);
        }
        string[] words = [.. BashWords().Matches(Script("bash")).SelectMany(match => match.Groups["words"].Value.Split(' ')).Distinct()];
        Assert.True(words.Length > 30);
        Assert.All(words, word => Assert.Contains($"'{word}'", script, StringComparison.Ordinal));
    }

    [Fact]
    public void Every_option_of_every_command_stands_in_every_script_and_no_other()
    {
        string[] helped = OptionsIn(string.Concat(((string[])["profile", "render", "completion"]).Select(command => BuiltProgram.Run(folder, command, "--help").Output)) + " --help --version");
        int taken = 0;
        foreach (string shell in Shells)
        {
            string[] named = OptionsIn(Script(shell));
            Assert.Empty(helped.Except(named));
            foreach (string option in named.Except(helped))
            {
                Assert.DoesNotContain("is not an option", BuiltProgram.Run(folder, "profile", option).Error, StringComparison.Ordinal);
                taken++;
            }
            Assert.Equal(Script(shell), Script(shell));
        }
        // An option that exists for what is to come, and is not helped with yet.
        Assert.Equal(Shells.Length, taken);
    }

    [GeneratedRegex("(?<![\\w-])--[a-z][a-z-]+", RegexOptions.None, matchTimeoutMilliseconds: 5000)]
    private static partial Regex OptionName();

    [GeneratedRegex("^ *#.*$", RegexOptions.Multiline, matchTimeoutMilliseconds: 5000)]
    private static partial Regex Comment();

    [GeneratedRegex("words='(?<words>[^']+)'", RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 5000)]
    private static partial Regex BashWords();

    [GeneratedRegex("'[^'\n]*'|\"[^\"\n]*\"|^ *#.*$", RegexOptions.Multiline, matchTimeoutMilliseconds: 5000)]
    private static partial Regex QuotedOrComment();
}
