using ScottPlot;
using ScottPlot.Plottables;
using Tallybound.Profiling.Records;
using Tallybound.Reports.Charts;
using Tallybound.Reports.Charts.Frame;
using Xunit;

namespace Tallybound.Tests.Reports.Charts;

/// <summary>Charts draw the figures of the record: looked up in the plot, not in its pixels.</summary>
public sealed class DrawnValueTests
{
    private const double Close = 1e-9;

    private static SourceProfile Source { get; } = SamplePictures.Content.Drawn[0].Profile;

    private static ViewProfile View { get; } = Source.Views![0];

    [Fact]
    public void Rates_are_stacks_of_payload_table_and_framing_a_symbol()
    {
        List<Bar> bars = Bars(RatesChart.Of(View));
        CodePrice[] drawn = [.. View.Codes.Where(code => code is { TotalBits: not null } && code.LimitCostBits != 0)];
        Assert.True(drawn.Length >= 6);
        foreach (CodePrice code in drawn)
        {
            double payload = (double)code.PayloadBits!.Value / View.Symbols, total = (double)code.TotalBits!.Value / View.Symbols;
            List<Bar> stack = bars.Where(bar => bar.ValueBase == 0 && Math.Abs(bar.Value - payload) < Close).SelectMany(first => bars.Where(bar => bar.Position == first.Position)).ToList();
            Assert.Contains(stack, bar => Math.Abs(bar.Value - total) < Close);
        }
        Assert.All(bars.GroupBy(bar => bar.Position), row => Assert.Equal(0, row.Min(bar => bar.ValueBase)));
    }

    [Fact]
    public void The_order_curve_has_each_figure_at_its_order()
    {
        List<Coordinates> marks = Marks(OrderChart.Of(View));
        foreach (OrderProfile order in View.Orders)
        {
            Assert.Contains(marks, mark => mark.X == order.Order && mark.Y == order.AdaptiveBitsPerSymbol);
            Assert.Contains(marks, mark => mark.X == order.Order && mark.Y == order.HeldOutBitsPerSymbol);
            Assert.Contains(marks, mark => mark.X == order.Order && mark.Y == order.CorrectedBitsPerSymbol);
        }
    }

    [Fact]
    public void A_plug_in_figure_on_thin_counts_is_broken_and_hollow_and_others_are_not()
    {
        Assert.Contains(View.Orders, order => order.ThinMass > OrderChart.ThinFrom);
        Picture picture = OrderChart.Of(View).Picture!;
        OrderProfile thin = View.Orders.Single(order => order.ThinMass > OrderChart.ThinFrom);
        Assert.Contains(picture.Plot.GetPlottables<BrokenLine>(), line => line.Points[^1].Y == thin.EntropyBitsPerSymbol && line.Dash > 5);
        Assert.Contains(picture.Plot.GetPlottables<Marker>(), mark => mark.Location.Y == thin.EntropyBitsPerSymbol && mark.MarkerStyle.Shape == MarkerShape.OpenCircle);
        ViewProfile thick = View with { Orders = [.. View.Orders.Select(order => order with { ThinMass = 0 })] };
        Assert.DoesNotContain(OrderChart.Of(thick).Picture!.Plot.GetPlottables<BrokenLine>(), line => line.Dash > 5);
    }

    [Fact]
    public void Block_sizes_are_stacks_in_bits_a_byte()
    {
        List<Bar> bars = Bars(BlockSizeChart.Of(View, Source.Bytes!.Value));
        Assert.True(View.TableBlocks!.Count > 5);
        foreach (TableBlockPrice point in View.TableBlocks) Assert.Contains(bars, bar => Math.Abs(bar.Value - (double)point.TotalBits / Source.Bytes.Value) < Close);
    }

    [Fact]
    public void Symbol_blocks_are_stacks_of_payload_and_table()
    {
        List<Bar> bars = Bars(SymbolBlockChart.Of(View));
        foreach (SymbolBlockProfile block in View.SymbolBlocks) Assert.Contains(bars, bar => Math.Abs(bar.Value - (double)(block.Observed.PayloadBits + block.Observed.TableBits) / View.Symbols) < Close);
    }

    [Fact]
    public void The_histogram_has_the_share_of_each_symbol()
    {
        List<Bar> bars = Bars(HistogramChart.Of(View));
        Assert.Equal(View.SymbolsInUse, bars.Count);
        foreach (Bar bar in bars) Assert.Equal(100.0 * View.SymbolCounts!.Dense![(int)bar.Position] / View.Symbols, bar.Value, Close);
    }

    [Fact]
    public void The_staircase_of_code_lengths_holds_every_length()
    {
        Coordinates[] points = [.. CodeLengthChart.Of(View).Picture!.Plot.GetPlottables<Scatter>().SelectMany(line => line.Data.GetScatterPoints())];
        foreach (long length in View.CodeLengths!.Dense!.Where(length => length > 0).Distinct()) Assert.Contains(points, point => point.Y == length);
    }

