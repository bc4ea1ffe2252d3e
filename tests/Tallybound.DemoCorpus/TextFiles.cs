using System.Globalization;
using System.Text;

namespace Tallybound.DemoCorpus;

/// <summary>Door events as comma-separated values.</summary>
internal static class DoorEvents
{
    public static byte[] Make(Draw draw, int lines)
    {
        var text = new StringBuilder("time,container,door,event,seal_ok,inside_c\n");
        long time = 1_790_000_000;
        for (int i = 0; i < lines; i++)
        {
            time += draw.Below(90);
            int container = 700_100 + (draw.Below(40) * 7);
            string happened = draw.Of(["open", "closed", "closed", "ajar", "locked"]);
            int tenths = -220 + draw.Bell(40) + (happened == "open" ? 60 : 0);
            text.Append(CultureInfo.InvariantCulture, $"{Stamp(time)},RFC{container},{draw.Of(["rear", "rear", "rear", "side"])},{happened},{(draw.Chance(985) ? "yes" : "no")},{(tenths < 0 ? "-" : "")}{Math.Abs(tenths) / 10}.{Math.Abs(tenths) % 10}\n");
        }
        return Encoding.ASCII.GetBytes(text.ToString());
    }

    /// <summary>Seconds since the epoch as a time of day and a day number; no calendar is needed.</summary>
    internal static string Stamp(long time) =>
        string.Create(CultureInfo.InvariantCulture, $"day{time / 86_400}T{time / 3600 % 24:d2}:{time / 60 % 60:d2}:{time % 60:d2}");
}

/// <summary>Loads as one JSON object a line.</summary>
internal static class Manifests
{
    private static readonly string[] Goods = ["frozen peas", "mango pulp", "herring fillets", "cut tulips", "vaccine trial kits", "soft cheese", "blueberries"];
    private static readonly string[] Ports = ["Northquay", "Saltmere", "Harrow Point", "Ostvik", "Palm Landing", "Greyhaven"];

    public static byte[] Make(Draw draw, int lines)
    {
        var text = new StringBuilder();
        for (int i = 0; i < lines; i++)
        {
            int from = draw.Below(Ports.Length), to = (from + 1 + draw.Below(Ports.Length - 1)) % Ports.Length;
            text.Append(CultureInfo.InvariantCulture, $"{{\"load\":{410_000 + i},\"container\":\"RFC{700_100 + (draw.Below(40) * 7)}\",\"goods\":\"{draw.Of(Goods)}\",\"from\":\"{Ports[from]}\",\"to\":\"{Ports[to]}\",");
            text.Append(CultureInfo.InvariantCulture, $"\"set_c\":{draw.Of([-22, -18, 2, 4, 13])},\"pallets\":{1 + draw.Below(20)},\"kg\":{400 + (draw.Below(460) * 50)},\"seals\":[\"{draw.Next() & 0xFFFFFF:x6}\",\"{draw.Next() & 0xFFFFFF:x6}\"]{(draw.Chance(150) ? ",\"note\":\"recheck seal at arrival\"" : "")}}}\n");
        }
        return Encoding.ASCII.GetBytes(text.ToString());
    }
}

/// <summary>The log of a container's cooling controller.</summary>
internal static class ControllerLog
{
    public static byte[] Make(Draw draw, int lines)
    {
        var text = new StringBuilder();
        long time = 1_790_000_000;
        for (int i = 0; i < lines; i++)
        {
            time += 1 + draw.Below(45);
            text.Append(CultureInfo.InvariantCulture, $"{DoorEvents.Stamp(time)} RFC{700_100 + (draw.Below(40) * 7)} ");
            text.Append(draw.Below(10) switch
            {
                0 => $"WARN  suction pressure {draw.Below(40) + 12} kPa below limit, fan step {draw.Below(5)}",
                1 => $"INFO  defrost cycle started, coil {-30 + draw.Below(12)} C",
                2 => $"INFO  defrost cycle ended after {draw.Below(900) + 300} s",
                3 => $"ERROR sensor {draw.Of(["supply", "return", "ambient"])} out of range, using last good value",
                < 7 => $"INFO  compressor on, demand {draw.Below(100)} %",
                _ => $"INFO  compressor off, runtime {draw.Below(5000)} s",
            });
            text.Append('\n');
        }
        return Encoding.ASCII.GetBytes(text.ToString());
    }
}
