namespace Tallybound.Cli.Running;

/// <summary>The name of a run's folder where none was asked for.</summary>
internal static class RunName
{
    /// <summary>The last component of an input, <c>stdin</c> for <c>-</c>, <c>root</c> for the root of a file system.</summary>
    /// <remarks>What a file name may not hold on this system is written as an underscore.</remarks>
    public static string Of(string input)
    {
        if (input == "-") return "stdin";
        string name = Path.GetFileName(Path.TrimEndingDirectorySeparator(Path.GetFullPath(input)));
        if (name.Length == 0) return "root";
        char[] forbidden = Path.GetInvalidFileNameChars();
        return string.Create(name.Length, (name, forbidden), static (to, from) =>
        {
            for (int i = 0; i < to.Length; i++) to[i] = Array.IndexOf(from.forbidden, from.name[i]) < 0 ? from.name[i] : '_';
        });
    }
}
