namespace Tallybound.Reports.Files;

/// <summary>Writes a file aside, flushes it to the disk and renames it, so that a reader sees it whole or not at all.</summary>
internal static class WholeFile
{
    private const int BufferBytes = 1 << 16;

    /// <summary>Writes <paramref name="path"/> through <paramref name="write"/>.</summary>
    /// <exception cref="IOException">It cannot be written; no file of that name is left.</exception>
    public static void Write(string path, Action<Stream> write)
    {
        string aside = path + ".new";
        File.Delete(aside);
        try
        {
            using (var stream = new FileStream(aside, FileMode.CreateNew, FileAccess.Write, FileShare.Read, BufferBytes))
            {
                write(stream);
                stream.Flush(flushToDisk: true);
            }
            File.Move(aside, path, overwrite: true);
        }
        catch
        {
            File.Delete(aside);
            throw;
        }
    }
}
