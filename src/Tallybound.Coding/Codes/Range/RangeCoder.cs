using Tallybound.Coding.Bits;

namespace Tallybound.Coding.Codes.Range;

/// <summary>A 32-bit arithmetic coder over frequencies that add up to 2^R, R from 12 to 16, after I. Witten, R. Neal and J. Cleary, Arithmetic coding for data compression, Comm. ACM 30 (1987).</summary>
/// <remarks>The interval [low, high] is doubled whenever it lies in one half, or in the middle half, in which case the bit is owed until the next half is known. It is never below 2^30, so
/// a step loses less than 2^(R−30) of it. What the division leaves over belongs to no symbol.</remarks>
public sealed class RangeCoder
{
    private const ulong Whole = 1UL << 32, Half = Whole / 2, Quarter = Whole / 4;

    private readonly int frequencyBits;
    private readonly int[] below;

    /// <summary>Takes the frequencies.</summary>
    /// <param name="frequencies">One a symbol, 0 for a symbol that is never coded, in all 2^R.</param>
    /// <param name="frequencyBits">R, 12 to 16.</param>
    /// <exception cref="ArgumentException">The frequencies do not add up to 2^R.</exception>
    public RangeCoder(ReadOnlySpan<int> frequencies, int frequencyBits)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(frequencyBits, RangeFrequencyBits.Smallest);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(frequencyBits, RangeFrequencyBits.Largest);
        this.frequencyBits = frequencyBits;
        below = new int[frequencies.Length + 1];
        for (int symbol = 0; symbol < frequencies.Length; symbol++) below[symbol + 1] = below[symbol] + frequencies[symbol];
        if (below[^1] != 1 << frequencyBits) throw new ArgumentException($"The frequencies add up to {below[^1]}; {frequencyBits} bits ask for {1 << frequencyBits}.", nameof(frequencies));
    }

    /// <summary>Codes the symbols and ends the payload with <see cref="RangePrice.FlushBits"/> bits and those owed.</summary>
    /// <exception cref="ArgumentException">A symbol has frequency 0.</exception>
    public void Encode<TSink>(ReadOnlySpan<int> symbols, ref TSink sink)
        where TSink : IBitSink
    {
        ulong low = 0, high = Whole - 1;
        long owed = 0;
        foreach (int symbol in symbols)
        {
            if (below[symbol] == below[symbol + 1]) throw new ArgumentException($"Symbol {symbol} has frequency 0.", nameof(symbols));
            Narrow(symbol, ref low, ref high);
            while (true)
            {
                if (high < Half)
                {
                    Give(0, ref owed, ref sink);
                }
                else if (low >= Half)
                {
                    Give(1, ref owed, ref sink);
                    (low, high) = (low - Half, high - Half);
                }
                else if (low >= Quarter && high < 3 * Quarter)
                {
                    owed++;
                    (low, high) = (low - Quarter, high - Quarter);
                }
                else
                {
                    break;
                }
                (low, high) = (2 * low, (2 * high) + 1);
            }
        }
        owed++;
        Give(low < Quarter ? 0UL : 1, ref owed, ref sink);
    }

    /// <summary>Reads as many symbols as <paramref name="symbols"/> has room for from a payload that nothing follows.</summary>
    /// <param name="payload">The payload's bits, most significant first; zeros are read behind its end.</param>
    /// <param name="symbols">Takes the symbols.</param>
    /// <exception cref="InvalidDataException">The payload points outside every symbol.</exception>
    public void Decode(ReadOnlySpan<byte> payload, Span<int> symbols)
    {
        ulong low = 0, high = Whole - 1, code = 0;
        long at = 0;
        for (int i = 0; i < 32; i++) code = (2 * code) + BitAt(payload, at++);
        for (int i = 0; i < symbols.Length; i++)
        {
            ulong position = (code - low) / ((high - low + 1) >> frequencyBits);
            if (position >= 1UL << frequencyBits) throw new InvalidDataException("The payload points outside every symbol.");
            int found = below.AsSpan().BinarySearch((int)position);
            int symbol = found < 0 ? ~found - 1 : found;
            while (below[symbol + 1] == below[symbol]) symbol++;
            symbols[i] = symbol;
            Narrow(symbol, ref low, ref high);
            while (true)
            {
                ulong shift = high < Half ? 0 : low >= Half ? Half : low >= Quarter && high < 3 * Quarter ? Quarter : Whole;
                if (shift == Whole) break;
                (low, high, code) = (2 * (low - shift), (2 * (high - shift)) + 1, (2 * (code - shift)) + BitAt(payload, at++));
            }
        }
    }

    private void Narrow(int symbol, ref ulong low, ref ulong high)
    {
        ulong unit = (high - low + 1) >> frequencyBits;
        high = low + (unit * (ulong)below[symbol + 1]) - 1;
        low += unit * (ulong)below[symbol];
    }

    private static void Give<TSink>(ulong bit, ref long owed, ref TSink sink)
        where TSink : IBitSink
    {
        sink.Write(bit, 1);
        for (; owed > 0; owed--) sink.Write(bit ^ 1, 1);
    }

    private static ulong BitAt(ReadOnlySpan<byte> bytes, long at) => at < bytes.Length * 8L ? (uint)(bytes[(int)(at >> 3)] >> (7 - (int)(at & 7))) & 1 : 0;
}
