using System.Text;

namespace Tallybound.Cli.Tests;

/// <summary>An interactive shell on a terminal, typed at by a program that waits for its answers.</summary>
internal static class ShellOnTerminal
{
    /// <summary>Starts the shell on a pseudo-terminal, types the preparation, then each line, and prints what stood between &lt; and &gt; in the answer to each.</summary>
    private const string Driver = """
        import os, pty, re, select, sys, time

        shell, lines = sys.argv[1].split(), sys.stdin.buffer.read().split(b"\n")
        child, terminal = pty.fork()
        if child == 0:
            os.environ.update(TERM="dumb", PS1="", LC_ALL="C.UTF-8", HOME=os.getcwd())
            os.execvp(shell[0], shell)

        def answer(typed):
            os.write(terminal, typed)
            text, until = b"", time.monotonic() + 60
            while time.monotonic() < until:
                if select.select([terminal], [], [], 1)[0]:
                    text += os.read(terminal, 65536)
                    found = re.search(rb"<([^<>]*)>[\r\n]", text)
                    if found:
                        return found.group(1)
            sys.exit("no answer to %r but %r" % (typed, text))

        for typed in lines:
            print(answer(typed.replace(b"TAB", b"\t") + b"\n").decode())
        os.write(terminal, b"exit\n")
        """;

    /// <summary>What the shell made of each line.</summary>
    /// <param name="folder">The working folder.</param>
    /// <param name="shell">The shell with its arguments.</param>
    /// <param name="lines">Lines to type, <c>TAB</c> for the key; each must make the shell print something between &lt; and &gt;.</param>
    public static string[] Answers(FreshFolder folder, string shell, IEnumerable<string> lines)
    {
        Prerequisites.RequireFile("/usr/bin/python3", "python3");
        using RunningProgram driver = BuiltProgram.StartCommand(folder, "/usr/bin/python3", ["-c", Driver, shell]);
        driver.Write(Encoding.UTF8.GetBytes(string.Join('\n', lines)));
        driver.CloseInput();
        Outcome outcome = driver.WaitForEnd(TimeSpan.FromMinutes(3));
        Assert.Equal("", outcome.Error);
        return outcome.OutputLines;
    }
}
