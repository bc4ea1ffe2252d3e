using System.CommandLine;
using System.CommandLine.Parsing;

namespace Tallybound.Cli.Options;

/// <summary>Parses what was typed, and words what is wrong with it.</summary>
internal sealed class CommandLineText
{
    private readonly Option<bool> help = new("--help", "-h") { Arity = ArgumentArity.Zero, Recursive = true };
    private readonly Option<bool> version = new("--version") { Arity = ArgumentArity.Zero };
    private readonly ProfileCommand profile = new();
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
        root.Subcommands.Add(profile.Command);
        int terminator = Array.IndexOf(arguments, "--");
        afterTerminator = terminator < 0 ? 0 : arguments.Length - terminator - 1;
        // A name that begins with @ is a name, and letters behind one dash are no bundle.
        result = root.Parse(arguments, new ParserConfiguration { EnablePosixBundling = false, ResponseFileTokenReplacer = null });
    }

    /// <summary>True when help is asked for, by any command.</summary>
    public bool HelpAsked => result.GetResult(help) is { Implicit: false };

    /// <summary>True when the version is asked for.</summary>
    public bool VersionAsked => result.GetResult(version) is { Implicit: false };

    /// <summary>True when <c>profile</c> is the command.</summary>
    public bool IsProfile => result.CommandResult.Command == profile.Command;

    /// <summary>What a <c>profile</c> command line means.</summary>
    /// <exception cref="UsageException">Something is wrong with it.</exception>
    public ProfileRequest Profile()
    {
        if (!IsProfile) throw NoCommand();
        RefuseValuesOfFlags();
        if (result.UnmatchedTokens.Count > 0)
            throw new UsageException($"{result.UnmatchedTokens[0]} stands before the command; options stand behind it, as in tallybound {ProfileCommand.Name} INPUT... [options]");
        ProfileRequest request = profile.Read(result, afterTerminator);
        if (result.Errors.Count > 0) throw new UsageException($"{result.Errors[0].Message.TrimEnd('.')}; see tallybound profile --help");
        return request;
    }

    /// <summary>What is wrong with an option that a command does not have.</summary>
    public static UsageException UnknownOption(string typed, Command command)
    {
        string name = typed.Split('=', ':')[0];
        string suggestion = NearestName.Suggestion(name, command.Options.Select(option => option.Name).Append("--help"));
        return new UsageException(suggestion.Length > 0
            ? $"{name} is not an option of {command.Name}{suggestion}"
            : $"{name} is not an option of {command.Name}; see tallybound {command.Name} --help, and put -- before a name that begins with a dash");
    }

    /// <summary>The parser would take the value behind <c>--quiet=</c> for an input.</summary>
    private void RefuseValuesOfFlags()
    {
        foreach (string argument in arguments.AsSpan(0, arguments.Length - afterTerminator))
        {
            int end = argument.AsSpan().IndexOfAny('=', ':');
            if (end > 0 && profile.Flags.FirstOrDefault(flag => argument.AsSpan(0, end).SequenceEqual(flag.Name)) is { } found)
                throw new UsageException($"{argument}: {found.Name} takes no value; write {found.Name}, or leave it out");
        }
    }

    private UsageException NoCommand()
    {
        string[] commands = [ProfileCommand.Name];
        if (result.UnmatchedTokens.Count == 0) return new UsageException("a command is missing; type tallybound profile INPUT..., or tallybound --help");
        string typed = result.UnmatchedTokens[0];
        if (typed.StartsWith('-')) return new UsageException($"{typed} stands where a command is expected; type tallybound profile INPUT... with options behind it, or tallybound --help");
        string suggestion = NearestName.Suggestion(typed, commands);
        return new UsageException(suggestion.Length > 0
            ? $"{typed} is not a command{suggestion}"
            : $"{typed} is not a command; type tallybound profile INPUT..., or tallybound --help");
    }
}
