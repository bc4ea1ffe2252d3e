using System.Globalization;

namespace Tallybound.Sources.Reading;

/// <summary>Tells whether the standard input of this process is anybody's.</summary>
internal static class StandardInput
{
    private const int AccessMode = 3;
    private const int WriteOnly = 1;

    /// <summary>
    /// True where the process was started with standard input closed. The runtime then opens a pipe of its own under that number,
    /// and to read it would be to wait for ever: it is known by its other end, which is in this process too.
    /// </summary>
    public static bool IsClosed()
    {
        try
        {
            if (new FileInfo("/proc/self/fd/0").LinkTarget is not { } input) return true;
            if (!input.StartsWith("pipe:", StringComparison.Ordinal)) return false;
            return new DirectoryInfo("/proc/self/fd").EnumerateFiles().Any(open => open.LinkTarget == input && IsWritingEnd(open.Name));
        }
        catch (Exception exception) when (exception is IOException or UnauthorizedAccessException)
        {
            // No /proc: nothing can be told, and reading says for itself.
            return false;
        }
    }

    /// <summary>By the octal access flags that the kernel tells (proc_pid_fdinfo).</summary>
    private static bool IsWritingEnd(string descriptor)
    {
        const string field = "flags:";
        string? flags = File.ReadLines($"/proc/self/fdinfo/{descriptor}").FirstOrDefault(line => line.StartsWith(field, StringComparison.Ordinal));
        return flags is not null && (Convert.ToInt32(flags[field.Length..].Trim()[^1].ToString(CultureInfo.InvariantCulture), 8) & AccessMode) == WriteOnly;
    }
}
