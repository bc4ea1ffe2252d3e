using System.Globalization;
using Tallybound.Profiling.Plan;
using Tallybound.Profiling.Records;
using Tallybound.Tallies;

namespace Tallybound.Profiling.Run;

/// <summary>Lays finished tallies down in the run folder until the report writes their counts out in the order of names.</summary>
internal sealed class TallyKeeper(RunPlan plan, string folder)
{
    private readonly string path = Path.Combine(folder, "tallies");

    /// <summary>Keeps the tallies of a source.</summary>
    public void Keep(int source, SourcePart part)
    {
        Directory.CreateDirectory(path);
        for (int view = 0; view < part.Tallies.Length; view++)
        {
            using FileStream stream = File.Create(FileOf(source, view));
            part.Tallies[view].WriteTo(stream);
        }
    }

    /// <summary>Every count, by source, view, order and context; each file is removed once it was read.</summary>
    public IEnumerable<TallyRow> Rows()
    {
        for (int source = 0; source < plan.Entries.Count; source++)
        {
            for (int view = 0; view < plan.Parameters.Views.Count; view++)
            {
                if (!File.Exists(FileOf(source, view))) continue;
                foreach (TallyRow row in RowsOf(source, view)) yield return row;
                File.Delete(FileOf(source, view));
            }
        }
        if (Directory.Exists(path)) Directory.Delete(path);
    }

    private IEnumerable<TallyRow> RowsOf(int source, int view)
    {
        using FileStream stream = File.OpenRead(FileOf(source, view));
        ISymbolTally tally = TallyChoice.ReadFrom(stream);
        try
        {
            for (int order = 0; order <= tally.HighestOrder; order++)
            {
                var rows = new RowList(plan.Entries[source].Name, plan.Parameters.Views[view], order);
                tally.VisitContexts(order, rows);
                foreach (TallyRow row in rows.Rows) yield return row;
            }
        }
        finally
        {
            (tally as IDisposable)?.Dispose();
        }
    }

    private string FileOf(int source, int view) => Path.Combine(path, string.Create(CultureInfo.InvariantCulture, $"{source}-{view}.tally"));

    private sealed class RowList(string source, string view, int order) : IContextVisitor
    {
        public List<TallyRow> Rows { get; } = [];

        public void Visit(long context, ReadOnlySpan<int> symbols, ReadOnlySpan<long> fold0, ReadOnlySpan<long> fold1)
        {
            for (int i = 0; i < symbols.Length; i++) Rows.Add(new TallyRow(source, view, order, context, symbols[i], fold0[i] + fold1[i]));
        }
    }
}
