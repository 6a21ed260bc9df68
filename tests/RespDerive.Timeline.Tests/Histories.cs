using CsCheck;
using RespDerive.Physiology.Inputs;

namespace RespDerive.Timeline.Tests;

/// <summary>One version of one resource in a generated history.</summary>
internal sealed record Version(ResourceKey Resource, VersionOrder Order, IReadOnlyList<Reading> Readings, Person? Person);

/// <summary>Generates histories of one patient: settings, streams, gases, corrections, withdrawals, refusals, late copies.</summary>
internal static class Histories
{
    /// <summary>Each history is about one theme, so that its readings meet.</summary>
    private static readonly Kind[][] Themes =
    [
        [Kinds.PaO2, Kinds.PaCO2, Kinds.FiO2Set, Kinds.FiO2, Kinds.FiO2Measured, Kinds.BarometricPressure, Events.SupportEnd],
        [Kinds.PaO2, Kinds.FiO2Set, Kinds.MeanAirway, Kinds.PeepSet, Kinds.SpO2],
        [Kinds.Plateau, Kinds.PeepTotal, Kinds.PeepSet, Kinds.Peep, Kinds.PeepIntrinsic, Kinds.TidalVolumeExpired, Kinds.TidalVolume],
        [Kinds.Plateau, Kinds.PeepTotal, Kinds.RateTotal, Kinds.RateSet, Kinds.RateSpontaneous, Kinds.Mode, Kinds.PressureSupportSet],
        [Kinds.TidalVolumeExpired, Kinds.TidalVolume, Kinds.Height, Kinds.MinuteVolumeExpired, Kinds.RateTotal, Kinds.PaCO2],
        [Kinds.Peak, Kinds.Plateau, Kinds.TidalVolumeExpired, Kinds.PeepTotal],
    ];

    private static Gen<Reading> ReadingOf(Kind[] theme, double step) =>
        from kind in AnyOf(theme)
        from slot in Gen.Int[0, 30]
        from jitter in Gen.Int[0, 3]
        from level in Gen.Int[0, 4]
        from refused in Gen.Int[0, 11]
        from device in AnyOf<string?>(null, "Device/v", "Device/w")
        from specimen in AnyOf<string?>(null, null, "Specimen/a", "Specimen/b")
        from preliminary in Gen.Int[0, 7]
        select Make(kind, (slot * step) + (jitter * 0.5), level, refused == 0, device, specimen, preliminary == 0);

    private static Gen<Version> VersionOf(Kind[] theme, double step) =>
        from id in Gen.Int[0, 24]
        from number in Gen.Int[1, 4]
        from reading in ReadingOf(theme, step)
        from withdrawn in Gen.Int[0, 5]
        from person in Gen.Int[0, 12]
        select person == 0 ? OfPerson(number) : Of(id, number, withdrawn == 0 ? null : reading);

    /// <summary>Up to 45 versions of up to 25 resources.</summary>
    public static readonly Gen<Version[]> One =
        from theme in AnyOf(Themes)
        from step in AnyOf(0.5, 2.5, 2.5, 61)
        from versions in VersionOf(theme, step).Array[1, 45]
        select versions;

    private static Gen<T> AnyOf<T>(params T[] items) => Gen.Int[0, items.Length - 1].Select(i => items[i]);

    private static Version OfPerson(int number) => new(new("ehr", "Patient", "one"), new(null, number, ""), [],
        Ward.Adult(number % 2 == 0 ? "male" : "female") with { Version = $"{number}" });

    private static Version Of(int id, int number, Reading? reading)
    {
        var key = new ResourceKey("ehr", "Observation", $"r{id:00}");
        // Content decides between two versions with one number, as the digest does.
        var digest = reading is null ? "" : $"{reading.Kind.Key}|{reading.At:O}|{reading.Value}|{reading.Refused}|{reading.Device}|{reading.Specimen}|{reading.Preliminary}";
        return new(key, new(null, number, digest), reading is null ? [] : [reading with { Id = new(key, ""), Version = $"{number}" }], null);
    }

    private static Reading Make(Kind kind, double minute, int level, bool refused, string? device, string? specimen, bool preliminary)
    {
        var value = kind.IsCoded ? level % kind.Codes.Count : Level(kind, level);
        var reading = refused
            ? Ward.Refused("x", kind, RespDerive.Physiology.Withheld.UnitUnknown, minute)
            : Ward.Read("x", kind, value, minute);
        var gas = kind.Origin == Origin.Laboratory;
        return reading with
        {
            Device = gas ? null : device,
            Specimen = gas ? specimen : null,
            Streamed = !gas && device is not null && kind.Origin == Origin.Measurement,
            Preliminary = preliminary,
        };
    }

    private static double Level(Kind kind, int level) => kind.Key switch
    {
        "pao2" => 55 + (level * 20),
        "paco2" => 35 + (level * 5),
        "fio2-set" or "fio2" or "fio2-measured" => 0.4 + (level * 0.05),
        "plateau-pressure" => 20 + level,
        "peak-inspiratory-pressure" => 26 + level,
        "mean-airway-pressure" => 12 + level,
        "height" => 160 + (level * 5),
        "spo2" => 90 + level,
        "barometric-pressure" => 740 + level,
        "minute-volume-expired" => 8 + level,
        "tidal-volume-expired" or "tidal-volume" => 400 + (level * 20),
        "respiratory-rate-spontaneous" => level == 4 ? 3 : 0,
        "respiratory-rate-total" or "respiratory-rate-set" => 16 + level,
        _ => 5 + level,
    };
}
