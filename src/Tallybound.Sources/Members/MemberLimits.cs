namespace Tallybound.Sources;

/// <summary>Limits that stop a small file from becoming endless bytes.</summary>
/// <param name="Ratio">Greatest ratio of decompressed to compressed bytes, at least 1.</param>
/// <param name="Bytes">Greatest decompressed size.</param>
public sealed record MemberLimits(long Ratio, long Bytes)
{
    /// <summary>A ratio of 1,000 and 64 GiB.</summary>
    public static MemberLimits Default { get; } = new(1000, 64L << 30);
}
