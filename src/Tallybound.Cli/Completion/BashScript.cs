using System.Text;
using Tallybound.Cli.Options;

namespace Tallybound.Cli.Completion;

/// <summary>The completion script for bash, from 3.2 up; it needs no other file.</summary>
internal static class BashScript
{
    /// <summary>The script.</summary>
    public static string Of(IReadOnlyList<DeclaredCommand> commands)
    {
        var script = new StringBuilder();
        script.Append("""
            # Completion of tallybound for bash.
            _tallybound() {
                local IFS=$' \t\n' current="${COMP_WORDS[COMP_CWORD]}" before="${COMP_WORDS[COMP_CWORD-1]}" words= listed= i
                COMPREPLY=()
                # Bash takes --option=value apart at the equals sign.
                if [[ $current == = ]]; then
                    current=
                elif [[ $before == = ]]; then
                    before="${COMP_WORDS[COMP_CWORD-2]}"
                fi
                # Behind -- there are names alone; an empty answer leaves names to bash.
                for (( i = 2; i < COMP_CWORD; i++ )); do
                    if [[ ${COMP_WORDS[i]} == -- ]]; then return; fi
                done

            """);
        script.Append("    if (( COMP_CWORD == 1 )); then\n        words='").AppendJoin(' ', CompletionScript.FirstWords(commands)).Append("'\n    else\n");
        script.Append("        case \"${COMP_WORDS[1]} $before\" in\n");
        foreach ((string typed, TypedValue value) in CompletionScript.OptionsWithWords(commands))
            script.Append($"            '{typed}') words='").AppendJoin(' ', value.Words).Append(value.Form == ValueForm.Words ? "' listed=1 ;;\n" : "' ;;\n");
        Case(script, CompletionScript.OptionsOf(commands, ValueForm.Path), "return ;;");
        Case(script, CompletionScript.OptionsOf(commands, ValueForm.Number), ";;");
        script.Append("            *)\n                case \"${COMP_WORDS[1]} $current\" in\n");
        foreach (DeclaredCommand command in commands) script.Append($"                    '{command.Name} -'*) words='").AppendJoin(' ', CompletionScript.OptionNames(command)).Append("' ;;\n");
        foreach (DeclaredCommand command in CompletionScript.CommandsWithWords(commands)) script.Append($"                    '{command.Name} '*) words='").AppendJoin(' ', command.ArgumentValue.Words).Append("' ;;\n");
        script.Append("""
                                *) return ;;
                            esac ;;
                    esac
                fi
                # Only words of the lists above fit here, so that bash must not offer names.
                compopt +o default 2>/dev/null
                if [[ $listed && $current == *,* ]]; then
                    COMPREPLY=($(compgen -P "${current%,*}," -W "$words" -- "${current##*,}"))
                else
                    COMPREPLY=($(compgen -W "$words" -- "$current"))
                fi
            }
            complete -o default -F _tallybound tallybound

            """);
        return script.ToString();
    }

    private static void Case(StringBuilder script, IReadOnlyList<string> typed, string then)
    {
        if (typed.Count > 0) script.Append("            ").AppendJoin("|", typed.Select(words => $"'{words}'")).Append($") {then}\n");
    }
}
