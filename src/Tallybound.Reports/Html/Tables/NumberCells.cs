using System.Globalization;
using Tallybound.Profiling.Wording;
using Tallybound.Reports.Charts;

namespace Tallybound.Reports.Html.Tables;

/// <summary>Cells of single numbers, each in the one form that its kind of figure has on every page.</summary>
internal static class NumberCells
{
    /// <summary>A rate in bit/symbol, to four decimals.</summary>
    public static Cell Rate(double? bitsPerSymbol, string? record = null) => bitsPerSymbol is not { } rate ? Cell.Empty
        : new Cell(SizeText.Rate(rate)) { Record = record, Unit = record is null ? null : "bit/symbol" };

    /// <summary>A count, with commas between thousands.</summary>
    public static Cell Count(long? count, string? record = null) => count is not { } number ? Cell.Empty
        : new Cell(SizeText.Count(number)) { Record = record, Unit = record is null ? null : "count" };

    /// <summary>A share as per cent, to one decimal.</summary>
    public static Cell Percent(double? share, string? record = null) => share is not { } number ? Cell.Empty
        : new Cell((100 * number).ToString("0.0", CultureInfo.InvariantCulture)) { Record = record, Unit = record is null ? null : "%" };

    /// <summary>Raw ÷ coded.</summary>
    /// <param name="raw">Raw bytes.</param>
    /// <param name="coded">Coded bytes.</param>
    /// <param name="rawRecord">Where the raw size stands in the record.</param>
    /// <param name="codedRecord">Where the coded size stands.</param>
    public static Cell Ratio(long? raw, long? coded, string? rawRecord = null, string? codedRecord = null) => raw is not { } r || coded is not { } c ? Cell.Empty
        : rawRecord is null || c == 0 ? new Cell(SizeText.Ratio(r, c)) : new Cell(SizeText.Ratio(r, c)) { Record = $"{rawRecord} over {codedRecord}", Unit = "×" };

    /// <summary>Bytes of a size given in bits, exact in the title. Alone in its column; several go through <see cref="SizeColumn"/>.</summary>
    public static string ExactBytes(long bytes) => $"{SizeText.Count(bytes)} {(bytes == 1 ? "byte" : "bytes")}";
}

/// <summary>A column of sizes: one unit for all, three significant figures, aligned on the decimal point, the exact number in the title.</summary>
internal sealed class SizeColumn
{
    private const int Significant = 3;
    private const int MostDecimals = 4;
    private const char FigureSpace = '\u2007';
    private const char PointSpace = '\u2008';

    private readonly double scale;
    private readonly int decimals;

    /// <summary>A column for values of which these are all.</summary>
    public SizeColumn(IEnumerable<long?> bytes)
    {
        long[] known = [.. bytes.Where(value => value is not null).Select(value => value!.Value)];
        (scale, Unit) = ByteScale.For(known.Length == 0 ? 0 : known.Max());
        decimals = scale == 1 ? 0 : known.Length == 0 ? 0 : known.Max(DecimalsOf);
    }

    /// <summary>Unit of the column.</summary>
    public string Unit { get; }

    /// <summary>The cell of a value; empty where there is none.</summary>
    /// <param name="bytes">The value.</param>
    /// <param name="record">Where it stands in the record.</param>
    public Cell Of(long? bytes, string? record = null)
    {
        if (bytes is not { } value) return Cell.Empty;
        int own = scale == 1 ? 0 : DecimalsOf(value);
        string text = scale == 1 ? SizeText.Count(value) : (value / scale).ToString("N" + own.ToString(CultureInfo.InvariantCulture), CultureInfo.InvariantCulture);
        if (decimals > own) text += (own == 0 ? PointSpace.ToString() : "") + new string(FigureSpace, decimals - own);
        return new Cell(text) { Exact = NumberCells.ExactBytes(value), Record = record, Unit = Unit, SortKey = value.ToString(CultureInfo.InvariantCulture) };
    }

    private int DecimalsOf(long bytes)
    {
        double value = Math.Abs(bytes / scale);
        if (!(value > 0)) return 0;
        int digitsBefore = (int)Math.Floor(Math.Log10(value)) + 1;
        return Math.Clamp(Significant - digitsBefore, 0, MostDecimals);
    }
}
