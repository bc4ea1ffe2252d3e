using System.Runtime.InteropServices;
using Microsoft.Win32.SafeHandles;
using Tallybound.Sources.Native;

namespace Tallybound.Sources.Reading;

/// <summary>A regular file, read at any place by any number of threads.</summary>
internal sealed unsafe class FileReading : SourceReading
{
    private const int Sequential = 2;
    private const int Interrupted = 4;
    private readonly SafeFileHandle? handle;
    private int descriptor = -1;

    private FileReading(int descriptor, long length)
    {
        this.descriptor = descriptor;
        Length = length;
    }

    private FileReading(SafeFileHandle handle, long length)
    {
        this.handle = handle;
        Length = length;
    }

    public override long? Length { get; }

    public override bool CanReadAnywhere => true;

    /// <exception cref="SourceReadException">It cannot be opened, or is no regular file any more.</exception>
    public static FileReading Open(SourcePath path)
    {
        if (!LinuxPaths.Serve) return OpenPortable(path);
        // Not blocking, so that a pipe that took the file's place cannot hold the run.
        int descriptor = LinuxPaths.Open(path.RawBytes.Span, LibC.ReadOnly | LibC.NonBlocking, out int error);
        if (descriptor < 0) throw new SourceReadException(ErrorWords.Of(error));
        if (LinuxPaths.TryLook(descriptor, out FileFacts facts) && facts.Type == FileType.Regular)
        {
            if (facts.Bytes > 1 << 20) _ = LibC.Advise(descriptor, 0, 0, Sequential);
            return new FileReading(descriptor, facts.Bytes);
        }
        _ = LibC.Close(descriptor);
        throw new SourceReadException("it is no regular file any more");
    }

    public override int Read(Span<byte> buffer, long offset, CancellationToken stop)
    {
        stop.ThrowIfCancellationRequested();
        if (handle is not null) return ReadPortable(handle, buffer, offset);
        fixed (byte* start = buffer)
        {
            while (true)
            {
                nint read = LibC.ReadAt(descriptor, start, buffer.Length, offset);
                if (read >= 0) return (int)read;
                int error = Marshal.GetLastPInvokeError();
                if (error != Interrupted) throw new SourceReadException(ErrorWords.Of(error));
            }
        }
    }

    public override long? LengthNow()
    {
        if (handle is not null) return RandomAccess.GetLength(handle);
        return LinuxPaths.TryLook(descriptor, out FileFacts facts) ? facts.Bytes : null;
    }

    protected override void Dispose(bool disposing)
    {
        handle?.Dispose();
        // Closed once only: the number may be another file's by then.
        int open = Interlocked.Exchange(ref descriptor, -1);
        if (open >= 0) _ = LibC.Close(open);
    }

    private static FileReading OpenPortable(SourcePath path)
    {
        try
        {
            SafeFileHandle handle = File.OpenHandle(path.ToString(), FileMode.Open, FileAccess.Read, FileShare.ReadWrite | FileShare.Delete, FileOptions.SequentialScan);
            return new FileReading(handle, RandomAccess.GetLength(handle));
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            throw new SourceReadException(ErrorWords.Of(exception), exception);
        }
    }

    private static int ReadPortable(SafeFileHandle handle, Span<byte> buffer, long offset)
    {
        try
        {
            return RandomAccess.Read(handle, buffer, offset);
        }
        catch (IOException exception)
        {
            throw new SourceReadException(ErrorWords.Of(exception), exception);
        }
    }
}
