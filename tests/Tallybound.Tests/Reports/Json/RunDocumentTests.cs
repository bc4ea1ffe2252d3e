using System.Text.Json;
using System.Text.Json.Nodes;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Json;
using Xunit;

namespace Tallybound.Tests.Reports.Json;

public sealed class RunDocumentTests
{
    private static WrittenRun Generated(int seed, int sources)
    {
        var records = new GeneratedRecords(seed);
        return new WrittenRun([.. Enumerable.Range(0, sources).Select(records.Source)], records);
    }

    private static string Text<T>(T value) => JsonSerializer.Serialize(value, typeof(T), RecordJson.Default);

    private static IEnumerable<string> Names(IEnumerable<SourceSummary> lines) => lines.Select(line => line.Name);

    private static string With(WrittenRun run, Action<JsonObject> change)
    {
        JsonObject root = JsonNode.Parse(File.ReadAllText(run.Document))!.AsObject();
        change(root);
        File.WriteAllText(run.Document, root.ToJsonString());
        return run.Document;
    }

    [Fact]
    public void What_was_written_is_read_back_whatever_the_size_of_a_block()
    {
        int documents = 0;
        foreach (int seed in Enumerable.Range(1, 12))
        {
            using WrittenRun run = Generated(seed, sources: 3 * seed);
            foreach (int block in (int[])[1, 7, 64, 4093, 1 << 20])
            {
                ReportContent content = RunDocument.Read(run.Document, block);
                Assert.Equal(Text(run.Result.Run), Text(content.Run));
                Assert.Equal(Text(run.Result.Corpus), Text(content.Corpus));
                Assert.Equal(ProfileDocument.ToolVersion, content.ToolVersion);
                // The ledger drops the counts from a record, and the document has them again for the drawn ones.
                IReadOnlyList<int> heaviest = run.Ledger.HeaviestIds(200);
                Assert.Equal(Enumerable.Range(1, heaviest.Count), content.Drawn.Select(drawn => drawn.Number));
                for (int rank = 0; rank < heaviest.Count; rank++)
                {
                    SourceProfile expected = run.Ledger.Drawing(heaviest[rank])!.AddTo(run.Sources[heaviest[rank]], rank < 10);
                    Assert.Equal(Text(expected), Text(content.Drawn[rank].Profile));
                    Assert.Equal(expected.Views!.Any(view => view.PairCounts is not null), content.Drawn[rank].HasPairs);
                }
                Assert.Equal(run.Ledger.Heaviest(10_000), content.Listed);
                Assert.Equal(run.Ledger.Failures(200), content.Failures);
                Assert.Equal(run.Ledger.WithStatus(SourceStatus.Skipped, 200), content.Skipped);
                documents++;
            }
        }
        Assert.Equal(60, documents);
    }

    [Fact]
    public void Of_many_sources_only_what_a_report_shows_is_kept()
    {
        var records = new GeneratedRecords(99);
        using var run = new WrittenRun([.. Enumerable.Range(0, 10_500).Select(number => records.Source(number) with { Bytes = number % 7, Views = records.Source(number).Views ?? [] })], records);
        ReportContent content = RunDocument.Read(run.Document);
        SourceProfile[] read = [.. run.Sources.Where(source => source.Views!.Count > 0).OrderByDescending(source => source.Bytes)];
        Assert.Equal(read.Take(200).Select(source => source.Name), content.Drawn.Select(drawn => drawn.Profile.Name));
        Assert.Equal(read.Take(10_000).Select(source => source.Name), Names(content.Listed));
        Assert.Equal(200, content.Failures.Count);
        Assert.Equal(200, content.Skipped.Count);
        Assert.Equal(run.Sources.Where(source => source.Status is SourceStatus.Failed or SourceStatus.Partial).Take(200).Select(source => source.Name), Names(content.Failures));
    }

    [Fact]
    public void Members_may_stand_in_any_order_and_others_may_stand_among_them()
    {
        using WrittenRun run = Generated(3, sources: 9);
        string usual = Text(RunDocument.Read(run.Document).Listed.Count);
        string[] names = Names(RunDocument.Read(run.Document).Listed).ToArray();
        string path = With(run, root =>
        {
            KeyValuePair<string, JsonNode?>[] members = [.. root];
            root.Clear();
            root["later"] = JsonNode.Parse("""{"deep":[[{"a":null}],"\u00e9",1e3],"sources":[1]}""");
            foreach ((string name, JsonNode? value) in members.Reverse()) root[name] = value;
            root["last"] = null;
            root["sources"]![0]!["unheardOf"] = new JsonObject { ["list"] = new JsonArray(1, 2) };
        });
        ReportContent content = RunDocument.Read(path);
        Assert.Equal(usual, Text(content.Listed.Count));
        Assert.Equal(names, Names(content.Listed));
        Assert.Equal(Text(run.Result.Corpus), Text(content.Corpus));
    }

    [Fact]
    public void Findings_are_read_and_may_be_missing()
    {
        using WrittenRun run = Generated(4, sources: 2);
        Assert.Equal(Text(run.Result.Findings), Text(RunDocument.Read(run.Document).Findings));
        Assert.Single(run.Result.Findings);
        Assert.Empty(RunDocument.Read(With(run, root => root.Remove("findings"))).Findings);
    }

    [Fact]
    public void A_mark_that_editors_put_before_the_text_is_passed_over()
    {
        using WrittenRun run = Generated(5, sources: 2);
        byte[] bytes = File.ReadAllBytes(run.Document);
        File.WriteAllBytes(run.Document, [0xEF, 0xBB, 0xBF, .. bytes]);
        Assert.Equal(2, RunDocument.Read(run.Document, 1).Listed.Count + RunDocument.Read(run.Document).Failures.Count(line => line.Bytes is null) + RunDocument.Read(run.Document).Skipped.Count);
    }
}
