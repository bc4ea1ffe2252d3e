namespace Tallybound.Cli.Options;

/// <summary>The command line is wrong. The message is one line: what, where, and how to mend it.</summary>
internal sealed class UsageException(string message) : Exception(message);
