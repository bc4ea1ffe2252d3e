namespace Tallybound.Cli.Tests;

/// <summary>An empty folder of one test, gone when the test ends.</summary>
internal sealed class FreshFolder : IDisposable
{
    public FreshFolder() => Path = Directory.CreateTempSubdirectory("tallybound-test-").FullName;

    /// <summary>Its path.</summary>
    public string Path { get; }

    /// <summary>The path of something in it.</summary>
    public string At(params ReadOnlySpan<string> parts) => System.IO.Path.Combine([Path, .. parts]);

    /// <summary>Writes a file, with the folders above it.</summary>
    public string Write(string name, byte[] bytes)
    {
        string path = At(name);
        Directory.CreateDirectory(System.IO.Path.GetDirectoryName(path)!);
        File.WriteAllBytes(path, bytes);
        return path;
    }

    /// <summary>Everything in it, by path from it, in ordinal order.</summary>
    public string[] Everything() =>
        [.. Directory.EnumerateFileSystemEntries(Path, "*", SearchOption.AllDirectories).Select(entry => System.IO.Path.GetRelativePath(Path, entry)).Order(StringComparer.Ordinal)];

    public void Dispose()
    {
        try
        {
            Directory.Delete(Path, recursive: true);
        }
        catch (IOException)
        {
            // A file whose name .NET cannot say stays behind; the system empties its folder of temporary files.
        }
        catch (UnauthorizedAccessException)
        {
            // Made under another user.
        }
    }
}
