using CsCheck;
using RespDerive.Sandbox.Patients.Lung;

namespace RespDerive.Sandbox.Tests.Patients;

/// <summary>The one-compartment lung against what the equation of motion says in closed form.</summary>
public sealed class BreathTests
{
    private static readonly RespiratorySystem s_lung = new(0.050, 10, 20);
    private static readonly Ventilation s_volume = new(BreathMode.VolumeControlled) { TidalVolume = 0.5, Flow = 1, Rate = 20, Peep = 5 };
    private static readonly Ventilation s_pressure = new(BreathMode.PressureControlled) { InspiratoryPressure = 12, InspiratoryTime = 1, Rate = 15, Peep = 6 };

    // Passive emptying is exponential: 63.2, 86.5, 95.0 and 98.2 % are out after 1, 2, 3 and 4 time constants.
    // Textbook relation (e.g. Nunn's Applied Respiratory Physiology, chapter on resistance; locator from memory).
    [Theory]
    [InlineData(1, 63.2)]
    [InlineData(2, 86.5)]
    [InlineData(3, 95.0)]
    [InlineData(4, 98.2)]
    public void Emptying_follows_the_time_constant(int constants, double percent)
    {
        Assert.Equal(1.0, s_lung.ExpiratoryTimeConstant, 12);
        var left = Breath.AfterExpiration(s_lung, 1, constants * s_lung.ExpiratoryTimeConstant);
        Assert.Equal(percent, 100 * (1 - left), 0.05);
    }

    // Intrinsic PEEP of a constant breath is a geometric series: V0 = VT·k/(1−k), k = exp(−Te/RC).
    [Fact]
    public void Intrinsic_peep_arises_when_expiration_is_short()
    {
        var k = Math.Exp(-(3 - 0.5) / 1.0);
        var breath = Breath.Steady(s_lung, s_volume);
        Assert.Equal(0.5 * k / (1 - k), breath.Trapped, 9);
        Assert.Equal(5 + (0.5 * k / (1 - k) / 0.050), breath.TotalPeep, 9);
        Assert.True(Breath.Steady(s_lung, s_volume with { Rate = 30 }).TotalPeep > breath.TotalPeep + 1);
        Assert.Equal(5, Breath.Steady(s_lung, s_volume with { Rate = 4 }).TotalPeep, 3);
    }

    // Equation of motion at end inspiration with constant flow: peak − plateau = R·flow.
    [Fact]
    public void Peak_exceeds_plateau_by_the_resistive_pressure()
    {
        var breath = Breath.Steady(s_lung, s_volume);
        Assert.Equal(10, breath.Peak - breath.Plateau, 9);
    }

    // Mean of a square pressure wave: PEEP + (Pinsp − PEEP)·Ti/Ttot (common practice, no single source).
    [Fact]
    public void Mean_pressure_of_a_square_wave()
    {
        Assert.Equal(6 + (12 * 1.0 / 4), Breath.Steady(s_lung, s_pressure).Mean, 12);
    }

    // Static compliance: plateau − total PEEP = VT/C, whatever the settings.
    [Fact]
    public void Driving_pressure_is_tidal_volume_over_compliance() =>
        Gen.Select(Gen.Double[0.015, 0.1], Gen.Double[3, 30], Gen.Double[3, 40], Gen.Double[8, 35], Gen.Double[0, 18], Gen.Bool)
            .Sample((compliance, inspiratory, expiratory, rate, peep, volume) =>
            {
                var lung = new RespiratorySystem(compliance, inspiratory, expiratory);
                var set = (volume ? s_volume : s_pressure) with { Rate = rate, Peep = peep, InspiratoryTime = 20 / rate };
                var breath = Breath.Steady(lung, set);
                Assert.Equal(breath.ExpiredVolume / compliance, breath.Plateau - breath.TotalPeep, 6);
                Assert.True(breath.TotalPeep >= peep && breath.Mean >= peep && breath.Mean < breath.Peak);
                Assert.True(volume ? Math.Abs(breath.ExpiredVolume - 0.5) < 1e-6 : breath.Plateau <= breath.Peak + 1e-9);
            });

    // The closed form against a numerical solution of flow = (Paw − PEEP − V/C)/R in steps of 50 µs.
    [Theory]
    [InlineData(true)]
    [InlineData(false)]
    public void Closed_form_agrees_with_numerical_integration(bool volumeControlled)
    {
        const double dt = 5e-5;
        var set = volumeControlled ? s_volume : s_pressure;
        var inspiration = volumeControlled ? 0.5 : 1.0;
        double v = 0, area = 0, end = 0, peak = 0;
        for (var breath = 0; breath < 12; breath++)
        {
            area = peak = 0;
            var steps = (int)Math.Round(set.Cycle / dt);
            for (var i = 0; i < steps; i++)
            {
                var inspiring = i * dt < inspiration - (dt / 2);
                var flow = !inspiring ? -v / 0.050 / 20 : volumeControlled ? 1 : (12 - (v / 0.050)) / 10;
                var pressure = !inspiring ? set.Peep : volumeControlled ? set.Peep + (v / 0.050) + (10 * flow) : set.Peep + 12;
                (area, peak) = (area + (pressure * dt), Math.Max(peak, pressure));
                v += flow * dt;
                end = inspiring ? v : end;
            }
        }
        var steady = Breath.Steady(s_lung, set);
        Assert.Equal(steady.Trapped, v, 3e-4);
        Assert.Equal(steady.Plateau, set.Peep + (end / 0.050), 1e-2);
        Assert.Equal(steady.Mean, area / set.Cycle, 1e-2);
        Assert.Equal(steady.Peak, peak, 1e-2);
    }
}
