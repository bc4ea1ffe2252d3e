namespace Tallybound.Reports.Html.Tables;

/// <summary>One cell of a table.</summary>
/// <param name="Text">What it shows; empty where there is no figure.</param>
public sealed record Cell(string Text)
{
    /// <summary>A cell without a figure.</summary>
    public static Cell Empty { get; } = new("");

    /// <summary>The exact number in words with its unit, where <see cref="Text"/> is rounded.</summary>
    public string? Exact { get; init; }

    /// <summary>Where the number stands in <c>profile.json</c>, as a JSON pointer (RFC 6901), or two of them with <c>over</c> between; null for other figures.</summary>
    public string? Record { get; init; }

    /// <summary>Unit that the text is in, such as <c>MiB</c>, <c>bit/symbol</c>, <c>count</c>, <c>%</c>, <c>×</c>; null where nothing needs it.</summary>
    public string? Unit { get; init; }

    /// <summary>Where a link leads; null: none.</summary>
    public string? Link { get; init; }

    /// <summary>What the column is sorted by where the text does not say it.</summary>
    public string? SortKey { get; init; }
}

/// <summary>One column of a table.</summary>
/// <param name="Header">Its name, with the unit.</param>
/// <param name="IsText">Whether it holds words, which stand at the left; numbers stand at the right, on their decimal point.</param>
public sealed record Column(string Header, bool IsText = false);

/// <summary>A row; its first cell is its header.</summary>
/// <param name="Cells">As many as there are columns.</param>
/// <param name="Stressed">Whether it is the one that the section speaks of.</param>
public sealed record Row(IReadOnlyList<Cell> Cells, bool Stressed = false);

/// <summary>A table with all that a reader, a screen reader and a sorting script need.</summary>
/// <param name="Caption">What it shows.</param>
/// <param name="Columns">Its columns.</param>
/// <param name="Rows">Its rows.</param>
public sealed record Table(string Caption, IReadOnlyList<Column> Columns, IReadOnlyList<Row> Rows)
{
    private const int LongFrom = 12;

    /// <summary>Whether there are so many rows that sorting them helps.</summary>
    public bool IsLong => Rows.Count >= LongFrom;
}
