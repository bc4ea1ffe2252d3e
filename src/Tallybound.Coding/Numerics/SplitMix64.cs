namespace Tallybound.Coding.Numerics;

/// <summary>A small seeded generator whose numbers are the same on every platform and in every version.</summary>
/// <remarks>G. Steele, D. Lea and C. Flood, Fast Splittable Pseudorandom Number Generators, OOPSLA 2014, with the mixing constants of
/// its variant 13 finaliser. It has 2^64 states, one for each seed; it is for resampling and sampling, not for secrets.</remarks>
public struct SplitMix64(ulong seed)
{
    private ulong _state = seed;

    /// <summary>The next 64 bits, all values equally likely over the period of 2^64.</summary>
    public ulong Next()
    {
        ulong z = _state += 0x9E3779B97F4A7C15;
        z = (z ^ (z >> 30)) * 0xBF58476D1CE4E5B9;
        z = (z ^ (z >> 27)) * 0x94D049BB133111EB;
        return z ^ (z >> 31);
    }

    /// <summary>A number in [0, <paramref name="limit"/>), each with the same chance to within limit/2^64.</summary>
    /// <param name="limit">Above 0; 1 always gives 0.</param>
    /// <remarks>The high word of the product: D. Lemire, Fast Random Integer Generation in an Interval, ACM TOMACS 29 (2019), without its rejection step.</remarks>
    public int Below(int limit)
    {
        ArgumentOutOfRangeException.ThrowIfNegativeOrZero(limit);
        return (int)Math.BigMul(Next(), (ulong)limit, out _);
    }
}
