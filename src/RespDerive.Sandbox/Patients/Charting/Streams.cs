using System.Text.Json.Nodes;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Patients.Charting;

/// <summary>What comes from the devices by itself: settings when they change, measurements every minute.</summary>
internal sealed class Streams(Chart chart, Units units, Dice dice, bool measuresOxygen)
{
    private Ventilation? _sent;

    /// <summary>Last displayed SpO2, which is what staff go by.</summary>
    public double? SpO2 { get; private set; }

    public void Write(Moment now, Instruments instruments)
    {
        WriteSettings(now.At, now.Set);
        WriteMeasurements(now, instruments);
    }

    /// <summary>FiO2 as set, written down once more by hand; sometimes with the wrong unit.</summary>
    public void WriteFiO2ByHand(DateTimeOffset at, double fio2, bool wrongUnit)
    {
        var quantity = wrongUnit ? Units.Quantity(fio2, 2, "%") : units.Fraction(fio2);
        var observation = chart.Bed.Observation(chart.NextId("fio2-charted"), Codes.SetFiO2, at, quantity);
        chart.File(WardEventKind.Setting, at, at.AddMinutes(dice.Between(1, 4)), Codes.SetFiO2, observation, wrongUnit ? " (ambiguous)" : "");
    }

    private void WriteSettings(DateTimeOffset at, Ventilation set)
    {
        var (last, filed) = (_sent, at.AddSeconds(dice.Between(3, 20)));
        _sent = set;
        if (last?.Mode != set.Mode)
        {
            var code = set.Mode switch
            {
                BreathMode.VolumeControlled => "volume-controlled",
                BreathMode.PressureControlled => "pressure-controlled",
                _ => "pressure-support",
            };
            chart.File(WardEventKind.Setting, at, filed, chart.Bed.Mode(chart.NextId("mode"), at, code), $"mode {code}");
        }
        void Changed(string kind, Code code, double? before, double value, JsonObject quantity)
        {
            if (before != value && value > 0)
            {
                chart.File(WardEventKind.Setting, at, filed, code, chart.Bed.Observation(chart.NextId(kind), code, at, quantity, chart.Bed.Ventilator));
            }
        }
        Changed("fio2-set", Codes.SetFiO2, last?.FiO2, set.FiO2, units.Fraction(set.FiO2));
        Changed("peep-set", Codes.SetPeep, last?.Peep, set.Peep, units.Pressure(set.Peep));
        Changed("vt-set", Codes.SetTidalVolume, last?.TidalVolume, set.TidalVolume, units.Volume(set.TidalVolume));
        Changed("flow-set", Codes.SetFlow, last?.Flow, set.Flow, Units.Flow(set.Flow));
        if (set.Mode != BreathMode.PressureSupport)
        {
            Changed("rate-set", Codes.SetRate, last?.Rate, set.Rate, Units.Quantity(set.Rate, 0, "/min"));
        }
    }

    private void WriteMeasurements(Moment now, Instruments with)
    {
        var (bed, at, filed) = (chart.Bed, now.At, now.At.AddSeconds(2));
        void Measured(string kind, Code code, JsonObject quantity, string device) =>
            chart.File(WardEventKind.Measurement, at, filed, code, bed.Observation(chart.NextId(kind), code, at, quantity, device));
        var (breath, fio2) = (now.Breath, with.FiO2(now.FiO2));
        Measured("vte", Codes.TidalVolume, units.Volume(with.Volume(breath.ExpiredVolume)), bed.Ventilator);
        Measured("rate", Codes.Rate, Units.Quantity(with.Rate(now.Set.Rate), 0, "/min"), bed.Ventilator);
        Measured("mv", Codes.MinuteVolume, Units.Quantity(with.MinuteVolume(breath.ExpiredVolume * now.Set.Rate, now.Set.Rate), 2, "L/min"), bed.Ventilator);
        Measured("peak", Codes.Peak, units.Pressure(with.Pressure(breath.Peak)), bed.Ventilator);
        Measured("mean", Codes.Mean, units.Pressure(with.Pressure(breath.Mean)), bed.Ventilator);
        Measured("peep", Codes.Peep, units.Pressure(with.Pressure(now.Set.Peep)), bed.PeepMetric);
        if (measuresOxygen)
        {
            Measured("fio2", units.FractionAsOne ? Codes.FiO2Fraction : Codes.FiO2Percent, units.FractionAsOne ? Units.Quantity(fio2, 3, "1") : Units.Quantity(fio2 * 100, 1, "%"), bed.Ventilator);
        }

        SpO2 = with.SpO2(now.Gas.SaO2);
        var observation = bed.SpO2(chart.NextId("spo2"), at, SpO2.Value);
        chart.File(WardEventKind.Measurement, at, filed, Codes.SpO2, observation);
    }
}
