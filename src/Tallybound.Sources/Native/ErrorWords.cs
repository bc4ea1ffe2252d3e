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
        13 => "permission denied",
        20 => "a folder on its path is no folder any more",
        21 => "it is a folder",
        23 or 24 => "too many files are open",
        36 => "its path is too long for the system",
        40 => "too many links on its path",
        116 => "the network file system lost it",
        _ => $"the system answered error {error.ToString(System.Globalization.CultureInfo.InvariantCulture)}",
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
