using CsCheck;
using RespDerive.Physiology.Definitions;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// Mechanical power against the integral of airway pressure over volume of a simulated breath of one compartment, written out here:
/// power is work, work is that integral (definition, no source needed). Forms of Gattinoni 2016, Giosa 2019 and Becher 2019.
/// </summary>
public sealed class MechanicalPowerTests
{
    private const double Printed = 0.098;

    /// <summary>Breath in mL, elastance in cm[H2O]/L, resistance in cm[H2O].s/L, PEEP in cm[H2O], rate per minute, IE.</summary>
    private static readonly Gen<(double Volume, double Elastance, double Resistance, double Peep, double Rate, double Ratio)> Breaths =
        Gen.Select(Gen.Double[200, 700], Gen.Double[10, 60], Gen.Double[3, 30], Gen.Double[0, 18], Gen.Double[8, 35], Gen.Double[0.25, 1]);

    [Fact]
    public void Both_forms_for_volume_control_are_one_at_constant_flow() => Breaths.Sample(
        breath =>
        {
            var (volume, elastance, resistance, peep, rate, ratio) = breath;
            var time = 60 / rate * ratio / (1 + ratio);
            var plateau = peep + (elastance * volume / 1000);
            var peak = plateau + (resistance * volume / 1000 / time);
            var full = MechanicalPowerVcv.Of(rate, volume, elastance, ratio, resistance, peep, Printed);
            return Math.Abs(full - MechanicalPowerVcvSimplified.Of(rate, volume, peak, plateau, peep, Printed)) < 1e-9 * full;
        },
        iter: 1000, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void The_form_for_volume_control_is_the_integral_of_pressure_over_volume()
    {
        // 0.5 L in 1 s against 30 cm[H2O]/L, 10 cm[H2O].s/L and PEEP 5, 20 a minute.
        var work = 0.0;
        const int Steps = 1000;
        for (var i = 0; i < Steps; i++)
        {
            var volume = 0.5 * (i + 0.5) / Steps;
            work += (5 + (30 * volume) + (10 * 0.5)) * 0.5 / Steps;
        }

        Assert.Equal(Printed * 20 * work, MechanicalPowerVcv.Of(20, 500, 30, 0.5, 10, 5, Printed), 1e-9);
    }

    [Theory]
    [InlineData(0.05)]
    [InlineData(0.15)]
    [InlineData(0.4)]
    public void The_form_for_pressure_control_is_the_integral_of_pressure_over_volume(double rise)
    {
        const double Resistance = 10;
        const double Compliance = 30;
        var (work, volume, step) = (0.0, 0.0, 1e-5);
        for (var time = step / 2; time < 2.5; time += step)
        {
            var above = 15 * Math.Min(1, time / rise);
            var flow = (above - (volume * 1000 / Compliance)) / Resistance;
            work += (10 + above) * flow * step;
            volume += flow * step;
        }

        Assert.Equal(Printed * 20 * work, MechanicalPowerPcv.Of(20, volume * 1000, 15, 10, Resistance, Compliance, rise, Printed), 0.002);
    }

    [Fact]
    public void A_slow_rise_takes_power_away_and_none_leaves_the_simplified_form()
    {
        var simplified = MechanicalPowerPcvSimplified.Of(20, 400, 15, 10, Printed);
        Assert.Equal(simplified, MechanicalPowerPcv.Of(20, 400, 15, 10, 10, 30, 0, Printed), 1e-12);
        Assert.Equal(simplified, MechanicalPowerPcv.Of(20, 400, 15, 10, 10, 30, 1e-4, Printed), 1e-2);
        Assert.True(MechanicalPowerPcv.Of(20, 400, 15, 10, 10, 30, 0.2, Printed) < MechanicalPowerPcv.Of(20, 400, 15, 10, 10, 30, 0.1, Printed));
    }

    [Fact]
    public void The_surrogate_is_near_the_full_form_where_resistance_is_ten() => Breaths.Sample(
        breath =>
        {
            var (volume, elastance, _, peep, rate, _) = breath;
            const double Flow = 45;
            var plateau = peep + (elastance * volume / 1000);
            var full = MechanicalPowerVcvSimplified.Of(rate, volume, plateau + (10 * Flow / 60), plateau, peep, Printed);
            return Math.Abs(MechanicalPowerVcvSurrogate.Of(volume * rate / 1000, plateau + (10 * Flow / 60), peep, Flow) - full) < 0.1 * full;
        },
        iter: 1000, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void Power_is_the_work_per_breath_and_the_work_of_peep_times_rate() => Breaths.Sample(
        breath =>
        {
            var (volume, elastance, resistance, peep, rate, ratio) = breath;
            var flow = volume / 1000 / (60 / rate * ratio / (1 + ratio)) * 60;
            var works = WorkElasticPerBreath.Of(elastance, volume) + WorkResistivePerBreath.AtConstantFlow(resistance, volume, flow)
                + (0.0980665 * peep * volume / 1000);
            var power = MechanicalPowerVcv.Of(rate, volume, elastance, ratio, resistance, peep, 0.0980665);
            return Math.Abs(power - (rate * works)) < 1e-9 * power;
        },
        iter: 1000, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void The_printed_constant_stands_in_the_result_and_may_be_replaced()
    {
        Given[] breath = [("RR", 20, "/min"), ("VT", 0.5, "L"), ("Ppeak", 25, "cm[H2O]"), ("Pplat", 20, "cm[H2O]"), ("PEEPtot", 5, "cm[H2O]")];
        var computed = ByHand.Compute(CatalogueData.Of("mechanical-power-vcv-simplified"), breath);
        Assert.Equal(["work-factor", "ventilator-mode-taken"], computed.Inputs.Where(input => input.Assumed).Select(input => input.Kind.Key));
        Assert.Contains(Flags.ModeUnconfirmed, computed.Computation.Flags);

        var known = ByHand.Compute(CatalogueData.Of("mechanical-power-vcv-simplified"), [.. breath, ("mode", "volume control"), ("k", 0.0980665, "J/(L.cm[H2O])")]);
        Assert.DoesNotContain(known.Inputs, input => input.Assumed);
        Assert.DoesNotContain(Flags.ModeUnconfirmed, known.Computation.Flags);
        Assert.Equal(computed.Computation.Value / Printed * 0.0980665, known.Computation.Value, 1e-12);
    }
}
