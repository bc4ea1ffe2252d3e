using ScottPlot;
using ScottPlot.Plottables;
using Tallybound.Reports.Charts.Frame;
using Xunit;

namespace Tallybound.Tests.Reports.Charts;

/// <summary>Contrast of the pictures' colours (W3C, Web Content Accessibility Guidelines 2.2, contrast ratio; 1.4.3 text, 1.4.11 graphics).</summary>
public sealed class ToneTests
{
    public static TheoryData<string> Families => [.. Enum.GetNames<CodeFamily>()];

    public static TheoryData<string> FamiliesWithTables => [.. Enum.GetNames<CodeFamily>().Where(name => name != nameof(CodeFamily.Raw))];

    [Theory]
    [MemberData(nameof(Families))]
    public void A_bar_or_line_stands_out_from_the_ground(string family) => Assert.True(Contrast(Tones.Full(Enum.Parse<CodeFamily>(family)), Tones.Ground) >= 3);

    /// <summary>Today's size, in grey, has no table; framing is told apart by its strokes.</summary>
    [Theory]
    [MemberData(nameof(FamiliesWithTables))]
    public void In_grey_a_table_is_told_from_its_payload(string family) => Assert.True(Contrast(Tones.Full(Enum.Parse<CodeFamily>(family)), Tones.Light(Enum.Parse<CodeFamily>(family))) >= 3);

    [Fact]
    public void Text_is_readable_on_the_ground()
    {
        Assert.True(Contrast(Tones.Dark, Tones.Ground) >= 7);
        Assert.True(Contrast(Tones.Soft, Tones.Ground) >= 4.5);
        foreach (CodeFamily family in (ReadOnlySpan<CodeFamily>)[CodeFamily.Huffman, CodeFamily.Context]) Assert.True(Contrast(Tones.Full(family), Tones.Ground) >= 4.5, family.ToString());
    }

    [Fact]
    public void Printed_in_grey_no_two_lines_of_a_picture_look_alike()
    {
        int compared = 0;
        foreach ((string stem, Picture picture) in SamplePictures.All().Where(entry => entry.Picture.Slug is "order-curve" or "segments" or "code-lengths"))
        {
            List<(string Look, double Luminance)> lines = [.. picture.Plot.GetPlottables().Select(Look).OfType<(string, double)>()];
            for (int i = 0; i < lines.Count; i++)
                for (int j = i + 1; j < lines.Count; j++)
                {
                    compared++;
                    Assert.True(lines[i].Look != lines[j].Look || Ratio(lines[i].Luminance, lines[j].Luminance) is >= 3 or 1, $"{stem} {picture.Slug}: two lines look like {lines[i].Look}");
                }
        }
        Assert.True(compared >= 30);
    }

    /// <summary>Pattern and width of a line; null for what is no line.</summary>
    private static (string, double)? Look(IPlottable plottable) => plottable switch
    {
        Scatter line => ($"solid {line.LineWidth}", Luminance(line.LineColor)),
        BrokenLine line => ($"dashes of {line.Dash}", Luminance(line.Color)),
        _ => null,
    };

    private static double Contrast(Color a, Color b) => Ratio(Luminance(a), Luminance(b));

    private static double Ratio(double a, double b) => (Math.Max(a, b) + 0.05) / (Math.Min(a, b) + 0.05);

    private static double Luminance(Color color) => 0.2126 * Linear(color.R) + 0.7152 * Linear(color.G) + 0.0722 * Linear(color.B);

    private static double Linear(byte channel)
    {
        double value = channel / 255.0;
        return value <= 0.04045 ? value / 12.92 : Math.Pow((value + 0.055) / 1.055, 2.4);
    }
}
