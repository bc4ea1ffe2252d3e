namespace Tallybound.Coding.Bits;

/// <summary>Where code words go: into bytes, or into a count of bits. One walk serves both, so a price cannot drift from what is written.</summary>
public interface IBitSink
{
    /// <summary>Bits taken so far.</summary>
    long Bits { get; }

    /// <summary>Takes the low <paramref name="bits"/> bits of <paramref name="code"/>.</summary>
    /// <param name="code">The word; bits above <paramref name="bits"/> must be 0.</param>
    /// <param name="bits">0 to 64.</param>
    void Write(ulong code, int bits);
}

/// <summary>Counts bits and keeps none.</summary>
public struct BitCounter : IBitSink
{
    /// <inheritdoc/>
    public long Bits { get; private set; }

    /// <inheritdoc/>
    public void Write(ulong code, int bits) => Bits += bits;
}
