using System.Text;

namespace Tallybound.Sources;

/// <summary>Recovers command-line arguments that are not UTF-8, which reach a program as text with replacement characters.</summary>
public static class RawArguments
{
    private static readonly Dictionary<string, byte[]> Known = new(StringComparer.Ordinal);

    /// <summary>The bytes of an argument as it was typed.</summary>
    /// <param name="argument">The argument as text.</param>
    /// <returns>The raw bytes where the system tells them, else the text in UTF-8. Of two arguments that look alike as text, the first one's.</returns>
    public static byte[] BytesOf(string argument)
    {
        if (!argument.Contains('\uFFFD', StringComparison.Ordinal) || !OperatingSystem.IsLinux()) return Encoding.UTF8.GetBytes(argument);
        lock (Known)
        {
            if (Known.Count == 0) Read();
            return Known.TryGetValue(argument, out byte[]? bytes) ? bytes : Encoding.UTF8.GetBytes(argument);
        }
    }

    private static void Read()
    {
        foreach (byte[] argument in Split(File.ReadAllBytes("/proc/self/cmdline"))) Known.TryAdd(Encoding.UTF8.GetString(argument), argument);
    }

    private static List<byte[]> Split(ReadOnlySpan<byte> line)
    {
        var arguments = new List<byte[]>();
        foreach (Range range in line.Split((byte)0)) arguments.Add(line[range].ToArray());
        return arguments;
    }
}
