using System.CommandLine;
using System.CommandLine.Parsing;
using Tallybound.Cli.Screen;

namespace Tallybound.Cli.Options;

/// <summary>Parses what was typed, finds the command it is for, and words what is wrong where there is none.</summary>
internal sealed class CommandLineText
{
    private readonly Option<bool> help = new("--help", "-h") { Arity = ArgumentArity.Zero, Recursive = true };
    private readonly Option<bool> version = new("--version") { Arity = ArgumentArity.Zero };
    private readonly ParseResult result;
    private readonly string[] arguments;
    private readonly int afterTerminator;

    /// <summary>Parses a command line without the program's name.</summary>
    public CommandLineText(string[] arguments)
    {
        this.arguments = arguments;
        var root = new RootCommand();
        root.Options.Clear();
        root.Directives.Clear();
        root.Options.Add(help);
        root.Options.Add(version);
        foreach (DeclaredCommand command in Commands) root.Subcommands.Add(command.Command);
        int terminator = Array.IndexOf(arguments, "--");
        afterTerminator = terminator < 0 ? 0 : arguments.Length - terminator - 1;
        // A name that begins with @ is a name, and letters behind one dash are no bundle.
        result = root.Parse(arguments, new ParserConfiguration { EnablePosixBundling = false, ResponseFileTokenReplacer = null });
    }

    /// <summary>The commands there are, in the order of help pages.</summary>
    public IReadOnlyList<DeclaredCommand> Commands { get; } = [new ProfileCommand(), new RenderCommand(), new CompletionCommand()];

    /// <summary>True when the version is asked for.</summary>
    public bool VersionAsked => result.GetResult(version) is { Implicit: false };

    /// <summary>The page that is asked for; null when none is.</summary>
    public string? HelpAsked => result.GetResult(help) is { Implicit: false } ? Typed?.HelpPage ?? HelpText.Program : null;

    private DeclaredCommand? Typed => Commands.FirstOrDefault(command => command.Command == result.CommandResult.Command);

    /// <summary>What the command line means.</summary>
    /// <exception cref="UsageException">Something is wrong with it.</exception>
    public Request Request()
    {
        DeclaredCommand command = Typed ?? throw NoCommand();
        RefuseValuesOfFlags(command);
        if (result.UnmatchedTokens.Count > 0)
            throw new UsageException($"{result.UnmatchedTokens[0]} stands before the command; options stand behind it, as in {command.Usage} [options]");
        Request request = command.Read(result, afterTerminator);
        if (result.Errors.Count > 0) throw new UsageException($"{result.Errors[0].Message.TrimEnd('.')}; see tallybound {command.Name} --help");
        return request;
    }

    /// <summary>The parser would take the value behind <c>--quiet=</c> for an argument.</summary>
    private void RefuseValuesOfFlags(DeclaredCommand command)
    {
        foreach (string argument in arguments.AsSpan(0, arguments.Length - afterTerminator))
        {
            int end = argument.AsSpan().IndexOfAny('=', ':');
            if (end <= 0) continue;
            foreach ((string flag, TypedValue value) in command.Options)
                if (value.Form == ValueForm.None && argument.AsSpan(0, end).SequenceEqual(flag))
                    throw new UsageException($"{argument}: {flag} takes no value; write {flag}, or leave it out");
        }
    }

    private UsageException NoCommand()
    {
        string mend = $"type {Commands[0].Usage}, or tallybound --help";
        if (result.UnmatchedTokens.Count == 0) return new UsageException($"a command is missing; {mend}");
        string typed = result.UnmatchedTokens[0];
        if (typed.StartsWith('-')) return new UsageException($"{typed} stands where a command is expected; type {Commands[0].Usage} with options behind it, or tallybound --help");
        string suggestion = NearestName.Suggestion(typed, Commands.Select(command => command.Name));
        return new UsageException($"{typed} is not a command{(suggestion.Length > 0 ? suggestion : "; " + mend)}");
    }
}
