using System.Diagnostics;
using System.Globalization;
using System.IO.Pipes;
using System.Text;

namespace Tallybound.Cli.Tests;

/// <summary>What a finished run of the program answered.</summary>
/// <param name="ExitCode">Its exit code.</param>
/// <param name="Output">Standard output, read as UTF-8.</param>
/// <param name="Error">Standard error, read as UTF-8.</param>
internal sealed record Outcome(int ExitCode, string Output, string Error)
{
    /// <summary>Lines of standard error.</summary>
    public string[] ErrorLines => Lines(Error);

    /// <summary>Lines of standard output.</summary>
    public string[] OutputLines => Lines(Output);

    private static string[] Lines(string text) => text.Length == 0 ? [] : text.TrimEnd('\n').Split('\n');
}

/// <summary>The program as it was built beside these tests, started as a process of its own.</summary>
internal static class BuiltProgram
{
    /// <summary>Long enough for any run here on a busy machine; a run that takes longer hangs.</summary>
    private static readonly TimeSpan DefaultTimeout = TimeSpan.FromMinutes(3);

    /// <summary>The top folder of the repository.</summary>
    public static string RepositoryRoot { get; } = FindRoot();

    /// <summary><c>debug</c> or <c>release</c>, as these tests were built.</summary>
    public static string Configuration { get; } = Path.GetFileName(Path.TrimEndingDirectorySeparator(AppContext.BaseDirectory));

    /// <summary>The built program.</summary>
    public static string Assembly { get; } = Path.Combine(RepositoryRoot, ".artifacts", "bin", "Tallybound.Cli", Configuration, "tallybound.dll");

    /// <summary>The command that starts .NET programs here.</summary>
    public static string DotNet { get; } = Environment.GetEnvironmentVariable("DOTNET_HOST_PATH") ?? "dotnet";

    /// <summary>Runs the program to its end in a folder.</summary>
    public static Outcome Run(FreshFolder folder, params string[] arguments) => Run(folder, arguments, input: null);

    /// <summary>Runs the program to its end in a folder.</summary>
    /// <param name="folder">The working folder.</param>
    /// <param name="arguments">Its arguments.</param>
    /// <param name="input">Bytes for standard input; null: an empty one.</param>
    /// <param name="environment">Variables to set.</param>
    /// <param name="timeout">When to give up.</param>
    public static Outcome Run(
        FreshFolder folder, string[] arguments, byte[]? input, IReadOnlyDictionary<string, string>? environment = null, TimeSpan? timeout = null)
    {
        using RunningProgram program = Start(folder, arguments, environment);
        if (input is not null) program.Write(input);
        program.CloseInput();
        return program.WaitForEnd(timeout ?? DefaultTimeout);
    }

    /// <summary>Starts the program in a folder.</summary>
    public static RunningProgram Start(FreshFolder folder, string[] arguments, IReadOnlyDictionary<string, string>? environment = null) =>
        StartCommand(folder, DotNet, [Assembly, .. arguments], environment);

    /// <summary>Runs a shell script in which <c>$TALLYBOUND</c> is the command that starts the program.</summary>
    public static Outcome Shell(FreshFolder folder, string script, IReadOnlyDictionary<string, string>? environment = null)
    {
        var variables = new Dictionary<string, string>(environment ?? new Dictionary<string, string>(), StringComparer.Ordinal) { ["TALLYBOUND"] = $"{DotNet} {Assembly}" };
        using RunningProgram shell = StartCommand(folder, "/bin/bash", ["-c", script], variables);
        shell.CloseInput();
        return shell.WaitForEnd(DefaultTimeout);
    }

