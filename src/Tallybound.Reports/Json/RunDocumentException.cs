namespace Tallybound.Reports.Json;

/// <summary>A <c>profile.json</c> that cannot be read back. The message is one line: which file, what and where, and how to mend it.</summary>
public sealed class RunDocumentException : Exception
{
    /// <summary>Words what is wrong.</summary>
    /// <param name="path">The document.</param>
    /// <param name="what">What is wrong with it and where, without a full stop.</param>
    /// <param name="mend">What helps.</param>
    /// <param name="cause">What was caught; null: nothing was.</param>
    internal RunDocumentException(string path, string what, string mend, Exception? cause = null)
        : base($"{path} {what}; {mend}", cause)
    {
    }
}
