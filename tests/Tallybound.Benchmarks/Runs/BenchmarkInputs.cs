namespace Tallybound.Benchmarks.Runs;

/// <summary>Inputs made or gathered on the spot: text, executables, random bytes, zeros, many small files.</summary>
internal sealed class BenchmarkInputs(string folder, long bytes)
{
    /// <summary>Documentation texts of this machine, repeated to size.</summary>
    public string Text() => Gathered("text", ["/usr/share/doc", "/usr/share/common-licenses", "/usr/share/perl", "/usr/lib/python3"], file => file.EndsWith("copyright", StringComparison.Ordinal) || file.EndsWith(".txt", StringComparison.Ordinal) || file.EndsWith(".pm", StringComparison.Ordinal) || file.EndsWith(".py", StringComparison.Ordinal));

    /// <summary>Shared libraries and programs of this machine, repeated to size.</summary>
    public string Executables() => Gathered("executables", ["/usr/lib/x86_64-linux-gnu", "/usr/bin", "/usr/lib/gcc"], file => new FileInfo(file).Length > 20_000);

    /// <summary>Seeded random bytes.</summary>
    public string Random(long? size = null, string name = "random") => Made(name, size ?? bytes, block => seeded.NextBytes(block));

    /// <summary>Zeros.</summary>
    public string Zeros(long? size = null, string name = "zeros") => Made(name, size ?? bytes, block => block.Clear());

    /// <summary>A folder of small files with text-like content.</summary>
    public string SmallFiles(int files, int size)
    {
        string path = Path.Combine(folder, $"small-{files}");
        if (Directory.Exists(path)) return path;
        byte[] text = File.ReadAllBytes(Text())[..(1 << 20)];
        for (int i = 0; i < files; i++)
        {
            string sub = Path.Combine(path, $"{i / 1000:d3}");
            if (i % 1000 == 0) Directory.CreateDirectory(sub);
            using FileStream file = File.Create(Path.Combine(sub, $"{i:d6}"));
            file.Write(text, i * 7919 % (text.Length - size), size);
        }
        return path;
    }

    private readonly System.Random seeded = new(20261201);

    private delegate void Filler(Span<byte> block);

    private string Made(string name, long size, Filler fill)
    {
        string path = Path.Combine(folder, name);
        if (File.Exists(path)) return path;
        using FileStream file = File.Create(path);
        var block = new byte[1 << 20];
        for (long left = size; left > 0; left -= block.Length)
        {
            fill(block);
            file.Write(block, 0, (int)Math.Min(left, block.Length));
        }
        return path;
    }

    private string Gathered(string name, string[] folders, Func<string, bool> take)
    {
        string path = Path.Combine(folder, name);
        if (File.Exists(path)) return path;
        using FileStream file = File.Create(path);
        var options = new EnumerationOptions { RecurseSubdirectories = true, IgnoreInaccessible = true, AttributesToSkip = FileAttributes.ReparsePoint };
        while (file.Length < bytes)
        {
            long before = file.Length;
            foreach (string source in folders.Where(Directory.Exists).SelectMany(from => Directory.EnumerateFiles(from, "*", options)).Where(take).Order(StringComparer.Ordinal))
            {
                if (file.Length >= bytes) break;
                byte[] content = File.ReadAllBytes(source);
                file.Write(content, 0, (int)Math.Min(content.Length, bytes - file.Length));
            }
            if (file.Length == before) throw new InvalidOperationException($"Nothing found for the input {name}.");
        }
        return path;
    }
}
