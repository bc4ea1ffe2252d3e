using System.Globalization;
using System.Runtime.InteropServices;

namespace Tallybound.Sources.Native;

/// <summary>What a failed system call means, in words for a report.</summary>
internal static class ErrorWords
{
    /// <summary>Words for an errno of Linux.</summary>
    public static string Of(int error) => error switch
    {
        1 => "operation not permitted",
        2 => "it vanished after it was listed",
        5 => "the device reported a read error",
        6 => "there is no such device",
        9 => "it is closed",
        11 => "it has nothing to give now, and a run does not wait for it",
        12 => "the system has no memory left for it",
        13 => "permission denied",
        20 => "a folder on its path is no folder any more",
        21 => "it is a folder",
        22 or 29 => "it cannot be read as a file is",
        23 or 24 => "too many files are open",
        36 => "its path is too long for the system",
        40 => "too many links on its path",
        61 or 74 or 117 => "the file system is damaged there",
        75 or 27 => "it is too large for the system",
        110 => "the file system did not answer in time",
        116 => "the network file system lost it",
        _ => string.Create(CultureInfo.InvariantCulture, $"the system answered error {error} ({Marshal.GetPInvokeErrorMessage(error)})"),
    };

    /// <summary>Words for an exception of the portable file calls.</summary>
    public static string Of(Exception exception) => exception switch
    {
        UnauthorizedAccessException => "permission denied",
        FileNotFoundException or DirectoryNotFoundException => "it vanished after it was listed",
        PathTooLongException => "its path is too long for the system",
        SourceReadException read => read.Message,
        _ => exception.Message,
    };
}
