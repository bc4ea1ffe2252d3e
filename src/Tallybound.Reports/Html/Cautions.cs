namespace Tallybound.Reports.Html;

/// <summary>What every report says, whatever the figures.</summary>
internal static class Cautions
{
    /// <summary>In reading order.</summary>
    public static IReadOnlyList<string> Always { get; } =
    [
        "The figures describe the bytes that were read, not the bytes of next year.",
        "A bound leaves out the cost of the model. The static order-0 bound holds for one fixed table without memory; coders that adapt or use context may go below it.",
        "A plug-in entropy with context reads too low on thin data; take the adaptive or the held-out figure beside it.",
        "Sizes here are those of an entropy coder alone. A match finder in front of it, as in general-purpose codecs, changes them.",
        "Compressing a secret together with text that an attacker can choose leaks the secret through the length.",
        "A code table can reveal what the data holds: treat tables and counts as you treat the data.",
        "A table that ships in safety-relevant equipment is verified under that field's own process, by those licensed to do so.",
    ];
}
