using System.IO.Compression;
using System.Xml.Linq;

namespace Tallybound.Cli.Tests;

public sealed class ToolPackageTests
{
    /// <summary>What a package must hold beside our own assemblies: the command, and the native library of the ledger.</summary>
    private static readonly Dictionary<string, (string Command, string Ledger)> Platforms = new(StringComparer.Ordinal)
    {
        ["linux-x64"] = ("tallybound", "libe_sqlite3.so"),
        ["win-x64"] = ("tallybound.exe", "e_sqlite3.dll"),
        ["osx-arm64"] = ("tallybound", "libe_sqlite3.dylib"),
    };

    private static readonly string[] Assemblies =
    [
        "tallybound.dll", "Tallybound.Coding.dll", "Tallybound.Tallies.dll", "Tallybound.Sources.dll", "Tallybound.Profiling.dll", "Tallybound.Reports.dll",
        "System.CommandLine.dll", "Spectre.Console.dll", "Parquet.dll", "Microsoft.Data.Sqlite.dll", "MathNet.Numerics.dll", "ZstdSharp.dll",
        "tallybound.runtimeconfig.json", "tallybound.deps.json",
    ];

    [Fact]
    public void The_packed_tool_holds_what_each_platform_needs()
    {
        using var folder = new FreshFolder();
        using RunningProgram pack = BuiltProgram.StartCommand(folder, BuiltProgram.DotNet,
            ["pack", Path.Combine(BuiltProgram.RepositoryRoot, "src", "Tallybound.Cli"), "-c", "Release", "-o", folder.At("packages"), "-v", "quiet", "--nologo"]);
        pack.CloseInput();
        Outcome outcome = pack.WaitForEnd(TimeSpan.FromMinutes(8));
        Assert.True(outcome.ExitCode == 0, outcome.Output + outcome.Error);
        foreach ((string platform, (string command, string ledger)) in Platforms)
        {
            string package = Assert.Single(Directory.GetFiles(folder.At("packages"), $"tallybound.{platform}.*.nupkg"));
            Assert.InRange(new FileInfo(package).Length, 2L << 20, 30L << 20);
            using ZipArchive archive = ZipFile.OpenRead(package);
            string tools = $"tools/net10.0/{platform}/";
            string[] files = [.. archive.Entries.Select(entry => entry.FullName).Where(name => name.StartsWith(tools, StringComparison.Ordinal)).Select(name => name[tools.Length..])];
            foreach (string needed in Assemblies.Append(command).Append(ledger)) Assert.Contains(needed, files);
            // One native library, of this platform alone, and no texts in other languages.
            Assert.Single(files, name => name.Contains("e_sqlite3", StringComparison.Ordinal) && !name.Contains("SQLitePCLRaw", StringComparison.Ordinal));
            Assert.DoesNotContain(files, name => name.EndsWith(".resources.dll", StringComparison.Ordinal));
            using Stream settings = archive.GetEntry(tools + "DotnetToolSettings.xml")!.Open();
            XElement entry = XDocument.Load(settings).Descendants("Command").Single();
            Assert.Equal("tallybound", (string)entry.Attribute("Name")!);
            Assert.Equal(command, (string)entry.Attribute("EntryPoint")!);
            AssertMachineCode(archive.GetEntry(tools + ledger)!, platform);
        }
        Assert.Equal(3, Platforms.Count);
        string pointer = Assert.Single(Directory.GetFiles(folder.At("packages")), path => !Platforms.Keys.Any(platform => path.Contains(platform, StringComparison.Ordinal)));
        using ZipArchive index = ZipFile.OpenRead(pointer);
        using Stream list = index.Entries.Single(entry => entry.Name == "DotnetToolSettings.xml").Open();
        Assert.Equal(Platforms.Keys.Order(StringComparer.Ordinal),
            XDocument.Load(list).Descendants("RuntimeIdentifierPackage").Select(found => (string)found.Attribute("RuntimeIdentifier")!).Order(StringComparer.Ordinal));
    }

    /// <summary>The first bytes of a library say which system loads it: ELF, "MZ" of PE, and 64-bit Mach-O.</summary>
    private static void AssertMachineCode(ZipArchiveEntry library, string platform)
    {
        byte[] magic = platform switch
        {
            "linux-x64" => [0x7F, (byte)'E', (byte)'L', (byte)'F'],
            "win-x64" => "MZ"u8.ToArray(),
            _ => [0xCF, 0xFA, 0xED, 0xFE],
        };
        byte[] start = new byte[magic.Length];
        using Stream content = library.Open();
        content.ReadExactly(start);
        Assert.Equal(magic, start);
    }
}
