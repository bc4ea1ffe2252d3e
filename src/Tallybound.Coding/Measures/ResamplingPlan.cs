using Tallybound.Coding.Numerics;

namespace Tallybound.Coding.Measures;

/// <summary>Which runs of neighbouring segments each replicate is made of. Replicate 0 is the source itself, one run.</summary>
internal sealed class ResamplingPlan
{
    private readonly (int Start, int Length)[] _blocks;
    private readonly int _perReplicate;

    /// <summary>Draws the runs, replicate after replicate.</summary>
    public ResamplingPlan(int segments, int blockLength, int replicates, ulong seed)
    {
        if (blockLength < 1 || blockLength > segments)
            throw new ArgumentOutOfRangeException(nameof(blockLength), blockLength, $"A block has 1 to {segments} segments here.");
        Replicates = replicates;
        _perReplicate = (segments + blockLength - 1) / blockLength;
        _blocks = new (int, int)[1 + replicates * _perReplicate];
        _blocks[0] = (0, segments);
        int last = segments - (_perReplicate - 1) * blockLength;
        var random = new SplitMix64(seed);
        for (int b = 1; b < _blocks.Length; b++)
            _blocks[b] = (random.Below(segments - blockLength + 1), b % _perReplicate == 0 ? last : blockLength);
    }

    /// <summary>Replicates beside the source itself.</summary>
    public int Replicates { get; }

    /// <summary>The runs of one replicate, 0 to <see cref="Replicates"/>.</summary>
    public ReadOnlySpan<(int Start, int Length)> Blocks(int replicate) => replicate == 0
        ? _blocks.AsSpan(0, 1)
        : _blocks.AsSpan(1 + (replicate - 1) * _perReplicate, _perReplicate);
}
