using System.Text.RegularExpressions;

namespace Tallybound.Cli.Tests;

public sealed class ProgressTests
{
    private const string Escape = "\u001b";

    /// <summary>A change of the foreground or background colour.</summary>
    private static readonly Regex Colour = new(@"\u001b\[[0-9;]*(3[0-9]|4[0-9]|9[0-7])[0-9;]*m", RegexOptions.NonBacktracking | RegexOptions.ExplicitCapture);

    private static readonly Regex CursorVisibility = new(@"\u001b\[\?25[lh]", RegexOptions.NonBacktracking);

    [Fact]
    public void Progress_is_shown_on_a_terminal_with_harmless_names_and_cleared_away()
    {
        using var folder = new FreshFolder();
        string shown = OnTerminal(folder, "");
        Assert.Contains("files", shown, StringComparison.Ordinal);
        Assert.Matches(@"[KM]iB/s", shown);
        Assert.Matches(Colour, shown);
        Assert.DoesNotContain(Escape + "]0;title", shown, StringComparison.Ordinal);
        Assert.Contains("Report: reports/depot/index.html", shown, StringComparison.Ordinal);
        Assert.EndsWith(Escape + "[?25h", string.Concat(CursorVisibility.Matches(shown).Select(match => match.Value)), StringComparison.Ordinal);
    }

    [Fact]
    public void No_color_means_no_colour()
    {
        using var folder = new FreshFolder();
        string shown = OnTerminal(folder, "NO_COLOR=1");
        Assert.Contains("files", shown, StringComparison.Ordinal);
        Assert.DoesNotMatch(Colour, shown);
    }

    [Theory]
    [InlineData("--quiet")]
    [InlineData("--log-format json")]
    public void Quiet_runs_and_logs_for_machines_show_no_progress(string option)
    {
        using var folder = new FreshFolder();
        string shown = OnTerminal(folder, "", option);
        Assert.DoesNotMatch(Colour, shown);
        Assert.DoesNotMatch(CursorVisibility, shown);
        Assert.DoesNotContain(" left", shown, StringComparison.Ordinal);
    }

    [Fact]
    public void No_progress_is_shown_where_nobody_looks()
    {
        using var folder = new FreshFolder();
        Fill(folder);
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot");
        Assert.DoesNotContain(Escape, outcome.Error + outcome.Output, StringComparison.Ordinal);
    }

    /// <summary>Runs on a terminal of 100 columns made by util-linux' script, and gives all that it was sent.</summary>
    private static string OnTerminal(FreshFolder folder, string variables, string options = "")
    {
        Prerequisites.RequireFile("/usr/bin/script", "util-linux");
        Fill(folder);
        Outcome outcome = BuiltProgram.Shell(folder, $"TERM=xterm-256color {variables} script -qec \"stty cols 100 rows 30; $TALLYBOUND profile depot --threads 1 {options}\" /dev/null");
        Assert.Equal(0, outcome.ExitCode);
        return outcome.Output;
    }

    /// <summary>Enough to count for a second or so.</summary>
    private static void Fill(FreshFolder folder)
    {
        byte[] lines = TestData.Log(40_000, seed: 10);
        byte[] bytes = new byte[64 << 20];
        for (int at = 0; at < bytes.Length; at += lines.Length) lines.AsSpan(0, Math.Min(lines.Length, bytes.Length - at)).CopyTo(bytes.AsSpan(at));
        for (int i = 0; i < 4; i++) folder.Write($"depot/{Escape}]0;title\a-{i}", bytes);
    }
}
