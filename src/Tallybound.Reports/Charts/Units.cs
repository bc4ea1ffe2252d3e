using Tallybound.Profiling.Records;

namespace Tallybound.Reports.Charts;

/// <summary>The words for the unit of a rate.</summary>
internal static class Units
{
    /// <summary><c>bit/byte</c> where a symbol is a byte, else <c>bit/symbol</c>.</summary>
    public static string OfSymbol(ViewProfile view) => view.View == "bytes" ? "bit/byte" : "bit/symbol";
}
