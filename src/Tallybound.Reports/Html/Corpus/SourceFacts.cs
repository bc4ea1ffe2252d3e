using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Reports.Html.Corpus;

/// <summary>What heads the page of one source.</summary>
internal static class SourceFacts
{
    /// <summary>The source in one sentence, with both sizes.</summary>
    public static string Verdict(SourceProfile source)
    {
        long bytes = source.Bytes ?? 0;
        if (source.Views is not [{ Symbols: > 0 } view, ..]) return bytes == 0 ? "The source is empty, so there is nothing to say of sizes." : "The source is shorter than one symbol of the view.";
        CodeChoice best = CodeChoice.Cheapest(view);
        if (best.Key == CodeChoice.Stored) return $"{SizeText.Bytes(bytes)}: none of the codes priced here makes it smaller once its table is charged; it is best stored.";
        long coded = best.TotalBits / 8;
        return $"{SizeText.Bytes(bytes)}; with {CodeText.Of(best.Key)} it is {SizeText.Bytes(coded)}, table and framing included: {SizeText.Ratio(bytes, coded)}, saving {SizeText.Saving(bytes, coded)}.";
    }

    /// <summary>Names and sentences, in reading order.</summary>
    public static IEnumerable<(string Name, string Text)> Of(SourceProfile source)
    {
        yield return ("bytes", SizeText.Count(source.Bytes ?? 0) + (source.CompressedBytes is { } compressed ? $", read out of {SizeText.Count(compressed)} compressed bytes" : ""));
        yield return ("kind", source.Kind switch { SourceProfileKind.Stream => "stream", SourceProfileKind.Member => "content of a compressed file", SourceProfileKind.Object => "object", _ => "file" });
        if (source.Sha256 is { } digest) yield return ("SHA-256", digest);
        if (source.Sha256Pieces is { } pieces) yield return ("SHA-256 of the SHA-256s of 64 MiB pieces", pieces);
        foreach (string note in source.Notes ?? []) yield return ("note", note);
    }
}
