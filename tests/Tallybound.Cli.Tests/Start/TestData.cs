using System.Text;

namespace Tallybound.Cli.Tests;

/// <summary>Bytes to profile, the same in every run.</summary>
internal static class TestData
{
    /// <summary>Bytes drawn evenly.</summary>
    public static byte[] Even(int length, int seed)
    {
        byte[] bytes = new byte[length];
        new Random(seed).NextBytes(bytes);
        return bytes;
    }

    /// <summary>Bytes of which small values are common, so that codes have something to gain.</summary>
    public static byte[] Skewed(int length, int seed)
    {
        byte[] bytes = Even(length, seed);
        for (int i = 0; i < bytes.Length; i++) bytes[i] = (byte)(bytes[i] * bytes[i] / 1024);
        return bytes;
    }

    /// <summary>Lines of an invented door log.</summary>
    public static byte[] Log(int lines, int seed)
    {
        var random = new Random(seed);
        var text = new StringBuilder();
        for (int i = 0; i < lines; i++)
            text.Append("unit ").Append(1000 + random.Next(40)).Append(random.Next(3) == 0 ? " door open " : " door shut ").Append(random.Next(-250, -150) / 10.0).Append(" degC\n");
        return Encoding.ASCII.GetBytes(text.ToString());
    }
}
