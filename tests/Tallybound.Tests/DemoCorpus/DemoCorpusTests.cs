using System.IO.Compression;
using System.Security.Cryptography;
using Tallybound.DemoCorpus;
using Tallybound.Tests.Repository;
using Xunit;

namespace Tallybound.Tests.DemoCorpus;

public sealed class DemoCorpusTests
{
    private static readonly Dictionary<string, byte[]> Made = Fleet.Files().ToDictionary(file => file.Name, file => file.Content, StringComparer.Ordinal);

    [Fact]
    public void The_committed_corpora_are_what_the_generator_makes()
    {
        string folder = Checkout.PathOf("corpora-demo");
        string[] committed = [.. Directory.EnumerateFiles(folder, "*", SearchOption.AllDirectories).Select(file => Path.GetRelativePath(folder, file).Replace('\\', '/')).Order(StringComparer.Ordinal)];
        Assert.Equal(Made.Keys.Order(StringComparer.Ordinal), committed);
        foreach ((string name, byte[] content) in Made)
            Assert.Equal((name, Convert.ToHexString(SHA256.HashData(content))), (name, Convert.ToHexString(SHA256.HashData(File.ReadAllBytes(Path.Combine(folder, name))))));
        Assert.InRange(Made.Values.Sum(content => content.Length), 4_000_000, 10_000_000);
    }

    [Fact]
    public void Four_states_are_exactly_equally_likely()
    {
        int[] counts = [.. Made["status/compressor-states.bin"].CountBy(state => state).Select(pair => pair.Value)];
        Assert.Equal([50_000, 50_000, 50_000, 50_000], counts);
    }

    [Fact]
    public void The_three_level_source_has_probabilities_that_are_powers_of_three()
    {
        byte[] content = Made["status/three-level-link.bin"];
        Assert.Equal((int)Math.Pow(3, 11), content.Length);
        int[] shares = [.. content.CountBy(symbol => symbol).OrderBy(pair => pair.Key).Select(pair => content.Length / pair.Value)];
        Assert.Equal([3, 9, 9, 9, 9, 27, 27, 27, 27, 27, 27], shares);
        Assert.All(content.CountBy(symbol => symbol), pair => Assert.Equal(0, content.Length % pair.Value));
    }

    [Fact]
    public void The_gzip_file_holds_a_log()
    {
        using var inflated = new MemoryStream();
        using (var gzip = new GZipStream(new MemoryStream(Made["logs/controller-old.log.gz"]), CompressionMode.Decompress)) gzip.CopyTo(inflated);
        Assert.StartsWith("day", System.Text.Encoding.ASCII.GetString(inflated.ToArray()), StringComparison.Ordinal);
        Assert.Equal(2_500, inflated.ToArray().Count(each => each == (byte)'\n'));
    }

    [Fact]
    public void One_symbol_fills_most_of_the_bitmap()
    {
        byte[] content = Made["status/alarm-bitmap.bin"];
        Assert.InRange(content.Count(each => each == 0) / (double)content.Length, 0.978, 0.982);
    }
}
