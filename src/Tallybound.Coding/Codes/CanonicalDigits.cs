using System.Numerics;

namespace Tallybound.Coding.Codes;

/// <summary>The code words that lengths stand for on a channel of D levels: strings of digits by (length, symbol), each one more than the last.</summary>
public sealed class CanonicalDigits
{
    private readonly byte[][] words;
    private readonly Dictionary<(int Length, BigInteger Word), int> symbols = [];

    /// <summary>Assigns the words.</summary>
    /// <param name="lengths">One length a symbol in digits, 0 for a symbol without a word.</param>
    /// <param name="radix">D, 2 to 16.</param>
    /// <exception cref="ArgumentException">The lengths are too short for a code that can be decoded.</exception>
    public CanonicalDigits(ReadOnlySpan<byte> lengths, int radix)
    {
        ArgumentOutOfRangeException.ThrowIfLessThan(radix, 2);
        ArgumentOutOfRangeException.ThrowIfGreaterThan(radix, 16);
        Radix = radix;
        words = new byte[lengths.Length][];
        BigInteger word = BigInteger.Zero, limit = BigInteger.One;
        for (int length = 1; length <= byte.MaxValue; length++)
        {
            word *= radix;
            limit *= radix;
            for (int symbol = 0; symbol < lengths.Length; symbol++)
            {
                if (lengths[symbol] != length) continue;
                if (word >= limit) throw new ArgumentException($"There are too few words of {length} digits in radix {radix}.", nameof(lengths));
                words[symbol] = Digits(word, length, radix);
                symbols.Add((length, word), symbol);
                word += BigInteger.One;
            }
        }
    }

    /// <summary>D.</summary>
    public int Radix { get; }

    /// <summary>A symbol's word, first digit first; empty: it has none.</summary>
    public ReadOnlySpan<byte> Word(int symbol) => words[symbol] ?? [];

    /// <summary>The digits of symbols one after the other.</summary>
    /// <exception cref="ArgumentException">A symbol has no word.</exception>
    public byte[] Encode(ReadOnlySpan<int> source)
    {
        var digits = new List<byte>();
        foreach (int symbol in source)
        {
            if (Word(symbol).IsEmpty) throw new ArgumentException($"Symbol {symbol} has no word in this code.", nameof(source));
            digits.AddRange(Word(symbol));
        }
        return [.. digits];
    }

    /// <summary>The symbols that digits stand for.</summary>
    /// <exception cref="InvalidDataException">They end inside a word, or are no word of this code.</exception>
    public int[] Decode(ReadOnlySpan<byte> digits)
    {
        var source = new List<int>();
        BigInteger word = BigInteger.Zero;
        int length = 0;
        foreach (byte digit in digits)
        {
            if (digit >= Radix) throw new InvalidDataException($"{digit} is no digit in radix {Radix}.");
            word = (word * Radix) + digit;
            if (++length > byte.MaxValue) throw new InvalidDataException("The digits are no word of this code.");
            if (!symbols.TryGetValue((length, word), out int symbol)) continue;
            source.Add(symbol);
            (word, length) = (BigInteger.Zero, 0);
        }
        return length == 0 ? [.. source] : throw new InvalidDataException("The digits end inside a word.");
    }

    private static byte[] Digits(BigInteger word, int length, int radix)
    {
        var digits = new byte[length];
        for (int place = length - 1; place >= 0; place--)
        {
            word = BigInteger.DivRem(word, radix, out BigInteger digit);
            digits[place] = (byte)digit;
        }
        return digits;
    }
}
