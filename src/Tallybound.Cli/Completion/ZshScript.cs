using System.Text;
using Tallybound.Cli.Options;

namespace Tallybound.Cli.Completion;

/// <summary>The completion script for zsh: to be sourced, or to lie in a folder of <c>fpath</c> as <c>_tallybound</c>.</summary>
internal static class ZshScript
{
    /// <summary>The script.</summary>
    public static string Of(IReadOnlyList<DeclaredCommand> commands)
    {
        var script = new StringBuilder();
        script.Append("""
            #compdef tallybound
            # Completion of tallybound for zsh.
            _tallybound() {
                local before=$words[CURRENT-1]
                local -i ends=${words[(Ie)--]}
                if (( CURRENT == 2 )); then

            """);
        script.Append("        compadd -- ").AppendJoin(' ', CompletionScript.FirstWords(commands)).Append("\n        return\n    fi\n");
        script.Append("""
                # Behind -- there are names alone.
                if (( ends > 0 && ends < CURRENT )); then
                    _files
                    return
                fi
                if [[ $PREFIX == --*=* ]]; then
                    before=${PREFIX%%=*}
                    compset -P 1 '*='
                fi
                case "$words[2] $before" in

            """);
        foreach ((string typed, TypedValue value) in CompletionScript.OptionsWithWords(commands))
            script.Append($"        '{typed}') ").Append(value.Form == ValueForm.Words ? "compset -P '*,'; " : "").Append("compadd -- ").AppendJoin(' ', value.Words).Append(" ;;\n");
        Case(script, CompletionScript.OptionsOf(commands, ValueForm.Path), "_files ;;");
        Case(script, CompletionScript.OptionsOf(commands, ValueForm.Number), ";;");
        script.Append("        *)\n            case \"$words[2] $PREFIX\" in\n");
        foreach (DeclaredCommand command in commands) script.Append($"                '{command.Name} -'*) compadd -- ").AppendJoin(' ', CompletionScript.OptionNames(command)).Append(" ;;\n");
        foreach (DeclaredCommand command in CompletionScript.CommandsWithWords(commands)) script.Append($"                '{command.Name} '*) compadd -- ").AppendJoin(' ', command.ArgumentValue.Words).Append(" ;;\n");
        script.Append("""
                            *) _files ;;
                        esac ;;
                esac
            }
            if [[ ${funcstack[1]} == _tallybound ]]; then
                _tallybound "$@"
            else
                (( ${+functions[compdef]} )) || { autoload -Uz compinit && compinit; }
                compdef _tallybound tallybound
            fi

            """);
        return script.ToString();
    }

    private static void Case(StringBuilder script, IReadOnlyList<string> typed, string then)
    {
        if (typed.Count > 0) script.Append("        ").AppendJoin("|", typed.Select(words => $"'{words}'")).Append($") {then}\n");
    }
}
