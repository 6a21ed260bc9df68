using CsCheck;
using RespDerive.Physiology.Definitions;

namespace RespDerive.Physiology.Tests;

/// <summary>
/// The breathing rate of least work (Otis, Fenn and Rahn, J Appl Physiol 1950;2:592) and of least force (Mead, J Appl Physiol 1960;15:325)
/// against a search over the work and the force themselves, written out here once more, and against what is seen at the bedside.
/// </summary>
public sealed class LeastWorkTests
{
    private const double Ventilation = 4.5;
    private const double DeadSpace = 150;

    /// <summary>Alveolar ventilation L/min, dead space mL, resistance cm[H2O].s/L, compliance mL/cm[H2O] with a time constant of 0.05 to 3 s.</summary>
    private static readonly Gen<(double Ventilation, double DeadSpace, double Resistance, double Compliance)> Lungs =
        Gen.Select(Gen.Double[2, 12], Gen.Double[60, 400], Gen.Double[1, 40], Gen.Double[10, 150])
            .Where(lung => lung.Item3 * lung.Item4 is > 50 and < 3000);

    /// <summary>
    /// Breathing rates at rest: normal 16 to 18, obstructed 10 to 12, stiff 20 to 25 per minute: common practice, no single source.
    /// Resistance 2 to 3 in health and near 10 in obstruction, compliance 100 in health and 25 to 40 in stiff lungs: same standing.
    /// </summary>
    [Theory]
    [InlineData(3, 100, 16, 18)]
    [InlineData(10, 100, 10, 12)]
    [InlineData(9, 110, 10, 12)]
    [InlineData(3, 40, 20, 25)]
    [InlineData(3, 25, 20, 25)]
    public void The_rate_of_least_work_is_the_rate_seen_at_the_bedside(double resistance, double compliance, double least, double greatest)
    {
        var computed = ByHand.Compute(CatalogueData.Of("minimum-work-rate"),
            [("VA", Ventilation, "L/min"), ("VD", DeadSpace, "mL"), ("R", resistance, "cm[H2O].s/L"), ("C", compliance, "mL/cm[H2O]")]);
        Assert.InRange(computed.Computation.Value, least, greatest);
    }

