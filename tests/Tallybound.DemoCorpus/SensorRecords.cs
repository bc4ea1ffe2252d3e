using System.Buffers.Binary;

namespace Tallybound.DemoCorpus;

/// <summary>Fixed-size binary records of 24 bytes, all containers of one sampling round after another.</summary>
/// <remarks>u32 container, u32 time, i16 temperature and set-point in hundredths of a degree, u8 humidity, u8 door, u16 battery in millivolts, i32 latitude and longitude in microdegrees.</remarks>
internal static class SensorRecords
{
    private const int RecordBytes = 24;

    public static byte[] Make(Draw draw, int containers, int samples)
    {
        var content = new byte[RecordBytes * containers * samples];
        var temperature = new int[containers];
        var setPoint = new int[containers];
        var humidity = new int[containers];
        var battery = new int[containers];
        var latitude = new int[containers];
        var longitude = new int[containers];
        for (int i = 0; i < containers; i++)
        {
            setPoint[i] = draw.Of([-2200, -1800, 200, 400, 1300]);
            temperature[i] = setPoint[i] + draw.Bell(80);
            humidity[i] = 60 + draw.Below(30);
            battery[i] = 12_600 - draw.Below(400);
            latitude[i] = -10_000_000 + draw.Below(40_000_000);
            longitude[i] = 20_000_000 + draw.Below(60_000_000);
        }
        int at = 0;
        for (int sample = 0; sample < samples; sample++)
        {
            for (int i = 0; i < containers; i++, at += RecordBytes)
            {
                bool open = draw.Chance(12);
                temperature[i] += ((setPoint[i] - temperature[i]) / 16) + draw.Bell(9) + (open ? 45 : 0);
                humidity[i] = Math.Clamp(humidity[i] + draw.Bell(2), 35, 99);
                battery[i] = Math.Clamp(battery[i] + draw.Bell(3), 11_400, 12_900);
                latitude[i] += 310 + draw.Bell(40);
                longitude[i] += 140 + draw.Bell(40);
                Span<byte> record = content.AsSpan(at, RecordBytes);
                BinaryPrimitives.WriteUInt32LittleEndian(record, (uint)(700_100 + (i * 7)));
                BinaryPrimitives.WriteUInt32LittleEndian(record[4..], (uint)(1_790_000_000 + (sample * 300) + draw.Below(4)));
                BinaryPrimitives.WriteInt16LittleEndian(record[8..], (short)temperature[i]);
                BinaryPrimitives.WriteInt16LittleEndian(record[10..], (short)setPoint[i]);
                record[12] = (byte)humidity[i];
                record[13] = (byte)(open ? 1 : 0);
                BinaryPrimitives.WriteUInt16LittleEndian(record[14..], (ushort)battery[i]);
                BinaryPrimitives.WriteInt32LittleEndian(record[16..], latitude[i]);
                BinaryPrimitives.WriteInt32LittleEndian(record[20..], longitude[i]);
            }
        }
        return content;
    }
}

/// <summary>Ascending sampling times in milliseconds, 64 bits each, low byte first.</summary>
internal static class Timestamps
{
    public static byte[] Make(Draw draw, int count)
    {
        var content = new byte[8 * count];
        ulong time = 1_790_000_000_000;
        for (int i = 0; i < count; i++)
        {
            time += (ulong)(5000 + draw.Bell(6) + (draw.Chance(5) ? draw.Below(600_000) : 0));
            BinaryPrimitives.WriteUInt64LittleEndian(content.AsSpan(8 * i), time);
        }
        return content;
    }
}

/// <summary>Vibration samples of a unit that was replaced half way: narrow around 40 before, wide around 150 after.</summary>
internal static class Halfway
{
    public static byte[] Make(Draw draw, int bytes)
    {
        var content = new byte[bytes];
        for (int i = 0; i < bytes; i++) content[i] = (byte)(i < bytes / 2 ? 40 + draw.Bell(4) : 150 + draw.Bell(60));
        return content;
    }
}
