using System.Diagnostics;
using System.Runtime.InteropServices;

namespace Tallybound.Benchmarks.Kernels;

/// <summary>The C side of the kernel comparison, built on the spot by gcc.</summary>
internal sealed unsafe class NativeCounting : IDisposable
{
    private readonly nint library;

    public NativeCounting(string source, string folder)
    {
        string built = Path.Combine(folder, "counting.so");
        using (Process gcc = Process.Start(new ProcessStartInfo("gcc", ["-O3", "-march=native", "-shared", "-fPIC", "-o", built, source]) { UseShellExecute = false })!)
        {
            gcc.WaitForExit();
            if (gcc.ExitCode != 0) throw new InvalidOperationException("gcc could not build the C side of the comparison.");
        }
        library = NativeLibrary.Load(built);
        Order0 = (delegate* unmanaged<byte*, nuint, ulong*, void>)NativeLibrary.GetExport(library, "count_order0");
        Order1 = (delegate* unmanaged<byte*, nuint, uint*, void>)NativeLibrary.GetExport(library, "count_order1");
        Order2 = (delegate* unmanaged<byte*, nuint, uint*, void>)NativeLibrary.GetExport(library, "count_order2");
    }

    public delegate* unmanaged<byte*, nuint, ulong*, void> Order0 { get; }

    public delegate* unmanaged<byte*, nuint, uint*, void> Order1 { get; }

    public delegate* unmanaged<byte*, nuint, uint*, void> Order2 { get; }

    public void Dispose() => NativeLibrary.Free(library);
}
