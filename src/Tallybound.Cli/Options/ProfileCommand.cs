using System.CommandLine;
using System.CommandLine.Parsing;
using Tallybound.Cli.Screen;
using Tallybound.Profiling.Plan;

namespace Tallybound.Cli.Options;

/// <summary>The command <c>profile</c>: profiles sources and writes a run folder.</summary>
internal sealed class ProfileCommand : DeclaredCommand
{
    private const int LongestCode = 63;
    private const int LargestRadix = 16;
    private const int MostThreads = 1024;
    private const long LeastSegmentBytes = 4096;

    private readonly Option<string[]> output;
    private readonly Option<string[]> order;
    private readonly Option<string[]> blockLength;
    private readonly Option<string[]> lengthLimit;
    private readonly Option<string[]> radix;
    private readonly Option<string[]> view;
    private readonly Option<string[]> include;
    private readonly Option<string[]> exclude;
    private readonly Option<string[]> threads;
    private readonly Option<string[]> memory;
    private readonly Option<string[]> segment;
    private readonly Option<string[]> seed;
    private readonly Option<bool> inside;
    private readonly Option<string[]> insideRatio;
    private readonly Option<string[]> insideSize;
    private readonly Option<string[]> referee;
    private readonly Option<bool> noDigest;
    private readonly Option<bool> keepTallies;
    private readonly Option<bool> quiet;
    private readonly Option<string[]> logFormat;

    /// <summary>Declares the command.</summary>
    public ProfileCommand()
        : base("profile", "INPUT", TypedValue.Path)
    {
        output = Text("--out", TypedValue.Path);
        order = Text("--order", TypedValue.Number);
        blockLength = Text("--block-length", TypedValue.Number);
        lengthLimit = Text("--length-limit", TypedValue.Number);
        radix = Text("--radix", TypedValue.Number);
        view = Text("--view", TypedValue.SomeOf(ViewNames.All));
        include = Text("--include", TypedValue.Path);
        exclude = Text("--exclude", TypedValue.Path);
        threads = Text("--threads", TypedValue.Number);
        memory = Text("--memory", TypedValue.Number);
        segment = Text("--segment", TypedValue.Number);
        seed = Text("--seed", TypedValue.Number);
        inside = Flag("--inside");
        insideRatio = Text("--inside-ratio", TypedValue.Number);
        insideSize = Text("--inside-size", TypedValue.Number);
        referee = Text("--referee", TypedValue.OneOf("none"));
        noDigest = Flag("--no-digest");
        keepTallies = Flag("--keep-tallies");
        quiet = Flag("--quiet");
        logFormat = Text("--log-format", TypedValue.OneOf("text", "json"));
    }

    /// <inheritdoc/>
    public override string Usage => "tallybound profile INPUT...";

    /// <inheritdoc/>
    public override string HelpPage => HelpText.Profile;

    /// <inheritdoc/>
    public override Request Read(ParseResult result, int afterTerminator)
    {
        List<string> sources = Inputs(result, afterTerminator);
        var parameters = new RunParameters { Inputs = sources, Include = Globs(result, include), Exclude = Globs(result, exclude) };
        if (Value(result, order) is { } k) parameters = parameters with { HighestOrder = (int)OptionValue.Whole("--order", k, 0, ViewReach.HighestOrder, "2") };
        if (Value(result, blockLength) is { } n) parameters = parameters with { LongestBlock = (int)OptionValue.Whole("--block-length", n, 1, ViewReach.LongestBlock, "3") };
        if (Value(result, lengthLimit) is { } limits)
            parameters = parameters with { LengthLimits = OptionValue.Wholes("--length-limit", limits, 1, LongestCode, "11,12,15"), LengthLimitsAsked = true };
        if (Value(result, radix) is { } radices)
            parameters = parameters with { Radices = OptionValue.Wholes("--radix", radices, 2, LargestRadix, "3,4").FindAll(digits => digits != 2) };
        if (Value(result, view) is { } views) parameters = parameters with { Views = OptionValue.Names("--view", views, "view", ViewNames.All) };
        if (Value(result, order) is not null) ViewReach.CheckOrder(parameters.HighestOrder, parameters.Views);
        if (Value(result, blockLength) is not null) ViewReach.CheckBlockLength(parameters.LongestBlock, parameters.Views);
        if (Value(result, threads) is { } t) parameters = parameters with { Threads = (int)OptionValue.Whole("--threads", t, 1, MostThreads, "2") };
        if (Value(result, memory) is { } m) parameters = parameters with { MemoryBytes = OptionValue.Size("--memory", m, MemoryPlan.LeastBytes, "600MiB") };
        if (Value(result, segment) is { } s) parameters = parameters with { SegmentBytes = OptionValue.PowerOfTwoSize("--segment", s, LeastSegmentBytes, "64KiB") };
        if (Value(result, seed) is { } number) parameters = parameters with { Seed = OptionValue.Whole("--seed", number, 0, long.MaxValue, "1") };
        if (Value(result, insideRatio) is { } ratio) parameters = parameters with { InsideRatio = OptionValue.Whole("--inside-ratio", ratio, 1, long.MaxValue, "1000") };
        if (Value(result, insideSize) is { } size) parameters = parameters with { InsideBytes = OptionValue.Size("--inside-size", size, 1, "64GiB") };
        if (Value(result, referee) is { } codec and not "none")
            throw new UsageException($"--referee {codec}: there are no referee codecs to choose from; leave the option out, or write --referee none");
        parameters = parameters with { Inside = IsSet(result, inside), Digest = !IsSet(result, noDigest), KeepTallies = IsSet(result, keepTallies) };
        if (!parameters.Inside && (Value(result, insideRatio) ?? Value(result, insideSize)) is not null)
            throw new UsageException("--inside-ratio and --inside-size limit what --inside reads; add --inside, or leave them out");
        string format = Word(result, logFormat);
        if (Value(result, output) is "") throw new UsageException("--out '': takes the folder to write; for example --out reports/review");
        return new ProfileRequest(parameters, Value(result, output), IsSet(result, quiet), format == "json");
    }

    private List<string> Inputs(ParseResult result, int afterTerminator)
    {
        List<string> sources = Arguments(result, afterTerminator);
        if (sources.Contains("")) throw new UsageException("INPUT '' is empty; name a file, a folder or - for standard input");
        if (sources.Count == 0) throw new UsageException("INPUT is missing; name a file, a folder or - for standard input, as in tallybound profile data/");
        return sources;
    }

    private static IReadOnlyList<string> Globs(ParseResult result, Option<string[]> option)
    {
        if (result.GetResult(option) is not { } found) return [];
        if (found.Tokens.Count < found.IdentifierTokenCount || found.Tokens.Any(token => token.Value.Length == 0))
            throw new UsageException($"{option.Name} is given without a value; for example {option.Name} '**/*.csv'");
        return [.. found.Tokens.Select(token => token.Value)];
    }
}
