using System.Text.RegularExpressions;
using System.Xml.Linq;
using Tallybound.Reports.Charts.Frame;
using Xunit;

namespace Tallybound.Tests.Reports.Charts;

/// <summary>Laws that every picture keeps, tried on all pictures of the sample report.</summary>
public sealed class PictureLawTests
{
    private const int PicturesInSample = 90;

    [Fact]
    public void No_text_is_cut_off_and_no_two_texts_touch()
    {
        var faults = new List<string>();
        int pictures = 0;
        foreach ((string stem, Picture picture) in SamplePictures.All())
        {
            pictures++;
            List<DrawnText> texts = DrawnTexts.Of(picture.ToSvg("t-"));
            Assert.NotEmpty(texts);
            foreach (DrawnText text in texts)
                if (text.Left < 0 || text.Top < 0 || text.Right > picture.Width || text.Bottom > picture.Height) faults.Add($"{stem} {picture.Slug}: “{text.Text}” leaves the picture");
            for (int i = 0; i < texts.Count; i++)
                for (int j = i + 1; j < texts.Count; j++)
                    if (texts[i].Touches(texts[j])) faults.Add($"{stem} {picture.Slug}: “{texts[i].Text}” and “{texts[j].Text}” touch");
        }
        Assert.True(faults.Count == 0, string.Join('\n', faults));
        Assert.True(pictures >= PicturesInSample, $"only {pictures} pictures");
    }

    [Fact]
    public void Every_picture_says_in_numbers_what_it_shows()
    {
        int pictures = 0;
        foreach ((string stem, Picture picture) in SamplePictures.All())
        {
            pictures++;
            Assert.True(picture.Alternative.Any(char.IsAsciiDigit), $"{stem} {picture.Slug}");
            Assert.StartsWith(picture.Title.TrimEnd('.'), picture.Alternative, StringComparison.Ordinal);
            Assert.False(picture.Title.Contains("NaN", StringComparison.Ordinal) || picture.Alternative.Contains("NaN", StringComparison.Ordinal), picture.Alternative);
        }
        Assert.True(pictures >= PicturesInSample, $"only {pictures} pictures");
    }

    [Fact]
    public void Titles_and_labels_hold_only_letters_that_the_font_has()
    {
        int texts = 0;
        foreach ((string stem, Picture picture) in SamplePictures.All())
            foreach (DrawnText text in DrawnTexts.Of(picture.ToSvg("t-")))
            {
                texts++;
                Assert.True(PictureText.Shown(text.Text) == text.Text, $"{stem} {picture.Slug}: {text.Text}");
            }
        Assert.True(texts > 10 * PicturesInSample);
    }

    [Fact]
    public void The_same_record_gives_the_same_bytes_on_any_thread()
    {
        string[] Drawn() => [.. SamplePictures.All().Take(12).Select(entry => entry.Picture.ToSvg("t-") + Convert.ToHexString(System.Security.Cryptography.SHA256.HashData(entry.Picture.ToPng())))];
        string[] alone = Drawn();
        string[][] together = new string[2][];
        Parallel.For(0, 2, run => together[run] = Drawn());
        Assert.Equal(12, alone.Length);
        Assert.Equal(alone, together[0]);
        Assert.Equal(alone, together[1]);
    }

    /// <summary>The committed pictures are the golden ones.</summary>
    [Theory]
    [InlineData("corpus", "sizes")]
    [InlineData("corpus", "order-multiples")]
    [InlineData("0001", "order-curve")]
    [InlineData("0001", "block-size")]
    [InlineData("0002", "pair-map")]
    public void A_picture_is_the_golden_one_byte_for_byte(string stem, string slug)
    {
        Picture picture = SamplePictures.All().First(entry => entry.Stem == stem && entry.Picture.Slug == slug).Picture;
        string golden = Assert.Single(Directory.GetFiles(Path.Combine(SamplePictures.Folder, "charts"), $"{stem}*-{slug}.png"));
        Assert.True(File.ReadAllBytes(golden).AsSpan().SequenceEqual(picture.ToPng()), $"{golden} is not what is drawn now; make the sample anew as DEVELOPERS.md says");
    }

    [Fact]
    public void Ids_in_a_page_s_picture_begin_with_its_prefix_and_are_all_that_it_refers_to()
    {
        int references = 0;
        foreach ((string stem, Picture picture) in SamplePictures.All().Take(30))
        {
            XElement svg = XElement.Parse(picture.ToSvg("part-3-"));
            HashSet<string> ids = [.. svg.Descendants().Attributes("id").Select(id => id.Value)];
            Assert.All(ids, id => Assert.StartsWith("part-3-", id, StringComparison.Ordinal));
            foreach (Match reference in Regex.Matches(svg.ToString(), @"url\(#(?<id>[^)]+)\)", RegexOptions.ExplicitCapture, TimeSpan.FromSeconds(1)))
            {
                references++;
                Assert.True(ids.Contains(reference.Groups["id"].Value), $"{stem} {picture.Slug}");
            }
            Assert.Empty(svg.DescendantsAndSelf().Attributes("style"));
        }
        Assert.True(references > 30);
    }
}
