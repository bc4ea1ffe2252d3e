using Tallybound.Sources.Native;
using Tallybound.Sources.Walking;

namespace Tallybound.Sources;

/// <summary>Finds the sources behind the inputs of a command line.</summary>
public static class SourceWalk
{
    /// <summary>Lists every source in ordinal order of names. Reads folders, and the first bytes of files where members are asked for; opens no pipe.</summary>
    /// <param name="request">What to look for.</param>
    /// <param name="stop">Stops the walk.</param>
    /// <exception cref="InputNotFoundException">An INPUT does not exist.</exception>
    /// <exception cref="GlobException">A glob cannot be understood.</exception>
    /// <exception cref="OperationCanceledException">The walk was stopped.</exception>
    public static WalkResult Find(SourceRequest request, CancellationToken stop = default) =>
        new Walk(request, LinuxPaths.Serve ? new LinuxFolders() : new PortableFolders(), stop).Run();
}
