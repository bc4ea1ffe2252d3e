using System.Runtime.InteropServices;

namespace Tallybound.Cli.Tests;

/// <summary>What .NET does not offer and a test of signals and named pipes needs.</summary>
internal static partial class Posix
{
    public const int Interrupt = 2;
    public const int Terminate = 15;

    /// <summary>Rights of a named pipe that everyone may use.</summary>
    private const uint Everyone = 0b110_110_110;

    /// <summary>FIONREAD of Linux: bytes that wait to be read.</summary>
    private const nuint BytesThatWait = 0x541B;

    /// <summary>Bytes in a pipe that nobody has read yet.</summary>
    public static int BytesWaiting(SafeHandle pipe)
    {
        Assert.Equal(0, Ioctl(pipe, BytesThatWait, out int waiting));
        return waiting;
    }

    /// <summary>Makes a named pipe.</summary>
    public static void MakeFifo(string path) => Assert.Equal(0, Mkfifo(path, Everyone));

    [LibraryImport("libc", EntryPoint = "kill", SetLastError = true)]
    public static partial int Kill(int process, int signal);

    [LibraryImport("libc", EntryPoint = "ioctl", SetLastError = true)]
    private static partial int Ioctl(SafeHandle file, nuint request, out int answer);

    [LibraryImport("libc", EntryPoint = "mkfifo", SetLastError = true, StringMarshalling = StringMarshalling.Utf8)]
    private static partial int Mkfifo(string path, uint mode);
}
