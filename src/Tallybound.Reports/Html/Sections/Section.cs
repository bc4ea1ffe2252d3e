using Tallybound.Reports.Charts.Frame;
using Tallybound.Reports.Html.Tables;

namespace Tallybound.Reports.Html.Sections;

/// <summary>One section of a page: its message in words, the picture, the tables behind it, how to read it, a caution.</summary>
/// <param name="Id">Its anchor.</param>
/// <param name="Heading">Its heading.</param>
/// <param name="Message">What the figures say, in one or two sentences.</param>
public sealed record Section(string Id, string Heading, string Message)
{
    /// <summary>Its charts.</summary>
    public IReadOnlyList<Chart> Charts { get; init; } = [];

    /// <summary>The tables behind the charts.</summary>
    public IReadOnlyList<Table> Tables { get; init; } = [];

    /// <summary>Long tables, folded.</summary>
    public IReadOnlyList<Table> FoldedTables { get; init; } = [];

    /// <summary>Two sentences on how to read it; null: none.</summary>
    public string? HowToRead { get; init; }

    /// <summary>What to beware of; null: nothing beyond what every report says.</summary>
    public string? Caution { get; init; }
}
