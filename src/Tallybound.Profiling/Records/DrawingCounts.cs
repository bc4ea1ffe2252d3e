using System.Text.Json;

namespace Tallybound.Profiling.Records;

/// <summary>The counts that drawings of a source need, kept apart from its record until it is known which sources have a page.</summary>
/// <param name="Views">One entry a view, in the record's order.</param>
public sealed record DrawingCounts(IReadOnlyList<DrawingCountsOfView> Views)
{
    /// <summary>JSON bytes for the ledger.</summary>
    public byte[] ToUtf8() => JsonSerializer.SerializeToUtf8Bytes(this, RecordJson.Default.DrawingCounts);

    /// <summary>What <see cref="ToUtf8"/> wrote.</summary>
    /// <exception cref="JsonException">The bytes are not such counts.</exception>
    public static DrawingCounts FromUtf8(ReadOnlySpan<byte> utf8) =>
        JsonSerializer.Deserialize(utf8, RecordJson.Default.DrawingCounts) ?? throw new JsonException("The counts are null.");

    /// <summary>The record with these counts in it.</summary>
    /// <param name="profile">The record without counts.</param>
    /// <param name="withPairs">Whether pair counts go in: they do for the ten heaviest sources.</param>
    public SourceProfile AddTo(SourceProfile profile, bool withPairs)
    {
        if (profile.Views is null || profile.Views.Count != Views.Count) return profile;
        var views = new ViewProfile[Views.Count];
        for (int i = 0; i < views.Length; i++)
        {
            views[i] = profile.Views[i] with
            {
                SymbolCounts = Views[i].SymbolCounts,
                CodeLengths = Views[i].CodeLengths,
                PairCounts = withPairs ? Views[i].PairCounts : null,
            };
        }
        return profile with { Views = views };
    }
}

/// <summary>The counts of one view; the members are those of <see cref="ViewProfile"/>.</summary>
public sealed record DrawingCountsOfView(SymbolSeries? SymbolCounts, SymbolSeries? CodeLengths, IReadOnlyDictionary<string, IReadOnlyList<long[]>>? PairCounts);
