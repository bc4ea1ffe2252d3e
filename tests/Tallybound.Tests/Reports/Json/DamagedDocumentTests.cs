using System.Text;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Json;
using Xunit;

namespace Tallybound.Tests.Reports.Json;

public sealed class DamagedDocumentTests : IDisposable
{
    private readonly WrittenRun run;

    public DamagedDocumentTests()
    {
        var records = new GeneratedRecords(21);
        SourceProfile[] generated = [.. Enumerable.Range(0, 60).Select(records.Source)];
        // Small, since it is read once for each of its bytes: the shortest record that was read, and one that was not.
        run = new WrittenRun([generated.Where(source => source.Views is not null).MinBy(source => RecordJson.ToUtf8(source).Length)!, generated.First(source => source.Views is null)], records);
    }

    public void Dispose() => run.Dispose();

    private RunDocumentException Refused(byte[] document, int block = 4096)
    {
        File.WriteAllBytes(run.Document, document);
        RunDocumentException refused = Assert.Throws<RunDocumentException>(() => RunDocument.Read(run.Document, block));
        Assert.StartsWith(run.Document, refused.Message, StringComparison.Ordinal);
        Assert.Contains("; ", refused.Message, StringComparison.Ordinal);
        return refused;
    }

    [Fact]
    public void A_document_cut_at_any_byte_is_refused_as_cut_off()
    {
        byte[] whole = File.ReadAllBytes(run.Document);
        int cuts = 0;
        // The last byte is the line feed behind the document, which may be missing.
        for (int length = 0; length < whole.Length - 1; length++)
        {
            Assert.Contains("is cut off", Refused(whole[..length], block: length % 3 == 0 ? 1 : 997).Message, StringComparison.Ordinal);
            cuts++;
        }
        Assert.InRange(cuts, 1500, int.MaxValue);
        File.WriteAllBytes(run.Document, whole[..^1]);
        Assert.NotNull(RunDocument.Read(run.Document));
    }

    [Fact]
    public void A_byte_changed_anywhere_gives_a_report_or_a_refusal_and_nothing_else()
    {
        byte[] whole = File.ReadAllBytes(run.Document);
        int refused = 0;
        int tried = 0;
        for (int place = 0; place < whole.Length; place += 2, tried++)
        {
            byte[] changed = [.. whole];
            changed[place] = (byte)"\0\"{]x,\u00ff"u8[tried % 7];
            File.WriteAllBytes(run.Document, changed);
            try
            {
                RunDocument.Read(run.Document, 512);
            }
            catch (RunDocumentException)
            {
                refused++;
            }
        }
        Assert.InRange(refused, tried / 2, tried);
    }

    /// <summary>What is changed, into what, and what the refusal must say.</summary>
    public static TheoryData<string, string, string> Changes => new()
    {
        { "tallybound/profile/1", "tallybound/profile/2", "is of schema 'tallybound/profile/2', and this program reads tallybound/profile/1" },
        { "\"schema\"", "\"shema\"", "names no schema" },
        { "\"tool\":", "\"tol\":", "holds no tool" },
        { "\"run\":", "\"runs\":", "holds no run" },
        { "\"corpus\":", "\"body\":", "holds no corpus" },
        { "\"sources\":[{", "\"wells\":[{", "holds no sources" },
        { "\"findings\":", "\"corpus\":", "holds corpus twice" },
        { "\"sources\":[{", "\"sources\":[null,{", "source 1" },
        { "\"sources\":[{", "\"sources\":[7,{", "source 1" },
        { "\"sources\":[{", "\"sources\":[{\"name\":\"x\"},{", "source 1" },
        { "\"sources\":[{", "\"sources\":[{\"views\":[null]},{", "a list holds null" },
        { "\"sources\":[{\"name\":\"", "\"sources\":[{\"bytes\":-4,\"kind\":\"file\",\"status\":\"profiled\",\"name\":\"x\"},{\"name\":\"", "bytes is below 0" },
        { "\"sources\":[{\"name\":\"", "\"sources\":[{\"name\":null,\"kind\":\"file\",\"status\":\"failed\"},{\"name\":\"", "source 1, name," },
        { "\"sources\":[{\"name\":\"", "\"sources\":[{\"name\":\"x\",\"kind\":\"barrel\",\"status\":\"failed\"},{\"name\":\"", "source 1, kind," },
        { "\"sources\":[", "\"sources\":{},\"rest\":[", "sources before byte" },
        { "\"complete\":", "\"Complete\":", "run before byte" },
        { "\"architecture\":\"x64\",", "", "run, machine," },
        { "\"version\":", "\"versions\":", "tool before byte" },
        { "{\"schema\"", "[{\"schema\"", "does not begin with an object" },
        { "}]}\n", "}]}\n{}", "is not JSON" },
        { "}]}\n", "}],}\n", "is not JSON" },
    };

