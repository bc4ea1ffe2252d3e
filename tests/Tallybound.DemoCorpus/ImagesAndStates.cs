using System.Text;

namespace Tallybound.DemoCorpus;

/// <summary>A grey picture of a door seal, warm at the frame: binary PGM.</summary>
internal static class ThermalImage
{
    public static byte[] Make(Draw draw, int width, int height)
    {
        byte[] head = Encoding.ASCII.GetBytes($"P5\n{width} {height}\n255\n");
        var content = new byte[head.Length + (width * height)];
        head.CopyTo(content, 0);
        for (int y = 0; y < height; y++)
        {
            for (int x = 0; x < width; x++)
            {
                int fromEdge = Math.Min(Math.Min(x, width - 1 - x), Math.Min(y, height - 1 - y));
                int leak = Math.Max(0, 90 - (Math.Abs(x - 470) / 2) - Math.Abs(y - 100));
                content[head.Length + (y * width) + x] = (byte)Math.Clamp(40 + (120 * 24 / (24 + fromEdge)) + leak + draw.Bell(3), 0, 255);
            }
        }
        return content;
    }
}

/// <summary>Alarm bits, eight a byte: nearly always none, so that one symbol has 0.98 of the whole.</summary>
internal static class StatusBitmap
{
    public static byte[] Make(Draw draw, int bytes)
    {
        var content = new byte[bytes];
        for (int i = 0; i < bytes; i++)
            if (draw.Chance(20)) content[i] = (byte)(1 << draw.Below(8));
        return content;
    }
}

/// <summary>Sources whose symbol counts are exact.</summary>
internal static class States
{
    /// <summary>Four states, each exactly a quarter of the bytes, shuffled.</summary>
    public static byte[] FourEqual(Draw draw, int bytes)
    {
        var content = new byte[bytes / 4 * 4];
        for (int i = 0; i < content.Length; i++) content[i] = (byte)(i % 4);
        draw.Shuffle<byte>(content);
        return content;
    }

    /// <summary>3^11 symbols: one third, four ninths in four symbols, six twenty-sevenths in six; shuffled.</summary>
    public static byte[] PowersOfThree(Draw draw)
    {
        const int total = 177_147;
        var content = new List<byte>(total);
        content.AddRange(Enumerable.Repeat((byte)'A', total / 3));
        for (int i = 0; i < 4; i++) content.AddRange(Enumerable.Repeat((byte)('B' + i), total / 9));
        for (int i = 0; i < 6; i++) content.AddRange(Enumerable.Repeat((byte)('F' + i), total / 27));
        byte[] shuffled = [.. content];
        draw.Shuffle<byte>(shuffled);
        return shuffled;
    }
}

/// <summary>Random keys: what no code makes smaller.</summary>
internal static class Keys
{
    public static byte[] Make(Draw draw, int bytes)
    {
        var content = new byte[bytes];
        for (int i = 0; i < bytes; i++) content[i] = (byte)(draw.Next() >> 32);
        return content;
    }
}
