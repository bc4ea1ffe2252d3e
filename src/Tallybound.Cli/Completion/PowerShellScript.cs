using System.Text;
using Tallybound.Cli.Options;

namespace Tallybound.Cli.Completion;

/// <summary>The completion script for PowerShell, from 5.0 up.</summary>
internal static class PowerShellScript
{
    /// <summary>The script.</summary>
    public static string Of(IReadOnlyList<DeclaredCommand> commands)
    {
        var script = new StringBuilder();
        script.Append("""
            # Completion of tallybound for PowerShell.
            Register-ArgumentCompleter -Native -CommandName tallybound -ScriptBlock {
                param($wordToComplete, $commandAst, $cursorPosition)
                $typed = @($commandAst.CommandElements | Where-Object { $_.Extent.EndOffset -lt $cursorPosition } | ForEach-Object { $_.ToString() })
                $current = $wordToComplete
                $start = ''
                $words = @()
                $listed = $false
                # Behind -- there are names alone; an empty answer leaves names to PowerShell.
                if ($typed -ccontains '--') { return }
                $before = $typed[-1]
                # PowerShell gives the part behind the last comma alone; the option may stand further left.
                $here = @($commandAst.CommandElements | Where-Object { $_.Extent.StartOffset -lt $cursorPosition -and $_.Extent.EndOffset -ge $cursorPosition } | ForEach-Object { $_.ToString() })
                if ("$here" -cmatch '^(--[^=]+)=') { $before = $Matches[1] }
                if ($current -cmatch '^(--[^=]+=)(.*)$') {
                    $start = $Matches[1]
                    $current = $Matches[2]
                }
                if ($typed.Count -le 1) {

            """);
        script.Append("        $words = ").Append(List(CompletionScript.FirstWords(commands))).Append("\n    } else {\n        switch -CaseSensitive ($typed[1] + ' ' + $before) {\n");
        foreach ((string typed, TypedValue value) in CompletionScript.OptionsWithWords(commands))
            script.Append($"            '{typed}' {{ $words = ").Append(List(value.Words)).Append(value.Form == ValueForm.Words ? "; $listed = $true }\n" : " }\n");
        foreach (string typed in CompletionScript.OptionsOf(commands, ValueForm.Path).Concat(CompletionScript.OptionsOf(commands, ValueForm.Number))) script.Append($"            '{typed}' {{ return }}\n");
        script.Append("            default {\n");
        string before = "                if";
        foreach (DeclaredCommand command in commands)
        {
            script.Append($"{before} ($typed[1] -ceq '{command.Name}' -and $current.StartsWith('-')) {{ $words = ").Append(List(CompletionScript.OptionNames(command))).Append(" }\n");
            before = "                elseif";
        }
        foreach (DeclaredCommand command in CompletionScript.CommandsWithWords(commands)) script.Append($"{before} ($typed[1] -ceq '{command.Name}') {{ $words = ").Append(List(command.ArgumentValue.Words)).Append(" }\n");
        script.Append("""
                        }
                    }
                    if ($listed -and $current.Contains(',')) {
                        $start += $current.Substring(0, $current.LastIndexOf(',') + 1)
                        $current = $current.Substring($current.LastIndexOf(',') + 1)
                    }
                }
                $words | Where-Object { $_.StartsWith($current, [StringComparison]::Ordinal) } | ForEach-Object {
                    [System.Management.Automation.CompletionResult]::new($start + $_, $_, 'ParameterValue', $_)
                }
            }

            """);
        return script.ToString();
    }

    private static string List(IEnumerable<string> words) => string.Join(", ", words.Select(word => $"'{word}'"));
}
