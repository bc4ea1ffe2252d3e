using System.Runtime.InteropServices;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Reading;

/// <summary>Standard input, a named pipe or a device: read on from where it is, until it ends.</summary>
internal sealed unsafe class StreamReading : SourceReading
{
    private const int Interrupted = 4;
    private const int TryAgain = 11;
    private const short Readable = 1;
    private const int LookForStopMilliseconds = 100;
    private int descriptor;
    private readonly bool owned;
    private readonly Stream? stream;

    private StreamReading(int descriptor, bool owned) => (this.descriptor, this.owned) = (descriptor, owned);

    private StreamReading(Stream stream) => (this.stream, descriptor) = (stream, -1);

    public override long? Length => null;

    public override bool CanReadAnywhere => false;

    /// <exception cref="SourceReadException">It cannot be opened.</exception>
    public static StreamReading Open(SourcePath path)
    {
        if (!LinuxPaths.Serve)
            return new StreamReading(path.IsStandardInput ? Console.OpenStandardInput() : new FileStream(path.ToString(), FileMode.Open, FileAccess.Read, FileShare.ReadWrite));
        if (path.IsStandardInput) return StandardInput.IsClosed() ? throw new SourceReadException("standard input is closed") : new StreamReading(0, owned: false);
        // Not blocking: a pipe without a writer opens at once, and the wait for one can be ended.
        int descriptor = LinuxPaths.Open(path.RawBytes.Span, LibC.ReadOnly | LibC.NonBlocking, out int error);
        return descriptor >= 0 ? new StreamReading(descriptor, owned: true) : throw new SourceReadException(ErrorWords.Of(error));
    }

    public override int Read(Span<byte> buffer, long offset, CancellationToken stop)
    {
        stop.ThrowIfCancellationRequested();
        if (stream is not null) return stream.Read(buffer);
        while (true)
        {
            WaitForBytes(stop);
            nint read;
            fixed (byte* start = buffer) read = LibC.Read(descriptor, start, buffer.Length);
            if (read >= 0) return (int)read;
            int error = Marshal.GetLastPInvokeError();
            stop.ThrowIfCancellationRequested();
            if (error is not Interrupted and not TryAgain) throw new SourceReadException(ErrorWords.Of(error));
        }
    }

    protected override void Dispose(bool disposing)
    {
        stream?.Dispose();
        // Closed once only: the number may be another file's by then.
        int open = Interlocked.Exchange(ref descriptor, -1);
        if (owned && open >= 0) _ = LibC.Close(open);
    }

    private void WaitForBytes(CancellationToken stop)
    {
        var entry = new LibC.PollEntry { Descriptor = descriptor, Events = Readable };
        while (LibC.Poll(&entry, 1, LookForStopMilliseconds) == 0) stop.ThrowIfCancellationRequested();
        stop.ThrowIfCancellationRequested();
    }
}
