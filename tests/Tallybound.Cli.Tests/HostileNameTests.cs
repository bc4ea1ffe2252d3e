using System.Net;

namespace Tallybound.Cli.Tests;

public sealed class HostileNameTests
{
    [Fact]
    public void Names_that_would_move_a_terminal_or_a_page_are_shown_harmless()
    {
        using var folder = new FreshFolder();
        string[] names = ["\u001b[31mred\u001b[0m", "two\nlines", "<script>alert(1)<_script>", "=1+1", "a,b\"c", "bell\a", "right\u202eleft", "per%cent", " space "];
        foreach (string name in names) folder.Write(Path.Combine("depot", name), TestData.Log(30, seed: 1));
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot", "--log-format", "text");
        Assert.Equal(0, outcome.ExitCode);
        Assert.DoesNotContain(outcome.Output + outcome.Error, character => char.IsControl(character) && character != '\n' || character == '\u202e');
        RunRecordFile record = RunRecordFile.In(folder.At("reports", "depot"));
        Assert.Equal(names.Select(name => name.Replace("%", "%25", StringComparison.Ordinal)).Order(StringComparer.Ordinal), record.Names.Order(StringComparer.Ordinal));
        string page = File.ReadAllText(folder.At("reports", "depot", "index.html"));
        Assert.Equal(2, page.Split("<script", StringSplitOptions.None).Length);
        Assert.DoesNotContain("<script>alert", page, StringComparison.OrdinalIgnoreCase);
        Assert.Contains(WebUtility.HtmlEncode("<script>alert(1)<_script>"), page, StringComparison.Ordinal);
        Assert.DoesNotContain(page, character => char.IsControl(character) && character is not ('\n' or '\r' or '\t') || character == '\u202e');
        string table = File.ReadAllText(folder.At("reports", "depot", "sources.csv"));
        Assert.Contains("\"'=1+1\"", table, StringComparison.Ordinal);
        Assert.Contains("\"a,b\"\"c\"", table, StringComparison.Ordinal);
        Assert.Equal(9, names.Length);
    }

    [Fact]
    public void A_failure_of_a_source_with_a_hostile_name_is_one_line_of_log()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux");
        using var folder = new FreshFolder();
        folder.Write("depot/good", TestData.Log(30, seed: 1));
        Outcome made = BuiltProgram.Shell(folder, "ln -s nowhere $'depot/\\e[2Jgone\\nfar' && mkfifo $'depot/\\e]0;title\\apipe'");
        Assert.Equal(0, made.ExitCode);
        Outcome outcome = BuiltProgram.Run(folder, "profile", "depot");
        Assert.Equal(0, outcome.ExitCode);
        Assert.DoesNotContain(outcome.Output + outcome.Error, character => char.IsControl(character) && character != '\n');
        Assert.Equal(2, (int)RunRecordFile.In(folder.At("reports", "depot")).Corpus["skipped"]!);
    }

    [Fact]
    public void Names_that_are_not_UTF_8_are_read_and_written_as_their_bytes()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux, where a file name is bytes");
        using var folder = new FreshFolder();
        Outcome outcome = BuiltProgram.Shell(folder, """
            mkdir depot
            printf 'unit 1 door open\n' > $'depot/caf\xe9'
            printf 'unit 2 door shut\n' > $'depot/\xff\xfe.bin'
            $TALLYBOUND profile depot && $TALLYBOUND profile $'depot/caf\xe9' --out single
            code=$?
            rm -r depot
            exit $code
            """);
        Assert.Equal(0, outcome.ExitCode);
        Assert.Equal(["%FF%FE.bin", "caf%E9"], RunRecordFile.In(folder.At("reports", "depot")).Names.Order(StringComparer.Ordinal));
        RunRecordFile single = RunRecordFile.In(folder.At("single"));
        Assert.Equal(["caf%E9"], single.Names);
        Assert.Equal(17, (int)single.Corpus["bytes"]!);
        Assert.Contains("%E9", File.ReadAllText(folder.At("single", "sources.csv")), StringComparison.Ordinal);
    }

    [Fact]
    public void An_input_that_is_not_UTF_8_and_does_not_exist_is_named_in_its_one_line()
    {
        Prerequisites.Require(OperatingSystem.IsLinux(), "Linux, where an argument is bytes");
        using var folder = new FreshFolder();
        Outcome outcome = BuiltProgram.Shell(folder, "$TALLYBOUND profile $'caf\\xe9'");
        Assert.Equal(2, outcome.ExitCode);
        Assert.Contains("caf\uFFFD: there is no such file or folder", Assert.Single(outcome.ErrorLines), StringComparison.Ordinal);
        Assert.Empty(folder.Everything());
    }
}
