using System.CommandLine;
using System.CommandLine.Parsing;

namespace Tallybound.Cli.Options;

/// <summary>One command of the program: its options as typed, its help page, and what a command line of it means.</summary>
/// <remarks>Options are declared as text and read here, so that every error is one line of our own that says how to mend it.</remarks>
internal abstract class DeclaredCommand
{
    private readonly Dictionary<string, TypedValue> values = new(StringComparer.Ordinal);
    private readonly Argument<string[]> arguments;

    /// <summary>Declares a command without options.</summary>
    /// <param name="name">Its name.</param>
    /// <param name="argument">What stands behind the name, such as <c>INPUT</c>.</param>
    /// <param name="argumentValue">What may be typed there.</param>
    protected DeclaredCommand(string name, string argument, TypedValue argumentValue)
    {
        arguments = new Argument<string[]>(argument) { Arity = ArgumentArity.ZeroOrMore };
        Command = new Command(name) { arguments };
        ArgumentValue = argumentValue;
    }

    /// <summary>The command as the parser knows it.</summary>
    public Command Command { get; }

    /// <summary>The command's name.</summary>
    public string Name => Command.Name;

    /// <summary>How it is typed, its options left out, such as <c>tallybound profile INPUT...</c>.</summary>
    public abstract string Usage { get; }

    /// <summary>The page of <c>--help</c>.</summary>
    public abstract string HelpPage { get; }

    /// <summary>What may be typed as its argument.</summary>
    public TypedValue ArgumentValue { get; }

    /// <summary>Names of its options in the order they were declared, with what may be typed behind each.</summary>
    public IEnumerable<(string Name, TypedValue Value)> Options => Command.Options.Select(option => (option.Name, values[option.Name]));

    /// <summary>What was typed, read and checked.</summary>
    /// <param name="result">The parsed command line.</param>
    /// <param name="afterTerminator">How many arguments stand after <c>--</c>: those are no options whatever they begin with.</param>
    /// <exception cref="UsageException">Something is wrong with it.</exception>
    public abstract Request Read(ParseResult result, int afterTerminator);

    /// <summary>Declares an option with a value.</summary>
    protected Option<string[]> Text(string name, TypedValue value) =>
        Declare(new Option<string[]>(name) { Arity = ArgumentArity.ZeroOrMore, AllowMultipleArgumentsPerToken = false }, value);

    /// <summary>Declares an option that takes no value.</summary>
    protected Option<bool> Flag(string name) => Declare(new Option<bool>(name) { Arity = ArgumentArity.Zero }, TypedValue.None);

    /// <summary>The arguments as typed; none of them is an option mistyped.</summary>
    /// <exception cref="UsageException">One of them is.</exception>
    protected List<string> Arguments(ParseResult result, int afterTerminator)
    {
        IReadOnlyList<Token> tokens = result.GetResult(arguments)?.Tokens ?? [];
        var typed = new List<string>(tokens.Count);
        for (int i = 0; i < tokens.Count; i++)
        {
            string text = tokens[i].Value;
            if (text.Length > 1 && text[0] == '-' && i < tokens.Count - afterTerminator) throw UnknownOption(text);
            typed.Add(text);
        }
        return typed;
    }

    /// <summary>The value of an option that is given at most once; null where it is not given.</summary>
    /// <exception cref="UsageException">It is given more often, or without a value.</exception>
    protected string? Value(ParseResult result, Option<string[]> option)
    {
        if (result.GetResult(option) is not { } found) return null;
        if (found.IdentifierTokenCount > 1) throw new UsageException($"{option.Name} is given {found.IdentifierTokenCount} times; give it once");
        if (found.Tokens.Count == 0) throw new UsageException($"{option.Name} is given without a value; see tallybound {Name} --help");
        return found.Tokens[0].Value;
    }

    /// <summary>The word typed behind an option that takes one of a few; the first of them where it is not given.</summary>
    /// <exception cref="UsageException">It is none of them.</exception>
    protected string Word(ParseResult result, Option<string[]> option)
    {
        IReadOnlyList<string> words = values[option.Name].Words;
        string typed = Value(result, option) ?? words[0];
        return words.Contains(typed) ? typed : throw new UsageException($"{option.Name} {(typed.Length == 0 ? "''" : typed)}: takes {string.Join(" or ", words)}{NearestName.Suggestion(typed, words)}");
    }

    /// <summary>Whether an option without a value is given.</summary>
    protected static bool IsSet(ParseResult result, Option<bool> option) => result.GetResult(option) is { Implicit: false };

    private UsageException UnknownOption(string typed)
    {
        string name = typed.Split('=', ':')[0];
        string suggestion = NearestName.Suggestion(name, Command.Options.Select(option => option.Name).Append("--help"));
        return new UsageException(suggestion.Length > 0
            ? $"{name} is not an option of {Name}{suggestion}"
            : $"{name} is not an option of {Name}; see tallybound {Name} --help, and put -- before a name that begins with a dash");
    }

    private T Declare<T>(T option, TypedValue value)
        where T : Option
    {
        Command.Options.Add(option);
        values.Add(option.Name, value);
        return option;
    }
}
