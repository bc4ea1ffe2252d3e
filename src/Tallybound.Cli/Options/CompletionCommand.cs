using System.CommandLine;
using Tallybound.Cli.Screen;

namespace Tallybound.Cli.Options;

/// <summary>The command <c>completion</c>: prints what lets a shell complete command lines of this program.</summary>
internal sealed class CompletionCommand : DeclaredCommand
{
    /// <summary>The name of bash.</summary>
    public const string Bash = "bash";

    /// <summary>The name of zsh.</summary>
    public const string Zsh = "zsh";

    /// <summary>The name of PowerShell.</summary>
    public const string PowerShell = "powershell";

    private const string Mend = "takes bash, zsh or powershell, as in tallybound completion bash";

    /// <summary>Declares the command.</summary>
    public CompletionCommand()
        : base("completion", "SHELL", TypedValue.OneOf(Bash, Zsh, PowerShell))
    {
    }

    /// <inheritdoc/>
    public override string Usage => "tallybound completion SHELL";

    /// <inheritdoc/>
    public override string HelpPage => HelpText.Completion;

    /// <inheritdoc/>
    public override Request Read(ParseResult result, int afterTerminator)
    {
        List<string> shells = Arguments(result, afterTerminator);
        if (shells.Count == 0) throw new UsageException($"SHELL is missing; {Mend}");
        if (shells.Count > 1) throw new UsageException($"SHELL {shells[1]} is one too many; {Mend}");
        if (!ArgumentValue.Words.Contains(shells[0])) throw new UsageException($"SHELL {(shells[0].Length == 0 ? "''" : shells[0])}: {Mend}{NearestName.Suggestion(shells[0], ArgumentValue.Words)}");
        return new CompletionRequest(shells[0]);
    }
}

/// <summary>What a <c>completion</c> command line means.</summary>
/// <param name="Shell">The shell's name.</param>
internal sealed record CompletionRequest(string Shell) : Request;
