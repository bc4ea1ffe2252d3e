using Tallybound.Cli.Options;

namespace Tallybound.Cli.Completion;

/// <summary>The script by which a shell completes command lines of this program, made from what its commands declare.</summary>
/// <remarks>A shell runs the script alone, never this program, so that completing costs nothing. Names of files are left to the shell,
/// which knows its own quoting.</remarks>
internal static class CompletionScript
{
    /// <summary>The script of a shell.</summary>
    /// <param name="shell">A shell that <see cref="CompletionCommand"/> takes.</param>
    /// <param name="commands">The program's commands.</param>
    public static string For(string shell, IReadOnlyList<DeclaredCommand> commands) => shell switch
    {
        CompletionCommand.Bash => BashScript.Of(commands),
        CompletionCommand.Zsh => ZshScript.Of(commands),
        _ => PowerShellScript.Of(commands),
    };

    /// <summary>What may stand where the command does.</summary>
    public static IEnumerable<string> FirstWords(IReadOnlyList<DeclaredCommand> commands) => [.. commands.Select(command => command.Name), "--help", "-h", "--version"];

    /// <summary>Names of a command's options, help included.</summary>
    public static IEnumerable<string> OptionNames(DeclaredCommand command) => [.. command.Options.Select(option => option.Name), "--help", "-h"];

    /// <summary>"COMMAND OPTION" of each option whose values have a form, over all commands.</summary>
    public static IReadOnlyList<string> OptionsOf(IReadOnlyList<DeclaredCommand> commands, ValueForm form) =>
        [.. commands.SelectMany(command => command.Options.Where(option => option.Value.Form == form).Select(option => $"{command.Name} {option.Name}"))];

    /// <summary>"COMMAND OPTION" of each option that takes words of a fixed list, with its words.</summary>
    public static IEnumerable<(string Typed, TypedValue Value)> OptionsWithWords(IReadOnlyList<DeclaredCommand> commands) =>
        commands.SelectMany(command => command.Options.Where(option => option.Value.Words.Count > 0).Select(option => ($"{command.Name} {option.Name}", option.Value)));

    /// <summary>Commands whose argument is a word of a fixed list.</summary>
    public static IEnumerable<DeclaredCommand> CommandsWithWords(IReadOnlyList<DeclaredCommand> commands) => commands.Where(command => command.ArgumentValue.Words.Count > 0);
}
