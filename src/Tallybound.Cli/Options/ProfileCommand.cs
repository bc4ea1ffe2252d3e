using System.CommandLine;
using System.CommandLine.Parsing;
using Tallybound.Profiling.Plan;

namespace Tallybound.Cli.Options;

/// <summary>The command <c>profile</c>: its options as typed, and what they mean.</summary>
/// <remarks>Options are declared as text and read here, so that every error is one line of our own that says how to mend it.</remarks>
internal sealed class ProfileCommand
{
    /// <summary>The command's name.</summary>
    public const string Name = "profile";

    private const int LongestCode = 63;
    private const int LargestRadix = 16;
    private const int MostThreads = 1024;
    private const long LeastSegmentBytes = 4096;

    private readonly Option<string[]> output = Text("--out");
    private readonly Option<string[]> order = Text("--order");
    private readonly Option<string[]> blockLength = Text("--block-length");
    private readonly Option<string[]> lengthLimit = Text("--length-limit");
    private readonly Option<string[]> radix = Text("--radix");
    private readonly Option<string[]> view = Text("--view");
    private readonly Option<string[]> include = Text("--include");
    private readonly Option<string[]> exclude = Text("--exclude");
    private readonly Option<string[]> threads = Text("--threads");
    private readonly Option<string[]> memory = Text("--memory");
    private readonly Option<string[]> segment = Text("--segment");
    private readonly Option<string[]> seed = Text("--seed");
    private readonly Option<bool> inside = Flag("--inside");
    private readonly Option<string[]> insideRatio = Text("--inside-ratio");
    private readonly Option<string[]> insideSize = Text("--inside-size");
    private readonly Option<string[]> referee = Text("--referee");
    private readonly Option<bool> noDigest = Flag("--no-digest");
    private readonly Option<bool> keepTallies = Flag("--keep-tallies");
    private readonly Option<bool> quiet = Flag("--quiet");
    private readonly Option<string[]> logFormat = Text("--log-format");
    private readonly Argument<string[]> inputs = new("INPUT") { Arity = ArgumentArity.ZeroOrMore };

    /// <summary>Declares the command.</summary>
    public ProfileCommand()
    {
        Command = new Command(Name) { inputs };
        foreach (Option option in (ReadOnlySpan<Option>)[
            output, order, blockLength, lengthLimit, radix, view, include, exclude, threads, memory, segment, seed,
            inside, insideRatio, insideSize, referee, noDigest, keepTallies, quiet, logFormat])
            Command.Options.Add(option);
    }

    /// <summary>The command as the parser knows it.</summary>
    public Command Command { get; }

    /// <summary>The options that take no value.</summary>
    public IEnumerable<Option> Flags => Command.Options.Where(option => option.Arity.MaximumNumberOfValues == 0);

    /// <summary>What was typed, read and checked.</summary>
    /// <param name="result">The parsed command line.</param>
    /// <param name="afterTerminator">How many arguments stand after <c>--</c>: those are inputs whatever they begin with.</param>
    /// <exception cref="UsageException">Something is wrong with it.</exception>
    public ProfileRequest Read(ParseResult result, int afterTerminator)
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
        string format = Value(result, logFormat) ?? "text";
        if (format is not ("text" or "json")) throw new UsageException($"--log-format {format}: takes text or json{NearestName.Suggestion(format, ["text", "json"])}");
        if (Value(result, output) is "") throw new UsageException("--out '': takes the folder to write; for example --out reports/review");
        return new ProfileRequest(parameters, Value(result, output), IsSet(result, quiet), format == "json");
    }

    private List<string> Inputs(ParseResult result, int afterTerminator)
    {
        IReadOnlyList<Token> tokens = result.GetResult(inputs)?.Tokens ?? [];
        var sources = new List<string>(tokens.Count);
        for (int i = 0; i < tokens.Count; i++)
        {
            string typed = tokens[i].Value;
            if (typed.Length > 1 && typed[0] == '-' && i < tokens.Count - afterTerminator) throw CommandLineText.UnknownOption(typed, Command);
            if (typed.Length == 0) throw new UsageException("INPUT '' is empty; name a file, a folder or - for standard input");
            sources.Add(typed);
        }
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

    private static string? Value(ParseResult result, Option<string[]> option)
    {
        if (result.GetResult(option) is not { } found) return null;
        if (found.IdentifierTokenCount > 1) throw new UsageException($"{option.Name} is given {found.IdentifierTokenCount} times; give it once");
        if (found.Tokens.Count == 0) throw new UsageException($"{option.Name} is given without a value; see tallybound profile --help");
        return found.Tokens[0].Value;
    }

    private static bool IsSet(ParseResult result, Option<bool> option) => result.GetResult(option) is { Implicit: false };

    private static Option<string[]> Text(string name) => new(name) { Arity = ArgumentArity.ZeroOrMore, AllowMultipleArgumentsPerToken = false };

    private static Option<bool> Flag(string name) => new(name) { Arity = ArgumentArity.Zero };
}
