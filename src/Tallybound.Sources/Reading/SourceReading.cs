namespace Tallybound.Sources;

/// <summary>An opened source.</summary>
public abstract class SourceReading : IDisposable
{
    /// <summary>Its length when it was opened; null: unknown.</summary>
    public abstract long? Length { get; }

    /// <summary>True where <see cref="Read"/> can begin anywhere and from several threads at once.</summary>
    public abstract bool CanReadAnywhere { get; }

    /// <summary>Why reading ended before the source did, in words; null where it did not.</summary>
    public virtual string? Stopped => null;

    /// <summary>Bytes of the compressed file read so far; null for sources that are not compressed members.</summary>
    public virtual long? CompressedBytes => null;

    /// <summary>Reads bytes.</summary>
    /// <param name="buffer">Takes them; not empty.</param>
    /// <param name="offset">Where they stand; sources that cannot be read anywhere read on from where they are.</param>
    /// <param name="stop">Ends a wait for bytes.</param>
    /// <returns>How many came; 0 at the end.</returns>
    /// <exception cref="SourceReadException">The system reported an error.</exception>
    /// <exception cref="OperationCanceledException">The wait was ended.</exception>
    public abstract int Read(Span<byte> buffer, long offset, CancellationToken stop);

    /// <summary>The length now, where the system tells; null elsewhere.</summary>
    public virtual long? LengthNow() => null;

    /// <summary>Closes the source.</summary>
    public void Dispose()
    {
        Dispose(disposing: true);
        GC.SuppressFinalize(this);
    }

    /// <summary>Closes the source.</summary>
    protected abstract void Dispose(bool disposing);
}

/// <summary>A source could not be opened or read; the message is a reason in words.</summary>
public sealed class SourceReadException(string reason, Exception? inner = null) : IOException(reason, inner);