    [Fact]
    public void The_pair_map_has_the_logarithm_of_each_count()
    {
        Heatmap map = Assert.Single(PairHeatMap.Of(View).Picture!.Plot.GetPlottables<Heatmap>());
        int cells = 0;
        foreach ((string before, IReadOnlyList<long[]> row) in View.PairCounts!)
            foreach (long[] pair in row)
            {
                cells++;
                Assert.Equal(Math.Log10(pair[1]), map.Intensities[int.Parse(before, System.Globalization.CultureInfo.InvariantCulture), pair[0]], Close);
            }
        Assert.Equal(cells, map.Intensities.Cast<double>().Count(value => !double.IsNaN(value)));
    }

    [Fact]
    public void Segments_are_drawn_where_they_lie()
    {
        Coordinates[] own = [.. Assert.Single(SegmentChart.Of(View, Source.Bytes!.Value).Picture!.Plot.GetPlottables<Scatter>()).Data.GetScatterPoints()];
        SegmentSeries segments = View.Segments!;
        Assert.Equal(segments.OwnTableBits.Count, own.Length);
        Assert.Equal((double)segments.OwnTableBits[1] / segments.SegmentBytes, own[1].Y, Close);
        Assert.Equal(1.5 * segments.SegmentBytes / (1 << 20), own[1].X, Close);
    }

    [Fact]
    public void Page_one_has_a_bar_for_each_total_and_the_bound_as_a_rule()
    {
        CorpusProfile corpus = SamplePictures.Content.Corpus;
        List<Bar> bars = Bars(CorpusSizesChart.Of(corpus));
        foreach ((string _, long bytes) in corpus.Totals) Assert.Contains(bars, bar => Math.Abs(bar.Value - bytes / (double)(1 << 20)) < Close);
        Assert.Contains("static order-0 bounds", CorpusSizesChart.Of(corpus).Picture!.Alternative, StringComparison.Ordinal);
    }

    [Fact]
    public void The_ranking_shows_each_source_as_it_stands_and_with_its_best_code()
    {
        List<Bar> bars = Bars(RankingChart.Of(SamplePictures.Content.Corpus, SamplePictures.Content.Listed));
        SourceSummary[] shown = [.. SamplePictures.Content.Listed.Where(source => source.Bytes > 0).Take(12)];
        Assert.Equal(2 * shown.Length, bars.Count);
        foreach (SourceSummary source in shown) Assert.Contains(bars, bar => Math.Abs(bar.Value - source.BestBytes!.Value / (double)(1 << 20)) < Close);
    }

    [Fact]
    public void Limits_that_cost_something_are_drawn_and_others_are_said()
    {
        ViewProfile costs = SamplePictures.Content.Drawn.Select(source => source.Profile.Views![0]).First(view => view.Codes.Any(code => code.LimitCostBits > 0));
        Assert.NotNull(LengthLimitChart.Of(costs).Picture);
        Chart free = LengthLimitChart.Of(View);
        Assert.Null(free.Picture);
        Assert.Contains("costs nothing", free.Sentence, StringComparison.Ordinal);
    }

    [Fact]
    public void A_chart_that_would_say_nothing_is_a_sentence()
    {
        ViewProfile none = View with { Symbols = 0, Orders = [], Codes = [], SymbolBlocks = [], Segments = null, TableBlocks = null, SymbolCounts = null, CodeLengths = null, PairCounts = null };
        Chart[] charts =
        [
            RatesChart.Of(none), OrderChart.Of(none), SymbolBlockChart.Of(none), BlockSizeChart.Of(none, 0), SegmentChart.Of(none, 0), CodeLengthChart.Of(none), HistogramChart.Of(none), PairHeatMap.Of(none),
            LengthLimitChart.Of(none), OrderMultiples.Of([Source]), RankingChart.Of(SamplePictures.Content.Corpus, [SamplePictures.Content.Listed[0]]), CorpusSizesChart.Of(SamplePictures.Content.Corpus with { Bytes = 0 }),
        ];
        Assert.All(charts, chart =>
        {
            Assert.Null(chart.Picture);
            Assert.EndsWith(".", chart.Sentence, StringComparison.Ordinal);
        });
    }

    [Fact]
    public void Beyond_the_ten_heaviest_no_pair_map_is_drawn()
    {
        Assert.True(SamplePictures.Content.Drawn.Count > 10);
        Assert.Equal(10, SamplePictures.All().Count(entry => entry.Picture.Slug == "pair-map"));
        Assert.All(SamplePictures.All().Where(entry => entry.Picture.Slug == "pair-map"), entry => Assert.True(string.CompareOrdinal(entry.Stem, "0010") <= 0));
    }

    private static List<Bar> Bars(Chart chart) => [.. chart.Picture!.Plot.GetPlottables<BarPlot>().SelectMany(plot => plot.Bars)];

    private static List<Coordinates> Marks(Chart chart) => [.. chart.Picture!.Plot.GetPlottables<Marker>().Select(mark => mark.Location)];
}
