using System.Reflection;
using Tallybound.Cli.Completion;
using Tallybound.Cli.Options;
using Tallybound.Cli.Screen;
using Tallybound.Sources;

namespace Tallybound.Cli.Running;

/// <summary>The program: what was typed, done, and answered by an exit code.</summary>
internal static class CommandLine
{
    /// <summary>Runs one command line.</summary>
    /// <param name="arguments">The arguments behind the program's name.</param>
    /// <returns>A value of <see cref="ExitCode"/>.</returns>
    public static int Run(string[] arguments)
    {
        try
        {
            var typed = new CommandLineText(arguments);
            if (typed.HelpAsked is { } page)
            {
                StandardStreams.WriteOutput(page);
                return ExitCode.Well;
            }
            if (typed.VersionAsked)
            {
                StandardStreams.WriteOutput($"tallybound {Version}\n");
                return ExitCode.Well;
            }
            return Carry(typed.Request(), typed.Commands);
        }
        catch (UsageException e)
        {
            Complain(e.Message);
            return ExitCode.Usage;
        }
    }

    private static int Carry(Request request, IReadOnlyList<DeclaredCommand> commands)
    {
        switch (request)
        {
            case CompletionRequest completion:
                StandardStreams.WriteOutput(CompletionScript.For(completion.Shell, commands));
                return ExitCode.Well;
            case RenderRequest render:
                return RenderInvocation.Run(render);
            default:
                using (var invocation = new ProfileInvocation((ProfileRequest)request)) return invocation.Run();
        }
    }

    /// <summary>Says what is wrong in exactly one line.</summary>
    public static void Complain(string what) => StandardStreams.WriteErrorLine(DisplayText.Escape($"tallybound: {what}"));

    private static string Version => typeof(CommandLine).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion;
}