    /// <summary>Starts any command in a folder.</summary>
    public static RunningProgram StartCommand(FreshFolder folder, string command, string[] arguments, IReadOnlyDictionary<string, string>? environment = null)
    {
        var start = new ProcessStartInfo(command)
        {
            WorkingDirectory = folder.Path,
            UseShellExecute = false,
            RedirectStandardInput = true,
            RedirectStandardOutput = true,
            RedirectStandardError = true,
            StandardOutputEncoding = Encoding.UTF8,
            StandardErrorEncoding = Encoding.UTF8,
        };
        foreach (string argument in arguments) start.ArgumentList.Add(argument);
        start.Environment.Remove("NO_COLOR");
        foreach ((string name, string value) in environment ?? new Dictionary<string, string>()) start.Environment[name] = value;
        return new RunningProgram(Process.Start(start) ?? throw new InvalidOperationException($"{command} did not start."));
    }

    private static string FindRoot()
    {
        for (DirectoryInfo? folder = new(AppContext.BaseDirectory); folder is not null; folder = folder.Parent)
            if (File.Exists(Path.Combine(folder.FullName, "Profiler.sln"))) return folder.FullName;
        throw new InvalidOperationException("The tests do not lie below the folder of Profiler.sln.");
    }
}

/// <summary>A process of ours that is under way.</summary>
internal sealed class RunningProgram : IDisposable
{
    private readonly Process process;
    private readonly Task<string> output;
    private readonly Task<string> error;

    public RunningProgram(Process process)
    {
        this.process = process;
        output = process.StandardOutput.ReadToEndAsync();
        error = process.StandardError.ReadToEndAsync();
    }

    /// <summary>Its id.</summary>
    public int Id => process.Id;

    /// <summary>True once it has ended.</summary>
    public bool HasEnded => process.HasExited;

    /// <summary>Writes to its standard input; a program that has stopped reading is no error here.</summary>
    public void Write(ReadOnlySpan<byte> bytes)
    {
        try
        {
            process.StandardInput.BaseStream.Write(bytes);
            process.StandardInput.BaseStream.Flush();
        }
        catch (IOException)
        {
            // It ended, or closed its input: its answer says more than the pipe does.
        }
    }

    /// <summary>Ends its standard input.</summary>
    public void CloseInput()
    {
        try
        {
            process.StandardInput.Close();
        }
        catch (IOException)
        {
            // It ended first.
        }
    }

    /// <summary>Bytes written to its standard input that it has not taken yet.</summary>
    public int BytesWaitingInInput() => Posix.BytesWaiting(((PipeStream)process.StandardInput.BaseStream).SafePipeHandle);

    /// <summary>Sends it a signal.</summary>
    public void Signal(int signal) => Assert.Equal(0, Posix.Kill(process.Id, signal));

    /// <summary>Peak resident memory so far in bytes (VmHWM); 0 once it has ended.</summary>
    public long PeakMemoryBytes()
    {
        try
        {
            foreach (string line in File.ReadLines($"/proc/{process.Id.ToString(CultureInfo.InvariantCulture)}/status"))
                if (line.StartsWith("VmHWM:", StringComparison.Ordinal))
                    return long.Parse(line.AsSpan("VmHWM:".Length).TrimEnd("kB").Trim(), CultureInfo.InvariantCulture) * 1024;
        }
        catch (IOException)
        {
            // It has ended.
        }
        return 0;
    }

    /// <summary>Waits until a condition holds while the program runs.</summary>
    public void WaitUntil(Func<bool> condition, string what)
    {
        var watch = Stopwatch.StartNew();
        while (!condition())
        {
            Assert.False(process.HasExited, $"The program ended before {what}.");
            Assert.True(watch.Elapsed < TimeSpan.FromMinutes(1), $"Nothing came of waiting: {what}.");
            Thread.Sleep(20);
        }
    }

    /// <summary>Waits for its end and gives its answer.</summary>
    public Outcome WaitForEnd(TimeSpan timeout)
    {
        if (!process.WaitForExit(timeout))
        {
            process.Kill(entireProcessTree: true);
            Assert.Fail($"The program did not end within {timeout}.");
        }
        process.WaitForExit();
        return new Outcome(process.ExitCode, output.GetAwaiter().GetResult(), error.GetAwaiter().GetResult());
    }

    public void Dispose()
    {
        if (!process.HasExited) process.Kill(entireProcessTree: true);
        process.Dispose();
    }
}
