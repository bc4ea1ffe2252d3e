namespace Tallybound.Cli.Tests.Browser.Checks;

/// <summary>Shortens long tables before checks that look at every element and would look at the same row thousands of times.</summary>
internal static class Rows
{
    /// <summary>A function of the most rows that each body of a table keeps; it answers how many rows went.</summary>
    public const string Trim = """
        most => {
          let gone = 0;
          for (const body of document.querySelectorAll('tbody')) for (const row of [...body.rows].slice(most)) { row.remove(); gone++; }
          return gone;
        }
        """;
}
