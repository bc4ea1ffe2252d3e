namespace Tallybound.DemoCorpus;

/// <summary>The data directory of an invented fleet of refrigerated containers.</summary>
public static class Fleet
{
    /// <summary>Every file of the corpora: name with <c>/</c>, and content. The same on every machine.</summary>
    public static IEnumerable<(string Name, byte[] Content)> Files()
    {
        yield return ("telemetry/reefer-records.bin", SensorRecords.Make(new Draw(101), containers: 40, samples: 2_400));
        yield return ("telemetry/sample-times.u64", Timestamps.Make(new Draw(102), 60_000));
        yield return ("telemetry/unit-replaced-halfway.bin", Halfway.Make(new Draw(103), 400_000));
        yield return ("doors/door-events.csv", DoorEvents.Make(new Draw(104), 18_000));
        yield return ("manifests/loads.jsonl", Manifests.Make(new Draw(105), 4_000));
        yield return ("logs/controller.log", ControllerLog.Make(new Draw(106), 12_000));
        yield return ("logs/controller-old.log.gz", GzipFile.Make(ControllerLog.Make(new Draw(107), 2_500)));
        yield return ("images/door-seal-thermal.pgm", ThermalImage.Make(new Draw(108), 640, 480));
        yield return ("status/alarm-bitmap.bin", StatusBitmap.Make(new Draw(109), 300_000));
        yield return ("status/compressor-states.bin", States.FourEqual(new Draw(110), 200_000));
        yield return ("status/three-level-link.bin", States.PowersOfThree(new Draw(111)));
        yield return ("keys/session-keys.bin", Keys.Make(new Draw(112), 131_072));
        yield return ("status/pending.bin", []);
    }
}
