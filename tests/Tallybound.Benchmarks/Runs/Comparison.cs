namespace Tallybound.Benchmarks.Runs;

/// <summary>A measurement with a side of ours, a side of others, and what their ratio must be.</summary>
internal sealed record Comparison(string Work, string Against, int Repetitions, Func<double> Ours, Func<double>? Theirs, string Unit, Func<double, double?, double> Ratio, string Reach, Func<double, bool> Met)
{
    /// <summary>Runs the sides in turn and takes medians.</summary>
    public ResultRow Run()
    {
        var ours = new List<double>();
        var theirs = new List<double>();
        for (int i = 0; i < Repetitions; i++)
        {
            ours.Add(Ours());
            if (Theirs is not null) theirs.Add(Theirs());
        }
        double our = Median(ours);
        double? their = theirs.Count > 0 ? Median(theirs) : null;
        double ratio = Ratio(our, their);
        return new ResultRow(Work, Against, our, their, Unit, ratio, Reach, Met(ratio));
    }

    private static double Median(List<double> values)
    {
        values.Sort();
        return values.Count % 2 == 1 ? values[values.Count / 2] : (values[(values.Count / 2) - 1] + values[values.Count / 2]) / 2;
    }
}
