using System.Diagnostics;
using Xunit;

namespace Tallybound.Tests.Sources;

/// <summary>A folder for one test, which may hold names that only a shell can make and remove.</summary>
internal sealed class TemporaryFolder : IDisposable
{
    public string Root { get; } = Directory.CreateTempSubdirectory("tallybound-").FullName;

    public string Write(string name, byte[] content)
    {
        string path = Path.Combine(Root, name);
        Directory.CreateDirectory(Path.GetDirectoryName(path)!);
        File.WriteAllBytes(path, content);
        return path;
    }

    /// <summary>Runs a script of bash in the folder.</summary>
    public void Shell(string script)
    {
        var start = new ProcessStartInfo("/bin/bash") { UseShellExecute = false, WorkingDirectory = Root };
        start.ArgumentList.Add("-c");
        start.ArgumentList.Add(script);
        using Process process = Process.Start(start)!;
        process.WaitForExit();
        Assert.Equal(0, process.ExitCode);
    }

    /// <summary>By the shell: the runtime cannot remove names that are not UTF-8.</summary>
    public void Dispose() => Shell("rm -rf -- \"$PWD\"");
}