    [Theory]
    [MemberData(nameof(Changes))]
    public void A_document_that_is_not_of_the_schema_is_refused_by_what_is_wrong_and_where(string from, string to, string says)
    {
        string text = File.ReadAllText(run.Document);
        int place = text.IndexOf(from, StringComparison.Ordinal);
        Assert.True(place >= 0);
        Assert.Contains(says, Refused(Encoding.UTF8.GetBytes(text[..place] + to + text[(place + from.Length)..])).Message, StringComparison.Ordinal);
    }

    /// <summary>What is changed in the record of a view with counts, and what the refusal must say.</summary>
    public static TheoryData<Func<ViewProfile, ViewProfile>, string> Shapes => new()
    {
        { view => view with { SymbolCounts = SymbolSeries.FromDense(new long[5]) }, "symbolCounts holds symbols outside" },
        { view => view with { CodeLengths = SymbolSeries.FromPairs([[3, 1], [4, 1]]) }, "codeLengths holds symbols outside" },
        { view => view with { PairCounts = new Dictionary<string, IReadOnlyList<long[]>> { ["4"] = [[0, 1]] } }, "pairCounts holds no pairs" },
        { view => view with { PairCounts = new Dictionary<string, IReadOnlyList<long[]>> { ["1"] = [[0, 1], [-1, 1]] } }, "pairCounts holds no pairs" },
        { view => view with { PairCounts = new Dictionary<string, IReadOnlyList<long[]>> { ["1"] = [[0, 1, 2]] } }, "pairCounts holds no pairs" },
        { view => view with { PairCounts = new Dictionary<string, IReadOnlyList<long[]>> { ["a"] = [[0, 1]] } }, "pairCounts holds no pairs" },
        { view => view with { Segments = new SegmentSeries { SegmentBytes = 4096, OwnTableBits = [1, 2], SourceTableBits = [1, 2], PreviousTableBits = [1, 2], DivergenceBits = [0] } }, "differ in length" },
        {
            view => view with { TableBlocks = [new TableBlockPrice { BlockBytes = 1, Exact = false, PayloadBits = 1, TableBits = 1, FramingBits = 1, TotalBits = 3, TotalBitsInterval = [1] }] },
            "totalBitsInterval holds no pair"
        },
    };

    [Theory]
    [MemberData(nameof(Shapes), DisableDiscoveryEnumeration = true)]
    public void A_record_that_a_drawing_would_stumble_over_is_refused(Func<ViewProfile, ViewProfile> change, string says)
    {
        var view = new ViewProfile { View = "bits", AlphabetSize = 4, Symbols = 4, SymbolsInUse = 4, SideBits = 0, RawBits = 8, StoredTotalBits = 32, Orders = [], Codes = [], SymbolBlocks = [] };
        var good = new SourceProfile { Name = "x", Kind = SourceProfileKind.File, Status = SourceStatus.Profiled, Bytes = 1, Views = [view] };
        Assert.Null(RecordShape.Fault(good));
        Assert.Contains(says, RecordShape.Fault(good with { Views = [change(view)] }), StringComparison.Ordinal);
    }

    [Theory]
    [InlineData("[[1,2,3]]")]
    [InlineData("[[1]]")]
    [InlineData("[[1,2],3]")]
    [InlineData("[1,\"2\"]")]
    [InlineData("[1.5]")]
    [InlineData("{}")]
    [InlineData("[[[1,2]]]")]
    public void A_series_is_numbers_or_pairs_of_them(string series) =>
        Assert.Throws<System.Text.Json.JsonException>(() => System.Text.Json.JsonSerializer.Deserialize(series, RecordJson.Default.SymbolSeries));

    [Fact]
    public void A_document_that_is_not_there_or_is_a_folder_is_refused()
    {
        string folder = Path.GetDirectoryName(run.Document)!;
        Assert.Contains("is not there", Assert.Throws<RunDocumentException>(() => RunDocument.Read(Path.Combine(folder, "none"))).Message, StringComparison.Ordinal);
        Assert.Contains("is not there", Assert.Throws<RunDocumentException>(() => RunDocument.Read(Path.Combine(folder, "none", "none"))).Message, StringComparison.Ordinal);
        Assert.Contains("cannot be opened", Assert.Throws<RunDocumentException>(() => RunDocument.Read(folder)).Message, StringComparison.Ordinal);
    }

    [Fact]
    public void A_value_deeper_than_any_record_is_refused()
    {
        string deep = new string('[', 70) + new string(']', 70);
        Assert.Contains("is not JSON", Refused(Encoding.UTF8.GetBytes($"{{\"other\":{deep}}}")).Message, StringComparison.Ordinal);
    }
}
