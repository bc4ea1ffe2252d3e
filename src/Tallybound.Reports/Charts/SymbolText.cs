using System.Globalization;
using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Charts;

/// <summary>How a symbol is written: bytes in hexadecimal with the ASCII character they stand for, bits as a digit.</summary>
internal static class SymbolText
{
    /// <summary>The symbol in words, such as <c>0x41 'A'</c>.</summary>
    public static string Of(ViewProfile view, int symbol) => view.AlphabetSize switch
    {
        2 => symbol.ToString(CultureInfo.InvariantCulture),
        16 => "0x" + symbol.ToString("x1", CultureInfo.InvariantCulture),
        256 => "0x" + symbol.ToString("x2", CultureInfo.InvariantCulture) + (symbol is > 32 and < 127 ? $" '{(char)symbol}'" : symbol == 32 ? " space" : ""),
        65536 => "0x" + symbol.ToString("x4", CultureInfo.InvariantCulture),
        _ => symbol.ToString(CultureInfo.InvariantCulture),
    };
}
