namespace Tallybound.Cli.Screen;

/// <summary>Paths as one would type them.</summary>
internal static class ShownPath
{
    /// <summary>A path from the working folder where it lies below that, else as it is.</summary>
    public static string FromHere(string path)
    {
        string relative = Path.GetRelativePath(Environment.CurrentDirectory, path);
        return relative.StartsWith("..", StringComparison.Ordinal) ? path : relative;
    }
}
