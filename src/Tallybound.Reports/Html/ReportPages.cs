using Tallybound.Reports.Json;
using Tallybound.Reports.Run;

namespace Tallybound.Reports.Html;

/// <summary>Draws a report's pages.</summary>
internal static class ReportPages
{
    /// <summary>Writes <c>index.html</c>.</summary>
    /// <param name="folder">The run folder.</param>
    /// <param name="content">What is drawn.</param>
    /// <param name="pictures">Which pictures are written as files; the index page has none.</param>
    /// <exception cref="IOException">A file cannot be written.</exception>
    public static void Draw(string folder, ReportContent content, PictureChoice pictures) =>
        IndexPage.Write(Path.Combine(folder, RunReport.PageName), content);
}
