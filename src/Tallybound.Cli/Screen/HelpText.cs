namespace Tallybound.Cli.Screen;

/// <summary>The help pages. Each fits a screen of 24 lines and 80 columns.</summary>
internal static class HelpText
{
    /// <summary>The page of <c>tallybound --help</c>.</summary>
    public const string Program = """
        tallybound counts the symbols of your data and says what entropy coding can make
        of them: entropy bounds, and what real codes cost with tables and framing.

        Usage: tallybound COMMAND [options]

          profile INPUT...   profile files, folders and streams, and write a run folder
          render RUN         draw the report of a run folder again
          completion SHELL   print what lets bash, zsh or PowerShell complete commands

          --help, -h         this page; tallybound COMMAND --help for a command's own
          --version          the program's version

        Examples:
          tallybound profile /data/depot
          tallybound profile sensor.bin --view words-le,bytes
          zcat door.log.gz | tallybound profile - --out reports/door
          tallybound render reports/door

        Exit codes: 0 well, 1 some sources failed, 2 the command line is wrong,
                    3 the run or report could not be kept, 130 stopped by you.

        """;

    /// <summary>The page of <c>tallybound profile --help</c>.</summary>
    public const string Profile = """
        Usage: tallybound profile INPUT... [options]
        INPUT is a file, a folder (all below it), a named pipe, or - for standard input.
          --out DIR               the run folder to make              [reports/NAME]
          --view V[,V...]         bytes, nibbles, bits, words-le, words-be   [bytes]
          --order K               highest context order                          [2]
          --block-length N        longest symbol block; 1: none                  [3]
          --length-limit L[,L...] code length limits in bits              [11,12,15]
          --radix D[,D...]        Huffman codes of 3 to 16 digits beside the binary
          --segment SIZE          segment along a source, a power of two   [by size]
          --seed N                seed of every drawn sample                     [1]
          --include, --exclude GLOB  files of a folder to take, to leave; repeatable
          --inside                read gzip and Zstandard files as what they hold,
          --inside-ratio N, --inside-size SIZE  and stop there        [1000] [64GiB]
          --threads T, --memory SIZE  what the run may use    [all] [RAM/4, >=600MiB]
          --no-digest, --keep-tallies  take no SHA-256; write counts: tallies.parquet
          --quiet, --log-format text|json  no progress, no log; form of the log lines
        SIZE is 64KiB, 600MiB, 2GiB (1 KiB is 1,024 bytes) or plain bytes.
        Examples:
          tallybound profile /data/depot --exclude '**/*.gz'
          tallybound profile sensor.bin --view words-le,bytes --radix 3
          zcat door.log.gz | tallybound profile - --out reports/door

        """;

    /// <summary>The page of <c>tallybound render --help</c>.</summary>
    public const string Render = """
        Usage: tallybound render RUN [options]
        Draws the report of a run again, from its profile.json and nothing else: the
        same profile.json gives the same index.html and pictures, byte for byte.
        RUN is a run folder, NAME or NAME.partial, or the profile.json in it.

          --pictures usual|all    pictures as files: of the corpus page and of the ten
                                  heaviest sources, or of every page         [usual]
          --quiet                 say nothing when all is well

        Examples:
          tallybound render reports/depot
          tallybound render reports/depot.partial/profile.json
          tallybound render reports/depot --pictures all

        Exit codes: 0 well, 2 there is no such run, or its profile.json cannot be read,
                    3 the report could not be kept.

        """;

    /// <summary>The page of <c>tallybound completion --help</c>.</summary>
    public const string Completion = """
        Usage: tallybound completion bash|zsh|powershell
        Prints a script by which the shell completes commands, options, their values and
        names of files. The shell runs the script alone, not this program.

        For one session, or at the end of the shell's own start file:
          bash         eval "$(tallybound completion bash)"
          zsh          eval "$(tallybound completion zsh)"
          powershell   tallybound completion powershell | Out-String | Invoke-Expression

        Kept as a file, so that no shell starts later for it; DIR is a folder in fpath:
          bash         ~/.local/share/bash-completion/completions/tallybound
          zsh          DIR/_tallybound

        Examples:
          eval "$(tallybound completion bash)"
          tallybound completion zsh > ~/.zfunc/_tallybound

        """;
}
