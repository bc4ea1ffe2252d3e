using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts.Frame;

namespace Tallybound.Reports.Charts;

/// <summary>The heaviest sources: what each spends now, and below it what it is with its best code.</summary>
internal static class RankingChart
{
    private const int Shown = 12;

    /// <summary>Draws it.</summary>
    /// <param name="corpus">The whole.</param>
    /// <param name="heaviest">Sources that were read, by bytes.</param>
    public static Chart Of(CorpusProfile corpus, IReadOnlyList<SourceSummary> heaviest)
    {
        List<SourceSummary> shown = [.. heaviest.Where(source => source is { Bytes: > 0, BestBytes: not null }).Take(Shown)];
        if (shown.Count < 2) return Chart.Instead("One source has all the bytes, so there is no ranking to draw.");
        (double scale, string unit) = ByteScale.For(shown[0].Bytes!.Value);
        var rows = new List<BarRow>(2 * shown.Count);
        foreach (SourceSummary source in shown)
        {
            rows.Add(new BarRow(source.Name, CodeFamily.Raw, source.Bytes!.Value / scale, 0, 0, SizeText.Bytes(source.Bytes.Value)));
            string code = source.BestCode ?? CodeChoice.Stored;
            rows.Add(new BarRow(code == CodeChoice.Stored ? "best stored" : CodeText.Of(code), Tones.FamilyOf(code), source.BestBytes!.Value / scale, 0, 0, $"{SizeText.Bytes(source.BestBytes.Value)}  {SizeText.Ratio(source.Bytes.Value, source.BestBytes.Value)}"));
        }
        SourceSummary most = shown.MaxBy(source => source.Bytes!.Value - source.BestBytes!.Value)!;
        long saved = most.Bytes!.Value - most.BestBytes!.Value;
        long all = corpus.Bytes - (corpus.Totals.TryGetValue("bestPerSource", out long best) ? best : corpus.Bytes);
        string title = saved <= 0
            ? "None of the heaviest sources gets smaller"
            : $"Most is saved in {PictureText.Fit(PictureText.Shown(most.Name), 330, PictureText.TitleSize)}: {SizeText.Bytes(saved)} of the {SizeText.Bytes(all)} that best codes save in all";
        string alternative = $"{title}. " + string.Join("; ", shown.Select(source => $"{source.Name}: {SizeText.Bytes(source.Bytes!.Value)}, {SizeText.Bytes(source.BestBytes!.Value)} with {CodeText.Of(source.BestCode ?? CodeChoice.Stored)}")) + ".";
        return Chart.Of(SizeBars.Draw("ranking", title, $"{unit} of the {shown.Count} heaviest sources: grey as they stand, coloured with the best code of each, table and framing included", alternative, rows, []));
    }
}
