using System.Reflection;
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
            if (typed.HelpAsked)
            {
                StandardStreams.WriteOutput(typed.IsProfile ? HelpText.Profile : HelpText.Program);
                return ExitCode.Well;
            }
            if (typed.VersionAsked)
            {
                StandardStreams.WriteOutput($"tallybound {Version}\n");
                return ExitCode.Well;
            }
            using var invocation = new ProfileInvocation(typed.Profile());
            return invocation.Run();
        }
        catch (UsageException e)
        {
            Complain(e.Message);
            return ExitCode.Usage;
        }
    }

    /// <summary>Says what is wrong in exactly one line.</summary>
    public static void Complain(string what) => StandardStreams.WriteErrorLine(DisplayText.Escape($"tallybound: {what}"));

    private static string Version => typeof(CommandLine).Assembly.GetCustomAttribute<AssemblyInformationalVersionAttribute>()!.InformationalVersion;
}
