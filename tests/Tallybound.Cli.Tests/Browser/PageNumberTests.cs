using System.Text.Json;
using Tallybound.Cli.Tests.Browser.Numbers;

namespace Tallybound.Cli.Tests.Browser;

/// <summary>Every number on a page comes from the record.</summary>
public sealed class PageNumberTests(Chromium chromium, HardRuns runs) : IDisposable
{
    /// <summary>Numbers that each first page of a run with bytes marks at least.</summary>
    private const int MarkedOnIndex = 20;

    /// <summary>Numbers that each page of a source with bytes marks at least.</summary>
    private const int MarkedOnSourcePage = 20;

    private const string Record = """
        { "corpus": { "bytes": 6707748, "totals": { "huffman": 4621112 }, "bounds": { "order0BoundBits": 36501097 } },
          "sources": [ { "bytes": 3, "views": [ { "rate": 4.623252399, "efficiency": 0.77054, "tableBits": 12, "codes": [ { "payloadBits": 5 } ], "blocks": [ 7, 8, 9 ], "word": "x", "lossBits": -15760 } ] } ] }
        """;

    private readonly FreshFolder folder = new();

    public static TheoryData<string> Runs => HardRuns.Names;

    public void Dispose() => folder.Dispose();

    [Theory]
    [MemberData(nameof(Runs))]
    public async Task Every_marked_number_is_the_record_s(string name)
    {
        ReportRun run = runs.Of(name);
        await Faults.NoneAsync(chromium, run.Pages, [new PageView()], async page =>
        {
            (IReadOnlyList<string> faults, int marked) = await PageNumbers.CompareAsync(page, run.Record);
            int least = run.Bytes == 0 || (await page.AskAsync<string>("() => document.body.textContent")).Contains("nothing to say of sizes", StringComparison.Ordinal) ? 0 : page.File == run.Index ? MarkedOnIndex : MarkedOnSourcePage;
            return marked >= least ? faults : [.. faults, $"only {marked} numbers are marked"];
        });
    }

    [Theory]
    [InlineData("/corpus/bytes", "bytes", "6,707,748", null)]
    [InlineData("/corpus/bytes", "bytes", "6.40 MiB", "6,707,748 bytes")]
    [InlineData("/corpus/bounds/order0BoundBits", "bytes", "4,562,638", null)]
    [InlineData("/corpus/bounds/order0BoundBits", "bits", "36,501,097", null)]
    [InlineData("/corpus/totals/huffman", "bits", "36,968,896", null)]
    [InlineData("/corpus/totals/huffman over /corpus/bytes", "bit/byte", "5.5114", null)]
    [InlineData("/corpus/totals/huffman over /corpus/bytes", "% saved", "31.1 %", null)]
    [InlineData("/corpus/bytes over /corpus/totals/huffman", "×", "1.45×", null)]
    [InlineData("/corpus/bytes over /corpus/bounds/order0BoundBits", "×", "1.47 ×", null)]
    [InlineData("/sources/0/views/0/rate", "bit/symbol", "about 4.6233", null)]
    [InlineData("/sources/0/views/0/rate", "bit/symbol", "4.6233 bit/symbol", "4.623252")]
    [InlineData("/sources/0/views/0/efficiency", "%", "77.05 %", null)]
    [InlineData("/sources/0/views/0/tableBits + /sources/0/views/0/codes/0/payloadBits", "bytes", "3", null)]
    [InlineData("/sources/0/views/0/tableBits - /sources/0/views/0/codes/0/payloadBits", "bits", "7", null)]
    [InlineData("#/sources/0/views/0/blocks", "count", "3", null)]
    [InlineData("/sources/0/views/0/blocks/2", "count", "9", "nine")]
    [InlineData("sum:/sources/0/views/0/blocks", "count", "24", null)]
    [InlineData("max:/sources/0/views/0/blocks - min:/sources/0/views/0/blocks", "count", "2", null)]
    [InlineData("/sources/0/views/0/blocks/0 over sum:/sources/0/views/0/blocks", "%", "29.2", null)]
    [InlineData("sum:/sources/0/views/0/blocks over /sources/0/bytes", "log2", "3.0000", null)]
    [InlineData("/sources/0/views/0/lossBits", "bits", "−15,760", null)]
    public async Task A_number_that_is_the_record_s_passes(string record, string unit, string text, string? title) =>
        Assert.Empty(await FaultsAsync(record, unit, text, title));

