using System.Globalization;
using System.Security.Cryptography;
using System.Text;
using Tallybound.Profiling.Ledger;
using Tallybound.Profiling.Records;
using Tallybound.Sources;

namespace Tallybound.Profiling.Plan;

/// <summary>The frozen plan of a run: what will be read, in what order of names, with which parameters.</summary>
/// <remarks>Everything later is work on this plan; who does which part of it cannot change a figure.</remarks>
public sealed record RunPlan
{
    /// <summary>What was asked for.</summary>
    public required RunParameters Parameters { get; init; }

    /// <summary>How memory is divided.</summary>
    public required MemoryPlan Memory { get; init; }

    /// <summary>Every source of the run, in the order of names; an entry's place is its id.</summary>
    public required IReadOnlyList<PlanEntry> Entries { get; init; }

    /// <summary>Names kept out by <c>--include</c> and <c>--exclude</c>.</summary>
    public required long ExcludedByRule { get; init; }

    /// <summary>SHA-256 over sources, sizes, times and the parameters that figures depend on; lower-case hexadecimal.</summary>
    public required string Digest { get; init; }

    /// <summary>Lists the sources and freezes the plan.</summary>
    /// <param name="parameters">What was asked for.</param>
    /// <param name="stop">Stops the walk.</param>
    /// <exception cref="InputNotFoundException">An INPUT does not exist.</exception>
    /// <exception cref="OperationCanceledException">The walk was stopped.</exception>
    public static RunPlan Freeze(RunParameters parameters, CancellationToken stop)
    {
        ArgumentNullException.ThrowIfNull(parameters);
        WalkResult walk = SourceWalk.Find(new SourceRequest(parameters.Inputs, parameters.Include, parameters.Exclude, parameters.Inside), stop);
        List<PlanEntry> entries =
        [
            .. walk.Sources.Select(found => PlanEntry.ToRead(found)),
            .. walk.Skipped.Select(skipped => PlanEntry.Decided(skipped.Name, SourceStatus.Skipped, skipped.Reason)),
            .. walk.Failed.Select(failed => PlanEntry.Decided(failed.Name, SourceStatus.Failed, failed.Reason)),
        ];
        entries.Sort((a, b) => NameOrder.Compare(a.Name, b.Name));
        return new RunPlan
        {
            Parameters = parameters,
            Memory = MemoryPlan.For(parameters.MemoryBytes, parameters.Threads),
            Entries = entries,
            ExcludedByRule = walk.ExcludedByRule,
            Digest = DigestOf(parameters, entries),
        };
    }

    /// <summary>The entries as the ledger keeps them.</summary>
    internal IEnumerable<PlannedSource> ForLedger() =>
        Entries.Select((entry, id) => new PlannedSource(id, entry.Name, entry.Kind, entry.Found?.Path.RawBytes.ToArray(), entry.Found?.Bytes, entry.Found?.ModifiedUtc));

    private static string DigestOf(RunParameters parameters, List<PlanEntry> entries)
    {
        using var hash = IncrementalHash.CreateHash(HashAlgorithmName.SHA256);
        Add(string.Create(CultureInfo.InvariantCulture,
            $"order {parameters.HighestOrder} block {parameters.LongestBlock} limits {string.Join(',', parameters.LengthLimits)} radices {string.Join(',', parameters.Radices)} views {string.Join(',', parameters.Views)} segment {parameters.SegmentBytes} seed {parameters.Seed} inside {parameters.Inside} {parameters.InsideRatio} {parameters.InsideBytes} digest {parameters.Digest}"));
        foreach (PlanEntry entry in entries)
            Add(string.Create(CultureInfo.InvariantCulture, $"{entry.Name}\0{entry.Kind}\0{entry.Found?.Bytes}\0{entry.Found?.ModifiedUtc?.Ticks}\0{entry.Reason}"));
        return Convert.ToHexStringLower(hash.GetHashAndReset());

        void Add(string text)
        {
            hash.AppendData(Encoding.UTF8.GetBytes(text));
            hash.AppendData("\n"u8);
        }
    }
}
