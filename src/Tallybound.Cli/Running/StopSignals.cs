using System.Runtime.InteropServices;

namespace Tallybound.Cli.Running;

/// <summary>Turns the first Ctrl-C, or a request to terminate, into a stop that keeps what was read; the second ends the process at once.</summary>
internal sealed class StopSignals : IDisposable
{
    private readonly CancellationTokenSource source = new();
    private readonly PosixSignalRegistration interrupt;
    private readonly PosixSignalRegistration terminate;
    private readonly Action beforeHardExit;
    private int asked;

    /// <summary>Begins to listen.</summary>
    /// <param name="beforeHardExit">Called on the second signal, before the process ends.</param>
    public StopSignals(Action beforeHardExit)
    {
        this.beforeHardExit = beforeHardExit;
        interrupt = PosixSignalRegistration.Create(PosixSignal.SIGINT, Ask);
        terminate = PosixSignalRegistration.Create(PosixSignal.SIGTERM, Ask);
    }

    /// <summary>Cancelled by the first signal.</summary>
    public CancellationToken Token => source.Token;

    /// <summary>True once a signal came.</summary>
    public bool Stopped => Volatile.Read(ref asked) > 0;

    /// <inheritdoc/>
    public void Dispose()
    {
        interrupt.Dispose();
        terminate.Dispose();
        source.Dispose();
    }

    private void Ask(PosixSignalContext context)
    {
        context.Cancel = true;
        if (Interlocked.Increment(ref asked) == 1)
        {
            source.Cancel();
            return;
        }
        beforeHardExit();
        Environment.Exit(ExitCode.Stopped);
    }
}
