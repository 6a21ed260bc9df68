using RespDerive.Sandbox.Patients.Charting;
using RespDerive.Sandbox.Patients.Gas;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients;

/// <summary>The three invented patients of Ward Alder. Numbers are chosen to be plausible, not taken from anyone.</summary>
internal static class Profiles
{
    public static readonly Profile[] All = [Stiff(), Obstructed(), Recovering()];

    /// <summary>A stiff, shunting lung (as in ARDS): low tidal volume, high PEEP; it collapses a little around hour 6.</summary>
    private static Profile Stiff() => new()
    {
        GivenName = "Ash",
        Gender = "male",
        BirthDate = "1966-03-14",
        Height = 178,
        Units = new Units("mm[Hg]", "cm[H2O]", FractionAsOne: false, VolumeInLitres: false),
        SpO2Target = (0.90, 0.95),
        MeasuresOxygen = false,
        Grouping = Grouping.Report,
        Start = new Ventilation(BreathMode.VolumeControlled) { TidalVolume = 0.44, Flow = 1.0, Rate = 24, Peep = 12, FiO2 = 0.60 },
        Plan =
        [
            new(2.2, v => v with { Rate = 26 }),
            new(7.0, v => v with { Peep = 14 }),
            new(16.0, v => v with { Peep = 12 }),
        ],
        Lung = h => new RespiratorySystem(0.032 - (0.0035 * Collapse(h)) + Ramp(h, 8, 0, 30, 0.008), 11, 13),
        Body = h => new Circulation(245, 0.80, 6.8, 10.8, 26, 0.30 + (0.06 * Collapse(h)) - Ramp(h, 8, 0, 30, 0.10), 0.61 - Ramp(h, 8, 0, 30, 0.05), WashIn: 1.5),
    };

    /// <summary>Airflow obstruction (as in COPD): expiration is too short at first, so intrinsic PEEP arises by itself.</summary>
    private static Profile Obstructed() => new()
    {
        GivenName = "Birch",
        Gender = "male",
        BirthDate = "1957-10-02",
        Height = 174,
        Units = new Units("kPa", "mbar", FractionAsOne: true, VolumeInLitres: true),
        SpO2Target = (0.88, 0.93),
        AnalysisTime = true,
        HoldsFromDevice = true,
        Start = new Ventilation(BreathMode.VolumeControlled) { TidalVolume = 0.48, Flow = 0.75, Rate = 22, Peep = 5 / Units.MillibarPerCmH2O, FiO2 = 0.35 },
        Plan =
        [
            new(1.6, v => v with { Rate = 18 }),
            new(3.6, v => v with { Flow = 1.0 }),
            new(9.0, v => v with { Rate = 16 }),
        ],
        Lung = h => new RespiratorySystem(0.060, 17 - Ramp(h, 4, 0, 24, 4), 33 - Ramp(h, 4, 0, 24, 11)),
        Body = h => new Circulation(205, 0.82, 5.4, 13.6, 30, 0.17 - Ramp(h, 6, 0, 30, 0.04), 0.61, WashIn: 5),
    };

    /// <summary>Getting better under pressure control, then breathing with pressure support.</summary>
    private static Profile Recovering() => new()
    {
        GivenName = "Cedar",
        Gender = "female",
        BirthDate = "1981-06-27",
        Height = 170,
        Units = new Units("kPa", "cm[H2O]", FractionAsOne: false, VolumeInLitres: false, HeightInMetres: true),
        SpO2Target = (0.92, 0.96),
        Grouping = Grouping.Panel,
        Start = new Ventilation(BreathMode.PressureControlled) { InspiratoryPressure = 11, InspiratoryTime = 1.0, Rate = 20, Peep = 10, FiO2 = 0.50 },
        Plan =
        [
            new(1.7, v => v with { Peep = 8 }),
            new(2.8, v => v with { InspiratoryPressure = 10, Rate = 18 }),
            new(4.5, v => v with { Peep = 6 }),
            new(6.5, v => v with { Mode = BreathMode.PressureSupport, InspiratoryPressure = 7, InspiratoryTime = 0.9, Effort = 3, Rate = 17 }),
        ],
        Lung = h => new RespiratorySystem(0.040 + Ramp(h, 0, 0, 10, 0.014), 9, 10),
        Body = h => new Circulation(215, 0.83, 6.0, 11.6, 25, 0.21 - Ramp(h, 0, 0, 10, 0.11), 0.42, WashIn: 1.5),
    };

    private static double Ramp(double hours, double from, double low, double to, double high) =>
        low + ((high - low) * Math.Clamp((hours - from) / (to - from), 0, 1));

    /// <summary>0 to 1 and back: loss of aerated lung between hours 5 and 9.</summary>
    private static double Collapse(double hours) => Ramp(hours, 5, 0, 6, 1) - Ramp(hours, 7.2, 0, 9, 1);
}
