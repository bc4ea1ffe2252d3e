using System.Globalization;

namespace Tallybound.Profiling.Wording;

/// <summary>Sizes and ratios in words, the same on every screen and page.</summary>
public static class SizeText
{
    private static readonly string[] Units = ["B", "KiB", "MiB", "GiB", "TiB", "PiB", "EiB"];

    /// <summary>Bytes to three significant figures with a unit of 1,024: <c>512 B</c>, <c>4.12 MiB</c>.</summary>
    public static string Bytes(long bytes)
    {
        double value = bytes;
        int unit = 0;
        while (unit < Units.Length - 1 && RoundedUp(value, unit) >= 1024)
        {
            value /= 1024;
            unit++;
        }
        string format = unit == 0 || value >= 99.95 ? "0" : value >= 9.995 ? "0.0" : "0.00";
        return value.ToString(format, CultureInfo.InvariantCulture) + " " + Units[unit];
    }

    /// <summary>A size that is set, such as a block's, to the last byte in the largest unit of which it is a whole number: <c>64 KiB</c>, <c>1,500 B</c>.</summary>
    public static string Whole(long bytes)
    {
        int unit = 0;
        while (bytes > 0 && unit < Units.Length - 1 && bytes % 1024 == 0)
        {
            bytes /= 1024;
            unit++;
        }
        return Count(bytes) + " " + Units[unit];
    }

    /// <summary>A count with commas between thousands.</summary>
    public static string Count(long count) => count.ToString("N0", CultureInfo.InvariantCulture);

    /// <summary>Raw ÷ coded to two decimals: <c>2.31×</c>; above 1 is good. Empty where coded is 0.</summary>
    public static string Ratio(long rawBytes, long codedBytes) =>
        codedBytes == 0 ? "" : ((double)rawBytes / codedBytes).ToString("0.00", CultureInfo.InvariantCulture) + "×";

    /// <summary>1 − coded/raw in per cent to one decimal: <c>56.7 %</c>. Empty where raw is 0.</summary>
    public static string Saving(long rawBytes, long codedBytes) =>
        rawBytes == 0 ? "" : (100.0 * (rawBytes - codedBytes) / rawBytes).ToString("0.0", CultureInfo.InvariantCulture) + " %";

    /// <summary>A share of 0 to 1 in per cent to one decimal: <c>56.7 %</c>. Only the whole is <c>100.0 %</c>.</summary>
    public static string Percent(double share)
    {
        double percent = Math.Round(100 * share, 1);
        return (percent >= 100 && share < 1 ? 99.9 : percent).ToString("0.0", CultureInfo.InvariantCulture) + " %";
    }

    /// <summary>Rate to four decimals.</summary>
    public static string Rate(double bitsPerSymbol) => bitsPerSymbol.ToString("0.0000", CultureInfo.InvariantCulture);

    private static double RoundedUp(double value, int unit) => unit == 0 ? value : Math.Round(value, value >= 99.95 ? 0 : 2);
}
