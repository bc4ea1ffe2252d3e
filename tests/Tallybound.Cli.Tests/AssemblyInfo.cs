// Runs of the program take the whole machine: side by side they would only measure each other.
[assembly: Xunit.v3.Parallelization(Mode = Xunit.Sdk.ParallelMode.None)]
