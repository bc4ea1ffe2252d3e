using Tallybound.Profiling.Wording;

namespace Tallybound.Reports.Charts;

/// <summary>The unit that an axis or a column of bytes is shown in.</summary>
internal static class ByteScale
{
    /// <summary>Bytes of a unit and its name, chosen so that the largest value has one to four digits before the point.</summary>
    public static (double Scale, string Unit) For(long largest)
    {
        string text = SizeText.Bytes(largest);
        string unit = text[(text.IndexOf(' ', StringComparison.Ordinal) + 1)..];
        double scale = unit switch { "KiB" => 1L << 10, "MiB" => 1L << 20, "GiB" => 1L << 30, "TiB" => 1L << 40, "PiB" => 1L << 50, "EiB" => 1L << 60, _ => 1 };
        return (scale, unit == "B" ? "bytes" : unit);
    }
}
