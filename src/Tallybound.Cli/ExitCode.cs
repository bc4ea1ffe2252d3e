namespace Tallybound.Cli;

/// <summary>What the program answers to whoever started it.</summary>
internal static class ExitCode
{
    /// <summary>All well.</summary>
    public const int Well = 0;

    /// <summary>Finished, but some sources could not be read whole.</summary>
    public const int SomeFailed = 1;

    /// <summary>The command line is wrong; one line on standard error says how to mend it, and nothing was written.</summary>
    public const int Usage = 2;

    /// <summary>The run could not be kept: the disk is full, or the folder cannot be written.</summary>
    public const int NotKept = 3;

    /// <summary>Stopped by the user.</summary>
    public const int Stopped = 130;
}
