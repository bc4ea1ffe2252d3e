using System.CommandLine;
using Tallybound.Cli.Screen;
using Tallybound.Reports.Run;

namespace Tallybound.Cli.Options;

/// <summary>The command <c>render</c>: draws the report of a run again.</summary>
internal sealed class RenderCommand : DeclaredCommand
{
    private const string UsualPictures = "usual";
    private const string AllPictures = "all";

    private readonly Option<string[]> pictures;
    private readonly Option<bool> quiet;

    /// <summary>Declares the command.</summary>
    public RenderCommand()
        : base("render", "RUN", TypedValue.Path)
    {
        pictures = Text("--pictures", TypedValue.OneOf(UsualPictures, AllPictures));
        quiet = Flag("--quiet");
    }

    /// <inheritdoc/>
    public override string Usage => "tallybound render RUN";

    /// <inheritdoc/>
    public override string HelpPage => HelpText.Render;

    /// <inheritdoc/>
    public override Request Read(ParseResult result, int afterTerminator)
    {
        List<string> runs = Arguments(result, afterTerminator);
        if (runs.Count == 0) throw new UsageException("RUN is missing; name a run folder, as in tallybound render reports/depot");
        if (runs.Count > 1) throw new UsageException($"RUN {runs[1]} is one too many; render takes one run, so type the command once for each");
        if (runs[0].Length == 0) throw new UsageException("RUN '' is empty; name a run folder, as in tallybound render reports/depot");
        PictureChoice choice = Word(result, pictures) == AllPictures ? PictureChoice.All : PictureChoice.Usual;
        return new RenderRequest(runs[0], choice, IsSet(result, quiet));
    }
}

/// <summary>What a <c>render</c> command line means.</summary>
/// <param name="Run">A run folder, or its <c>profile.json</c>, as typed.</param>
/// <param name="Pictures">Which pictures are written as files.</param>
/// <param name="Quiet">Nothing is said when all is well.</param>
internal sealed record RenderRequest(string Run, PictureChoice Pictures, bool Quiet) : Request;
