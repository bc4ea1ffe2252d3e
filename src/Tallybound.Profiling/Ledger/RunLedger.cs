namespace Tallybound.Profiling.Ledger;

/// <summary>The run's memory on disk: plan, state of each source, finished records.</summary>
public sealed class RunLedger : IDisposable
{
    /// <inheritdoc/>
    public void Dispose() { }
}
