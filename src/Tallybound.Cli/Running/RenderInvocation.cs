using Tallybound.Cli.Options;
using Tallybound.Cli.Screen;
using Tallybound.Reports.Json;
using Tallybound.Reports.Run;
using Tallybound.Sources;

namespace Tallybound.Cli.Running;

/// <summary>One <c>tallybound render</c>: a run's report drawn again from its <c>profile.json</c> alone.</summary>
internal static class RenderInvocation
{
    private const string PartialSuffix = ".partial";

    /// <summary>Carries a request out.</summary>
    /// <returns>A value of <see cref="ExitCode"/>.</returns>
    /// <exception cref="UsageException">There is no such run, or its document is none to draw from; nothing was written.</exception>
    public static int Run(RenderRequest request)
    {
        string folder = FolderOf(request.Run);
        try
        {
            RunReport.Draw(folder, request.Pictures);
        }
        catch (RunDocumentException e)
        {
            throw new UsageException($"RUN {e.Message}");
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            CommandLine.Complain($"the report could not be kept: {e.Message.TrimEnd('.')}; make room, or copy the run folder to where you may write, then type the command again");
            return ExitCode.NotKept;
        }
        if (!request.Quiet) StandardStreams.WriteOutput(DisplayText.Escape($"Report: {Path.Combine(ShownPath.FromHere(folder), RunReport.PageName)}") + "\n");
        return ExitCode.Well;
    }

    /// <summary>The run folder that was meant, which holds a document.</summary>
    private static string FolderOf(string typed)
    {
        if (File.Exists(typed))
        {
            if (Path.GetFileName(typed) == RunReport.DocumentName) return Path.GetDirectoryName(Path.GetFullPath(typed))!;
            throw new UsageException($"RUN {typed}: a run is named by its folder, or by the {RunReport.DocumentName} in it");
        }
        if (!Directory.Exists(typed))
        {
            string partial = Path.TrimEndingDirectorySeparator(typed) + PartialSuffix;
            throw new UsageException($"RUN {typed}: there is no such run folder{(Directory.Exists(partial) ? $"; did you mean {partial}?" : ", nor a file of that name; name one that tallybound profile made")}");
        }
        if (!File.Exists(Path.Combine(typed, RunReport.DocumentName)))
            throw new UsageException($"RUN {typed}: there is no {RunReport.DocumentName} in it; name a run folder, and let a run that is under way there come to its end");
        return Path.TrimEndingDirectorySeparator(typed);
    }
}
