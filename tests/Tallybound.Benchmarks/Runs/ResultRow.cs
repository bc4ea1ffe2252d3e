using System.Globalization;

namespace Tallybound.Benchmarks.Runs;

/// <summary>One measured comparison.</summary>
/// <param name="Work">What was done.</param>
/// <param name="Against">What it was measured against.</param>
/// <param name="Ours">Median of our side, in <paramref name="Unit"/>.</param>
/// <param name="Theirs">Median of the other side; null where the row has one side.</param>
/// <param name="Unit">Unit of both.</param>
/// <param name="Ratio">The ratio that is to be reached.</param>
/// <param name="Reach">The condition on it, such as "≥ 20".</param>
/// <param name="Met">Whether it holds.</param>
internal sealed record ResultRow(string Work, string Against, double Ours, double? Theirs, string Unit, double Ratio, string Reach, bool Met)
{
    public const string Header = "| work | against | ours | theirs | unit | ratio | reach | met |\n|---|---|---:|---:|---|---:|---:|---|";

    public string ToMarkdown() => string.Create(CultureInfo.InvariantCulture,
        $"| {Work} | {Against} | {Ours:0.###} | {Theirs?.ToString("0.###", CultureInfo.InvariantCulture) ?? "–"} | {Unit} | {Ratio:0.00} | {Reach} | {(Met ? "yes" : "no")} |");
}
