using System.Globalization;
using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class OxygenFractionTests
{
    private static readonly ReadingOptions Repair = new() { Fio2PercentRepair = true };

    private static string Fio2(string number, string unit) => Observation(Loinc("3150-0"), Quantity(number, unit));

    [Theory]
    [InlineData("40", "%", 0.4)]
    [InlineData("100", "%", 1.0)]
    [InlineData("21", "%", 0.21)]
    [InlineData("0.4", "1", 0.4)]
    [InlineData("1.0", "1", 1.0)]
    public void The_unit_decides(string number, string unit, double fraction) => Assert.Equal(fraction, One(Fio2(number, unit)).Value, 1e-12);

    [Theory]
    [InlineData("0.4", "%")]
    [InlineData("1.0", "%")]
    [InlineData("40", "1")]
    [InlineData("4", "%")]
    [InlineData("19", "%")]
    [InlineData("0.1", "1")]
    [InlineData("2", "1")]
    [InlineData("101", "%")]
    public void What_does_not_fit_its_unit_is_refused(string number, string unit)
    {
        var reading = One(Fio2(number, unit));

        Assert.Equal(Withheld.Fio2UnitImplausible, reading.Refused);
        Assert.Equal(decimal.Parse(number, CultureInfo.InvariantCulture), reading.Given);
    }

    [Fact]
    public void The_switch_reads_a_fraction_sent_as_percent_and_flags_it()
    {
        var reading = Assert.Single(Read(Repair, Fio2("0.4", "%")).Readings);

        Assert.Equal(0.4, reading.Value, 1e-12);
        Assert.Contains(ReadingFlags.Fio2PercentRepaired, reading.Flags);
    }

    [Theory]
    [InlineData("1.5", "%")]
    [InlineData("4", "%")]
    [InlineData("19.9", "%")]
    [InlineData("40", "1")]
    public void The_switch_repairs_nothing_else(string number, string unit) =>
        Assert.Equal(Withheld.Fio2UnitImplausible, Assert.Single(Read(Repair, Fio2(number, unit)).Readings).Refused);

    [Fact]
    public void The_switch_does_not_touch_a_saturation() =>
        Assert.Equal(Withheld.InputInvalid, Assert.Single(Read(Repair, Observation(Loinc("59408-5"), Quantity("0.97", "%"))).Readings).Refused);

    [Fact]
    public void A_partial_pressure_under_the_code_is_refused() => Assert.Equal(Withheld.UnitUnknown, One(Fio2("280", "mm[Hg]")).Refused);

    /// <summary>Shape of the US Core pulse-oximetry profile: flow and concentration as components.</summary>
    [Fact]
    public void Concentration_and_flow_beside_a_saturation_are_readings_of_their_own()
    {
        var result = Read(Observation(Loinc("59408-5") + "," + Loinc("2708-6"), Quantity("94", "%"), Category("vital-signs") + """
            ,"component":[
              {"code":{"coding":[{"system":"http://loinc.org","code":"3151-8"}]},"valueQuantity":{"value":6,"system":"http://unitsofmeasure.org","code":"L/min"}},
              {"code":{"coding":[{"system":"http://loinc.org","code":"3150-0"}]},"valueQuantity":{"value":40,"system":"http://unitsofmeasure.org","code":"%"}},
              {"code":{"coding":[{"system":"http://loinc.org","code":"3150-0"}]},"dataAbsentReason":{"text":"off"}}]
            """));

        Assert.Equal(
            [("", Kinds.SpO2, 94, null), ("3151-8", Kinds.OxygenFlow, 6, null), ("3150-0", Kinds.FiO2, 0.4, null), ("3150-0~2", Kinds.FiO2, double.NaN, Withheld.ValueAbsent)],
            result.Readings.Select(reading => (reading.Id.Part, reading.Kind, reading.Value, reading.Refused)));
        Assert.All(result.Readings, reading => Assert.Contains("Observation/o1", reading.Panels));
    }

    [Fact]
    public void A_measurement_by_its_metric_is_measured_and_a_setting_is_set()
    {
        var json = Observation(Coding(CodeSystems.Snomed, "250774007"), Quantity("40", "%"), OfMetric);

        Assert.Equal(Kinds.FiO2Measured, One(json, Metric("measurement")).Kind);
        Assert.Equal(Kinds.FiO2Set, One(json, Metric("setting")).Kind);
        Assert.Equal(Kinds.FiO2, One(json, Metric("unspecified")).Kind);
    }
}
