namespace Tallybound.Profiling.Run;

/// <summary>The folder of a run: <c>NAME.partial</c> while it is made, <c>NAME</c> once it is whole.</summary>
/// <remarks>The open lock file dies with the process, so that a killed run never leaves a folder locked.</remarks>
public sealed class RunFolder : IDisposable
{
    private const string PartialSuffix = ".partial";
    private const string LockName = ".lock";
    private FileStream? lockFile;
    private bool completed;

    private RunFolder(string finalPath, FileStream lockFile)
    {
        FinalPath = finalPath;
        this.lockFile = lockFile;
    }

    /// <summary>The folder's path once the run is whole.</summary>
    public string FinalPath { get; }

    /// <summary>Where files are written now.</summary>
    public string WorkPath => completed ? FinalPath : FinalPath + PartialSuffix;

    /// <summary>Makes the folder named by <c>--out</c>.</summary>
    /// <exception cref="RunFolderTakenException">It exists, whole or partial.</exception>
    /// <exception cref="IOException">It cannot be made.</exception>
    /// <exception cref="UnauthorizedAccessException">It may not be made.</exception>
    public static RunFolder CreateNamed(string path)
    {
        string finalPath = Path.TrimEndingDirectorySeparator(Path.GetFullPath(path));
        if (Exists(finalPath)) throw new RunFolderTakenException(finalPath);
        if (Exists(finalPath + PartialSuffix)) throw new RunFolderTakenException(finalPath + PartialSuffix);
        return Open(finalPath);
    }

    /// <summary>Makes <c>PARENT/NAME</c>, or <c>NAME-2</c>, <c>NAME-3</c> … where that is taken.</summary>
    /// <exception cref="IOException">It cannot be made.</exception>
    /// <exception cref="UnauthorizedAccessException">It may not be made.</exception>
    public static RunFolder CreateNumbered(string parent, string name)
    {
        for (int number = 1; ; number++)
        {
            string candidate = Path.GetFullPath(Path.Combine(parent, number == 1 ? name : $"{name}-{number}"));
            if (!Exists(candidate) && !Exists(candidate + PartialSuffix)) return Open(candidate);
        }
    }

    /// <summary>Renames the folder to its final name: the run is whole.</summary>
    public void Complete()
    {
        string work = WorkPath;
        ReleaseLock();
        Directory.Move(work, FinalPath);
        completed = true;
    }

    /// <summary>Gives the lock back; a folder that was not completed keeps its <c>.partial</c> name.</summary>
    public void Dispose() => ReleaseLock();

    private static RunFolder Open(string finalPath)
    {
        string work = finalPath + PartialSuffix;
        Directory.CreateDirectory(work);
        var stream = new FileStream(Path.Combine(work, LockName), FileMode.CreateNew, FileAccess.ReadWrite, FileShare.Read);
        stream.Write(System.Text.Encoding.ASCII.GetBytes(Environment.ProcessId.ToString(System.Globalization.CultureInfo.InvariantCulture)));
        stream.Flush();
        return new RunFolder(finalPath, stream);
    }

    private static bool Exists(string path) => Directory.Exists(path) || File.Exists(path);

    private void ReleaseLock()
    {
        if (lockFile is null) return;
        string name = lockFile.Name;
        lockFile.Dispose();
        File.Delete(name);
        lockFile = null;
    }
}

/// <summary>The folder that a run was to be written to is there already.</summary>
public sealed class RunFolderTakenException(string path) : IOException($"The run folder {path} exists already.")
{
    /// <summary>The folder that is in the way.</summary>
    public string TakenPath { get; } = path;
}
