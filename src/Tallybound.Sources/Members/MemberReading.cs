using System.IO.Compression;
using Tallybound.Sources.Reading;
using ZstdSharp;
using ZstdSharp.Unsafe;

namespace Tallybound.Sources.Members;

/// <summary>The content of a compressed file as a stream under limits. What lies beyond a limit or behind damage is not read, and the reading says so.</summary>
internal sealed class MemberReading : SourceReading
{
    /// <summary>The ratio is not looked at before this many bytes: a short file of one value may well be dense.</summary>
    private const long RatioSlackBytes = 1 << 20;

    /// <summary>A decoder that meets damage gives nothing of the call it was in: short calls lose little.</summary>
    private const int SliceBytes = 1 << 14;

    private readonly CountingStream compressed;
    private readonly Stream content;
    private readonly MemberLimits limits;
    private long produced;
    private string? stopped;

    /// <summary>Without it the runtime takes a gzip file that was cut short for one that ended.</summary>
    static MemberReading() => AppContext.SetSwitch("System.IO.Compression.UseStrictValidation", true);

    private MemberReading(CountingStream compressed, Stream content, MemberLimits limits) => (this.compressed, this.content, this.limits) = (compressed, content, limits);

    public override long? Length => null;

    public override bool CanReadAnywhere => false;

    public override string? Stopped => stopped;

    public override long? CompressedBytes => compressed.Position;

    /// <exception cref="SourceReadException">It cannot be opened, or is no such file any more.</exception>
    public static MemberReading Open(SourcePath path, MemberLimits limits)
    {
        MemberKind kind = MemberFormat.Of(path) ?? throw new SourceReadException("it is no compressed file any more");
        var compressed = new CountingStream(FileReading.Open(path));
        Stream content = kind == MemberKind.Gzip ? new GZipStream(compressed, CompressionMode.Decompress) : new DecompressionStream(compressed);
        return new MemberReading(compressed, content, limits);
    }

    /// <summary>Fills the buffer unless the member ends, so that whoever counts gets whole blocks.</summary>
    public override int Read(Span<byte> buffer, long offset, CancellationToken stop)
    {
        int filled = 0;
        while (filled < buffer.Length)
        {
            stop.ThrowIfCancellationRequested();
            int read = ReadSlice(buffer[filled..]);
            if (read == 0) break;
            filled += read;
        }
        return filled;
    }

    private int ReadSlice(Span<byte> buffer)
    {
        if (stopped is not null) return 0;
        long room = Room();
        if (room <= 0) return 0;
        try
        {
            int read = content.Read(buffer[..(int)Math.Min(Math.Min(buffer.Length, SliceBytes), room)]);
            produced += read;
            return read;
        }
        catch (Exception exception) when (IsDamage(exception))
        {
            stopped = ReasonOf(exception);
            return 0;
        }
    }

    protected override void Dispose(bool disposing)
    {
        content.Dispose();
        compressed.Dispose();
    }

    /// <summary>Decompressed bytes that the limits still allow; at 0 the reading is stopped if there is more.</summary>
    private long Room()
    {
        long bySize = limits.Bytes - produced;
        long allowed = Math.Max(RatioSlackBytes, compressed.Position > long.MaxValue / limits.Ratio ? long.MaxValue : compressed.Position * limits.Ratio);
        long room = Math.Min(bySize, allowed - produced);
        if (room > 0 || !HasMore()) return room;
        stopped = bySize <= 0
            ? $"it holds more than {Text(limits.Bytes)} decompressed bytes; --inside-size sets this limit"
            : $"it decompresses to more than {Text(limits.Ratio)} times its size; --inside-ratio sets this limit";
        return 0;
    }

    private bool HasMore()
    {
        try
        {
            return content.ReadByte() >= 0;
        }
        catch (Exception exception) when (IsDamage(exception))
        {
            return true;
        }
    }

    private static bool IsDamage(Exception exception) => exception is InvalidDataException or ZstdException or EndOfStreamException;

    private string ReasonOf(Exception exception) => exception is ZstdException zstandard
        ? zstandard.Code switch
        {
            ZSTD_ErrorCode.ZSTD_error_frameParameter_windowTooLarge => $"it needs a window of more than 128 MiB to be decompressed; {Text(produced)} bytes came before",
            ZSTD_ErrorCode.ZSTD_error_dictionary_wrong => $"it needs a dictionary to be decompressed; {Text(produced)} bytes came before",
            _ => DamagedAfter(),
        }
        : DamagedAfter();

    private string DamagedAfter() => $"the compressed data is damaged or cut short after {Text(produced)} decompressed bytes";

    private static string Text(long number) => number.ToString("N0", System.Globalization.CultureInfo.InvariantCulture);
}
