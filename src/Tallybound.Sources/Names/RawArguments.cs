using System.Text;

namespace Tallybound.Sources;

/// <summary>Recovers command-line arguments that are not UTF-8, which reach a program as text with replacement characters.</summary>
public static class RawArguments
{
    private const char Replacement = '\uFFFD';

    /// <summary>The bytes of arguments as they were typed.</summary>
    /// <param name="arguments">The arguments as text, in the order of the command line.</param>
    /// <returns>
    /// For each the raw bytes where the system tells them (Linux), else the text in UTF-8. Arguments that look alike as text are
    /// taken to be those of the command line in their order.
    /// </returns>
    public static IReadOnlyList<byte[]> BytesOf(IReadOnlyList<string> arguments)
    {
        if (!OperatingSystem.IsLinux() || !arguments.Any(argument => argument.Contains(Replacement, StringComparison.Ordinal)))
            return [.. arguments.Select(Encoding.UTF8.GetBytes)];
        return Recover(arguments, File.ReadAllBytes("/proc/self/cmdline"));
    }

    /// <summary>Arguments as source names write them: bytes that are not UTF-8 as <c>%HH</c>, <c>%</c> as <c>%25</c>.</summary>
    /// <param name="arguments">The arguments as text, in the order of the command line.</param>
    public static IReadOnlyList<string> NamesOf(IReadOnlyList<string> arguments) => [.. BytesOf(arguments).Select(bytes => Names.NameBytes.ToName(bytes))];

    /// <summary>As <see cref="BytesOf"/>, from a command line whose arguments end with a zero byte each.</summary>
    internal static List<byte[]> Recover(IReadOnlyList<string> arguments, ReadOnlySpan<byte> commandLine)
    {
        var typed = new Dictionary<string, Queue<byte[]>>(StringComparer.Ordinal);
        foreach (Range range in commandLine.Split((byte)0))
        {
            byte[] raw = commandLine[range].ToArray();
            string look = LookOf(Encoding.UTF8.GetString(raw));
            if (!look.Contains(Replacement, StringComparison.Ordinal)) continue;
            if (!typed.TryGetValue(look, out Queue<byte[]>? alike)) typed.Add(look, alike = new Queue<byte[]>());
            alike.Enqueue(raw);
        }
        var bytes = new List<byte[]>(arguments.Count);
        foreach (string argument in arguments)
        {
            if (!typed.TryGetValue(LookOf(argument), out Queue<byte[]>? alike)) bytes.Add(Encoding.UTF8.GetBytes(argument));
            else bytes.Add(alike.Count > 1 ? alike.Dequeue() : alike.Peek());
        }
        return bytes;
    }

    /// <summary>One replacement for each run of them: how many a broken sequence becomes is not the same in every decoder.</summary>
    private static string LookOf(string argument)
    {
        var look = new StringBuilder(argument.Length);
        foreach (char each in argument)
        {
            if (each != Replacement || look.Length == 0 || look[^1] != Replacement) look.Append(each);
        }
        return look.ToString();
    }
}
