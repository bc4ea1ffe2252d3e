using System.Text.RegularExpressions;
using System.Xml.Linq;
using Xunit;

namespace Tallybound.Tests.Repository;

/// <summary>Holds the layout against what the contributor guide says of it.</summary>
public sealed partial class HouseTests
{
    private static readonly string Guide = File.ReadAllText(Checkout.PathOf("DEVELOPERS.md"));

    /// <summary>Project → the projects of ours that the guide lets it use.</summary>
    private static Dictionary<string, string[]> Table()
    {
        var table = new Dictionary<string, string[]>(StringComparer.Ordinal);
        foreach (Match row in TableRow().Matches(Guide))
        {
            string uses = row.Groups["uses"].Value;
            table.Add(row.Groups["project"].Value, uses switch
            {
                "nothing of ours" => [],
                "the built program" => ["Tallybound.Cli"],
                _ => [.. uses.Split(", ").Select(name => "Tallybound." + name)],
            });
        }
        return table;
    }

    [Fact]
    public void Every_project_is_in_the_guide_and_uses_what_the_guide_lets_it_use()
    {
        Dictionary<string, string[]> table = Table();
        string[] projects = [.. Checkout.Files().Where(file => file.EndsWith(".csproj", StringComparison.Ordinal)).Select(file => Path.GetDirectoryName(file)!.Replace('\\', '/'))];
        Assert.Equal(projects.Order(StringComparer.Ordinal), table.Keys.Order(StringComparer.Ordinal));
        foreach (string project in projects)
        {
            string file = Checkout.PathOf(project, Path.GetFileName(project) + ".csproj");
            string[] uses = [.. XDocument.Load(file).Descendants("ProjectReference").Select(reference => Path.GetFileNameWithoutExtension(reference.Attribute("Include")!.Value.Replace('\\', '/')))];
            Assert.Equal((project, string.Join(' ', table[project].Order(StringComparer.Ordinal))), (project, string.Join(' ', uses.Order(StringComparer.Ordinal))));
        }
    }

    [Fact]
    public void The_solution_holds_every_project()
    {
        string solution = File.ReadAllText(Checkout.PathOf("Profiler.sln")).Replace('\\', '/');
        foreach (string project in Table().Keys) Assert.Contains($"{project}/{Path.GetFileName(project)}.csproj", solution, StringComparison.Ordinal);
    }

    [Fact]
    public void The_top_level_holds_what_the_guide_and_the_build_need_and_nothing_else()
    {
        string[] allowed = ["src", "tests", "corpora-demo", "reports", "README.md", "DEVELOPERS.md", "LICENSE", "Profiler.sln", "Directory.Build.props", "Directory.Packages.props", "global.json"];
        string[] found = [.. Checkout.Files().Select(file => file.Split('/')[0]).Distinct().Where(name => !name.StartsWith('.')).Except(allowed)];
        Assert.Empty(found);
    }

    [Fact]
    public void No_folder_is_a_drawer_for_everything()
    {
        string[] drawers = ["Common", "Core", "Shared", "Utils", "Helpers", "Util", "Misc"];
        string[] found = [.. Checkout.Files().Where(file => file.Split('/').SkipLast(1).Any(part => drawers.Contains(part) || drawers.Any(drawer => part.EndsWith("." + drawer, StringComparison.Ordinal))))];
        Assert.Empty(found);
    }

    [Fact]
    public void Every_family_of_vectors_says_where_it_is_from()
    {
        string[] families = [.. Directory.GetDirectories(Checkout.PathOf("tests", "vectors"))];
        Assert.NotEmpty(families);
        Assert.All(families, family => Assert.True(File.Exists(Path.Combine(family, "README.md")), $"{family} has no README.md."));
    }

    [Fact]
    public void Code_is_finished_and_files_hold_one_idea()
    {
        int files = 0;
        foreach (string file in Checkout.Files().Where(file => file.EndsWith(".cs", StringComparison.Ordinal) && file.StartsWith("src/", StringComparison.Ordinal)))
        {
            string text = File.ReadAllText(Checkout.PathOf(file));
            Assert.DoesNotContain("TO" + "DO", text, StringComparison.Ordinal);
            Assert.DoesNotContain("FIX" + "ME", text, StringComparison.Ordinal);
            Assert.DoesNotContain("NotImplemented" + "Exception", text, StringComparison.Ordinal);
            Assert.True(text.Count(each => each == '\n') <= 300, $"{file} has more than 300 lines.");
            files++;
        }
        Assert.True(files > 100);
    }

    [GeneratedRegex(@"^\| `(?<project>(src|tests)/[\w.]+)` \|.*\| (?<uses>[^|]+) \|$", RegexOptions.Multiline | RegexOptions.ExplicitCapture, matchTimeoutMilliseconds: 5000)]
    private static partial Regex TableRow();
}
