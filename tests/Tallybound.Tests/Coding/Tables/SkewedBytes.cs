namespace Tallybound.Tests.Coding.Tables;

/// <summary>Independent bytes from a part of the alphabet, the more unequal the greater the skew, named at random or from 0 up; the same ones every time.</summary>
internal static class SkewedBytes
{
    public static byte[] Of(int symbols, int size, int skew, bool lowest = false)
    {
        var random = new Random((symbols * 31) + (size * 7) + skew);
        byte[] names = [.. Enumerable.Range(0, 256).Select(symbol => (byte)symbol)];
        if (!lowest) random.Shuffle(names);
        byte[] bytes = new byte[size];
        for (int i = 0; i < size; i++) bytes[i] = names[(int)(symbols * Math.Pow(random.NextDouble(), skew))];
        return bytes;
    }
}
