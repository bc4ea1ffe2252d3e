namespace Tallybound.Coding;

/// <summary>What no coder of a stated class can beat on these counts, over the whole source. The cost of the model is left out, so it is no size of anything.</summary>
/// <param name="Bits">0 or more; 0 for an empty source and for one symbol in use.</param>
/// <param name="Class">The coders it speaks of. A coder of another class may go below it.</param>
public readonly record struct EntropyBound(double Bits, BoundClass Class);

/// <summary>The coders that a bound speaks of: each has fixed tables, known to the decoder.</summary>
public enum BoundClass
{
    /// <summary>One table for single symbols, without memory.</summary>
    Memoryless,

    /// <summary>One table for blocks of several symbols coded as one.</summary>
    Block,

    /// <summary>One table for each context of preceding symbols.</summary>
    Context,
}
