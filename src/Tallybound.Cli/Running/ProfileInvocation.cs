using System.Diagnostics;
using System.Globalization;
using Tallybound.Cli.Logging;
using Tallybound.Cli.Options;
using Tallybound.Cli.Screen;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Run;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Run;
using Tallybound.Sources;

namespace Tallybound.Cli.Running;

/// <summary>One <c>tallybound profile</c>: plan, run folder, run, report, summary, exit code.</summary>
internal sealed class ProfileInvocation : IDisposable
{
    private const string ReportsFolder = "reports";

    private readonly ProfileRequest request;
    private readonly RunProgress progress = new();
    private readonly ErrorScreen screen;
    private readonly StopSignals signals;
    private readonly long started = Stopwatch.GetTimestamp();

    /// <summary>Prepares to carry a request out, and begins to listen for Ctrl-C.</summary>
    public ProfileInvocation(ProfileRequest request)
    {
        this.request = request;
        screen = new ErrorScreen(request.Quiet, request.JsonLog);
        signals = new StopSignals(screen.Abandon);
    }

    /// <summary>Carries the request out.</summary>
    /// <returns>A value of <see cref="ExitCode"/>.</returns>
    /// <exception cref="UsageException">An input does not exist, or the run folder is taken.</exception>
    public int Run()
    {
        try
        {
            RunPlan plan = Freeze();
            using RunFolder folder = MakeFolder();
            return Profile(plan, folder);
        }
        catch (OperationCanceledException) when (signals.Stopped)
        {
            CommandLine.Complain("stopped while the sources were listed; nothing was written");
            return ExitCode.Stopped;
        }
        catch (Exception e) when (e is IOException or UnauthorizedAccessException)
        {
            screen.Dispose();
            CommandLine.Complain($"the run could not be kept: {e.Message.TrimEnd('.')}; make room or name another folder with --out, then type the command again");
            return ExitCode.NotKept;
        }
    }

    /// <inheritdoc/>
    public void Dispose()
    {
        screen.Dispose();
        signals.Dispose();
    }

    private RunPlan Freeze()
    {
        try
        {
            return RunPlan.Freeze(request.Parameters, signals.Token);
        }
        catch (InputNotFoundException e)
        {
            throw new UsageException($"INPUT {e.Message.TrimEnd('.')}");
        }
        catch (GlobException e)
        {
            throw new UsageException(e.Message);
        }
    }

    private RunFolder MakeFolder()
    {
        if (request.OutputFolder is not { } path) return RunFolder.CreateNumbered(ReportsFolder, RunName.Of(request.Parameters.Inputs[0]));
        try
        {
            return RunFolder.CreateNamed(path);
        }
        catch (RunFolderTakenException e)
        {
            throw new UsageException($"--out {path}: {ShownPath.FromHere(e.TakenPath)} exists already; name another folder, or move that one away");
        }
    }

    private int Profile(RunPlan plan, RunFolder folder)
    {
        screen.Begin(progress);
        using var log = new RunLog(Path.Combine(folder.WorkPath, "run.log"), request.JsonLog, screen.Show);
        log.Write(new RunEvent(RunEventLevel.Information, "run-started", $"into {ShownPath.FromHere(folder.WorkPath)}"));
        RunResult result;
        string summary;
        using (signals.Token.Register(() => log.Write(new RunEvent(RunEventLevel.Warning, "stop-asked", "finishing what was read; a second Ctrl-C ends at once"))))
        {
            result = ProfileRun.Execute(plan, folder.WorkPath, progress, log, signals.Token);
            using (result.Ledger)
            {
                RunReport.Write(folder.WorkPath, result);
                summary = RunSummary.Of(result, ShownPath.FromHere(result.Complete ? folder.FinalPath : folder.WorkPath));
            }
        }
        log.Write(new RunEvent(RunEventLevel.Information, result.Complete ? "run-finished" : "run-ended-early", Pace(result.Corpus.Bytes)));
        log.Close();
        if (result.Complete) folder.Complete();
        screen.Dispose();
        StandardStreams.WriteOutput(summary);
        if (!result.Complete) return signals.Stopped ? ExitCode.Stopped : ExitCode.SomeFailed;
        return result.Corpus.Failed + result.Corpus.Partial > 0 ? ExitCode.SomeFailed : ExitCode.Well;
    }

    private string Pace(long bytes)
    {
        double seconds = Stopwatch.GetElapsedTime(started).TotalSeconds;
        string text = $"{SizeText.Count(bytes)} bytes in {seconds.ToString("0.00", CultureInfo.InvariantCulture)} s";
        return seconds > 0 && bytes > 0 ? $"{text}, {SizeText.Bytes((long)(bytes / seconds))}/s" : text;
    }
}
