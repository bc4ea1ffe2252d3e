using Spectre.Console;
using Spectre.Console.Rendering;
using Tallybound.Profiling.Run;

namespace Tallybound.Cli.Screen;

/// <summary>Shows a run under way on a terminal's standard error, and clears it away when the run ends.</summary>
internal sealed class ProgressDisplay : IDisposable
{
    /// <summary>A run that ends sooner shows no progress, and never loads what draws it.</summary>
    private static readonly TimeSpan Patience = TimeSpan.FromMilliseconds(400);

    private static readonly TimeSpan Redraw = TimeSpan.FromMilliseconds(200);

    private const int BarColumns = 16;

    /// <summary>Columns that bar or spinner, the gaps and the terminal's last column take from the figures.</summary>
    private const int TakenColumns = BarColumns + 4;

    private readonly Lock gate = new();
    private readonly ManualResetEventSlim ended = new();
    private readonly RunProgress progress;
    private readonly Thread thread;
    private IAnsiConsole? console;

    /// <summary>Begins to watch a run.</summary>
    public ProgressDisplay(RunProgress progress)
    {
        this.progress = progress;
        thread = new Thread(Show) { IsBackground = true, Name = "progress" };
        thread.Start();
    }

    /// <summary>Prints a line above the display.</summary>
    public void WriteLine(string line)
    {
        lock (gate)
        {
            if (console is null) StandardStreams.WriteErrorLine(line);
            else WriteAbove(console, line);
        }
    }

    /// <summary>Gives the terminal its cursor back when the process is about to end without <see cref="Dispose"/>.</summary>
    public void GiveCursorBack()
    {
        if (console is not null) StandardStreams.WriteErrorLine("\u001b[?25h");
    }

    /// <summary>Clears the display.</summary>
    public void Dispose()
    {
        ended.Set();
        thread.Join();
        ended.Dispose();
    }

    private static void WriteAbove(IAnsiConsole console, string line) => console.Write(new Text(line + "\n"));

    private void Show()
    {
        if (ended.Wait(Patience)) return;
        IAnsiConsole terminal = AnsiConsole.Create(new AnsiConsoleSettings { Out = new AnsiConsoleOutput(Console.Error) });
        lock (gate) console = terminal;
        var figures = new ProgressFigures(progress);
        terminal.Progress().AutoClear(enabled: true).AutoRefresh(enabled: true).HideCompleted(enabled: false)
            .Columns(progress.HasStream ? [new SpinnerColumn(), new FiguresColumn(figures)] : [new ProgressBarColumn { Width = BarColumns }, new FiguresColumn(figures)])
            .Start(context =>
            {
                ProgressTask task = context.AddTask("profile", maxValue: 1);
                while (!ended.Wait(Redraw))
                {
                    figures.Sample();
                    task.Value = Math.Min(figures.Share, 0.999);
                }
            });
        lock (gate) console = null;
    }

    /// <summary>The figures beside the bar, cut to the terminal's width.</summary>
    private sealed class FiguresColumn(ProgressFigures figures) : ProgressColumn
    {
        protected override bool NoWrap => true;

        public override IRenderable Render(RenderOptions options, ProgressTask task, TimeSpan deltaTime) =>
            new Text(figures.Line(Math.Max(1, options.ConsoleSize.Width - TakenColumns)));
    }
}
