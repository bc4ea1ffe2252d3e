namespace Tallybound.Cli.Options;

/// <summary>What may be typed behind an option, or in place of an argument: what a shell can complete, and how.</summary>
/// <param name="Form">How values look.</param>
/// <param name="Words">The values there are; empty unless they are a fixed list.</param>
internal sealed record TypedValue(ValueForm Form, IReadOnlyList<string> Words)
{
    /// <summary>No value.</summary>
    public static TypedValue None { get; } = new(ValueForm.None, []);

    /// <summary>A number or a size.</summary>
    public static TypedValue Number { get; } = new(ValueForm.Number, []);

    /// <summary>The name of a file or a folder, or a pattern of such names.</summary>
    public static TypedValue Path { get; } = new(ValueForm.Path, []);

    /// <summary>One of these words.</summary>
    public static TypedValue OneOf(params IReadOnlyList<string> words) => new(ValueForm.OneWord, words);

    /// <summary>One or more of these words, with commas between.</summary>
    public static TypedValue SomeOf(params IReadOnlyList<string> words) => new(ValueForm.Words, words);
}

/// <summary>How the values of an option look.</summary>
internal enum ValueForm
{
    /// <summary>There are none.</summary>
    None,

    /// <summary>A number, several with commas between, or a size.</summary>
    Number,

    /// <summary>A file, a folder, or a pattern of such names.</summary>
    Path,

    /// <summary>One word of a fixed list.</summary>
    OneWord,

    /// <summary>Words of a fixed list with commas between.</summary>
    Words,
}
