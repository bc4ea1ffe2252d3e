using Tallybound.Benchmarks.Runs;

// One command for all side-by-side measurements of whole processes; kernels have theirs under Kernels.
return await SideBySide.RunAsync(args).ConfigureAwait(false);
