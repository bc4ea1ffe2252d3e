using System.Globalization;
using Tallybound.Profiling.Records;
using Tallybound.Profiling.Wording;

namespace Tallybound.Reports.Html;

/// <summary>Figures of findings in words.</summary>
internal static class FindingText
{
    /// <summary>A figure with its unit: counts and bytes whole, rates to four decimals, shares to two.</summary>
    public static string Number(FindingEvidence evidence) => evidence.Unit switch
    {
        "bytes" => evidence.Value < 1024 ? $"{SizeText.Count((long)evidence.Value)} bytes" : $"{SizeText.Bytes((long)evidence.Value)} ({SizeText.Count((long)evidence.Value)} bytes)",
        "%" => $"{evidence.Value.ToString("0.00", CultureInfo.InvariantCulture)} %",
        "" => Plain(evidence.Value),
        _ when evidence.Unit.Contains('/', StringComparison.Ordinal) => $"{SizeText.Rate(evidence.Value)} {evidence.Unit}",
        _ => $"{Plain(evidence.Value)} {evidence.Unit}",
    };

    /// <summary>Which of the other findings speak of the same bytes; null: none of those listed.</summary>
    public static string? Excludes(Finding finding, IReadOnlyList<Finding> listed)
    {
        string[] others = [.. listed.Where(other => other.BytesAtStake > 0 && finding.Excludes?.Contains(other.Id, StringComparer.Ordinal) == true).Select(other => $"“{other.Claim.TrimEnd('.')}”")];
        return others.Length == 0 ? null : $"On the same bytes, so not to be added up: {string.Join("; ", others)}.";
    }

    private static string Plain(double value) => value == Math.Floor(value) && Math.Abs(value) < 1e15 ? SizeText.Count((long)value) : value.ToString("0.####", CultureInfo.InvariantCulture);
}