    [Fact]
    public void No_other_rate_costs_less_work() => Lungs.Sample(
        lung =>
        {
            var closed = MinimumWorkRate.Of(lung.Ventilation, lung.DeadSpace, lung.Resistance, lung.Compliance);
            var searched = Least(rate => Work(rate, lung.Ventilation, lung.DeadSpace, lung.Resistance, lung.Compliance));
            return Math.Abs(closed - searched) < 1e-4 * searched;
        },
        iter: 500, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void No_other_rate_needs_less_force() => Lungs.Sample(
        lung =>
        {
            var closed = MinimumForceRate.Of(lung.Ventilation, lung.DeadSpace, lung.Resistance, lung.Compliance);
            var searched = Least(rate => Force(rate, lung.Ventilation, lung.DeadSpace, lung.Resistance, lung.Compliance));
            return Math.Abs(closed - searched) < 1e-4 * searched;
        },
        iter: 500, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void The_closed_form_is_the_printed_one() => Lungs.Sample(
        lung =>
        {
            var constant = lung.Resistance * lung.Compliance / 60_000;
            var printed = (Math.Sqrt(1 + (4 * Math.PI * Math.PI * constant * 1000 * lung.Ventilation / lung.DeadSpace)) - 1) / (2 * Math.PI * Math.PI * constant);
            return Math.Abs(MinimumWorkRate.Of(lung.Ventilation, lung.DeadSpace, lung.Resistance, lung.Compliance) - printed) < 1e-9 * printed;
        },
        iter: 500, seed: "0000KOJ0mLW2", threads: 1);

    [Fact]
    public void The_rate_falls_and_the_breath_grows_with_resistance_and_with_compliance() => Lungs.Sample(
        lung =>
        {
            var (ventilation, deadSpace, resistance, compliance) = lung;
            var here = MinimumWorkRate.Of(ventilation, deadSpace, resistance, compliance);
            var narrow = MinimumWorkRate.Of(ventilation, deadSpace, resistance * 1.1, compliance);
            var soft = MinimumWorkRate.Of(ventilation, deadSpace, resistance, compliance * 1.1);
            return narrow < here && soft < here
                && MinimumWorkVt.Of(ventilation, deadSpace, narrow) > MinimumWorkVt.Of(ventilation, deadSpace, here)
                && MinimumForceRate.Of(ventilation, deadSpace, resistance * 1.1, compliance) < MinimumForceRate.Of(ventilation, deadSpace, resistance, compliance);
        },
        iter: 500, seed: "0000KOJ0mLW2", threads: 1);

    /// <summary>Fabry 2024, abstract: elastic power is least at a tidal volume of twice the dead space.</summary>
    [Fact]
    public void Without_resistance_the_breath_is_twice_the_dead_space()
    {
        foreach (var resistance in (double[])[0, 1e-15, 1e-9, 1e-6])
        {
            var rate = MinimumWorkRate.Of(Ventilation, DeadSpace, resistance, 100);
            Assert.Equal(MinimumElasticPowerVt.Of(DeadSpace), MinimumWorkVt.Of(Ventilation, DeadSpace, rate), 1e-3);
        }
    }

    /// <summary>Rate, volume and work found by search to seven digits; Otis 1950 for the criterion.</summary>
    [Fact]
    public void Rate_volume_and_work_belong_together()
    {
        Given[] lung = [("VA", Ventilation, "L/min"), ("VD", DeadSpace, "mL"), ("R", 3, "cm[H2O].s/L"), ("C", 100, "mL/cm[H2O]")];
        var rate = Least(at => Work(at, Ventilation, DeadSpace, 3, 100));
        var computed = ByHand.Compute(CatalogueData.Of("work-rate-total"), lung);
        Assert.Equal(rate, ByHand.Compute(CatalogueData.Of("minimum-work-rate"), lung).Computation.Value, 1e-4);
        Assert.Equal(Ventilation * 1000 / rate + DeadSpace, ByHand.Compute(CatalogueData.Of("minimum-work-vt"), lung).Computation.Value, 1e-2);
        Assert.Equal(Work(rate, Ventilation, DeadSpace, 3, 100), computed.Computation.Value, 1e-9);
        Assert.Equal("at-rate-of-least-work", computed.Computation.Variant);
    }

    /// <summary>Work of sinusoidal breathing a minute (J): a quarter-ellipse of resistance on a triangle of elastance, the flow integrated in steps.</summary>
    private static double Work(double rate, double ventilation, double deadSpace, double resistance, double compliance)
    {
        var volume = (ventilation / rate) + (deadSpace / 1000);
        var duration = 30 / rate;
        const int Steps = 200;
        var resistive = 0.0;
        for (var i = 0; i < Steps; i++)
        {
            var flow = volume * Math.PI / (2 * duration) * Math.Sin(Math.PI * (i + 0.5) / Steps);
            resistive += resistance * flow * flow * duration / Steps;
        }

        return rate * 0.0980665 * (resistive + (volume * volume * 1000 / (2 * compliance)));
    }

    /// <summary>Amplitude of the driving pressure of sinusoidal breathing (cm[H2O]): elastic and resistive part a quarter period apart.</summary>
    private static double Force(double rate, double ventilation, double deadSpace, double resistance, double compliance)
    {
        var amplitude = ((ventilation / rate) + (deadSpace / 1000)) / 2;
        var elastic = amplitude * 1000 / compliance;
        var resistive = amplitude * 2 * Math.PI * rate / 60 * resistance;
        return Math.Sqrt((elastic * elastic) + (resistive * resistive));
    }

    /// <summary>Golden section over 1 to 500 per minute.</summary>
    private static double Least(Func<double, double> cost)
    {
        var (low, high) = (Math.Log(1), Math.Log(500));
        var golden = (Math.Sqrt(5) - 1) / 2;
        for (var i = 0; i < 80; i++)
        {
            var (left, right) = (high - (golden * (high - low)), low + (golden * (high - low)));
            (low, high) = cost(Math.Exp(left)) < cost(Math.Exp(right)) ? (low, right) : (left, high);
        }

        return Math.Exp((low + high) / 2);
    }
}