    [Theory]
    [InlineData("/corpus/bytes", "bytes", "6,707,749", null)]
    [InlineData("/corpus/bytes", "bytes", "6.41 MiB", null)]
    [InlineData("/corpus/bytes", "bytes", "6.40 MiB", "6,707,747 bytes")]
    [InlineData("/corpus/bytes", "bytes", "6.40 MB", null)]
    [InlineData("/corpus/bytes", "bytes", "67,07,748", null)]
    [InlineData("/corpus/bytes", "bytes", "", null)]
    [InlineData("/corpus/bytes", "octets", "6,707,748", null)]
    [InlineData("/corpus/bytes", "count", "6,707,748 bytes", null)]
    [InlineData("/corpus/bounds/order0BoundBits", "bytes", "4,562,637", null)]
    [InlineData("/corpus/totals/huffman over /corpus/bytes", "bit/byte", "5.5113", null)]
    [InlineData("/corpus/totals/huffman over /corpus/bytes", "% saved", "31.0 %", null)]
    [InlineData("/corpus/totals/tans", "bytes", "1", null)]
    [InlineData("/sources/1/bytes", "bytes", "3", null)]
    [InlineData("/sources/0/views/0/word", "count", "3", null)]
    [InlineData("/sources/0/views/0/lossBits", "bits", "15,760", null)]
    [InlineData("corpus.bytes", "bytes", "6,707,748", null)]
    [InlineData("sum:/sources/0/views/0/blocks", "count", "23", null)]
    [InlineData("sum:/sources/0/bytes", "count", "3", null)]
    [InlineData("mean:/sources/0/views/0/blocks", "count", "8", null)]
    public async Task A_number_that_is_not_the_record_s_is_found(string record, string unit, string text, string? title) =>
        Assert.NotEmpty(await FaultsAsync(record, unit, text, title));

    [Theory]
    [InlineData("6.40 MiB", "6,707,748 bytes", true)]
    [InlineData("6,707,748", "6,707,748 bytes", true)]
    [InlineData("6.40 MiB", "6,800,000 bytes", false)]
    [InlineData("6.40 MiB", "some bytes", false)]
    [InlineData("much", "6,707,748 bytes", false)]
    public async Task A_title_in_bytes_is_the_exact_number_of_its_cell(string text, string title, bool good)
    {
        await using OpenPage page = await OpenAsync($"<td title=\"{title}\">{text}</td>");
        (IReadOnlyList<string> faults, int marked) = await PageNumbers.CompareAsync(page, Parsed());
        Assert.Equal((good, 0), (faults.Count == 0, marked));
    }

    /// <summary>Bytes of the source that a page is about, found by its heading.</summary>
    private static async Task<long> BytesAsync(OpenPage page, ReportRun run)
    {
        string heading = await page.AskAsync<string>("() => document.querySelector('h1').textContent.trim()");
        JsonElement source = run.Record.GetProperty("sources").EnumerateArray().Single(each => HostileNames.Shown(each.GetProperty("name").GetString()!).Trim() == heading);
        return source.GetProperty("bytes").GetInt64();
    }

    private async Task<IReadOnlyList<string>> FaultsAsync(string record, string unit, string text, string? title)
    {
        await using OpenPage page = await OpenAsync($"<td data-record=\"{record}\" data-unit=\"{unit}\"{(title is null ? "" : $" title=\"{title}\"")}>{text}</td>");
        (IReadOnlyList<string> faults, int marked) = await PageNumbers.CompareAsync(page, Parsed());
        Assert.Equal(1, marked);
        return faults;
    }

    private static JsonElement Parsed() => JsonSerializer.Deserialize<JsonElement>(Record);

    private Task<OpenPage> OpenAsync(string cell) => MadePage.OpenAsync(chromium, folder, $"<table><tr>{cell}</tr></table>");
}
