namespace Tallybound.Reports.Charts.Frame;

/// <summary>A chart, or the sentence that stands in its place where it would say nothing.</summary>
public sealed record Chart
{
    private Chart(Picture? picture, string? sentence) => (Picture, Sentence) = (picture, sentence);

    /// <summary>The picture; null where it would say nothing.</summary>
    public Picture? Picture { get; }

    /// <summary>Why there is no picture; null where there is one.</summary>
    public string? Sentence { get; }

    /// <summary>A picture.</summary>
    public static Chart Of(Picture picture) => new(picture, null);

    /// <summary>A sentence instead.</summary>
    public static Chart Instead(string sentence) => new(null, sentence);
}
