using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

/// <summary>Codes that do not mean what they seem to, as found in published profiles and public data.</summary>
public class TrapTests
{
    [Theory]
    [InlineData("76248-4", "cm[H2O]", "setting", "peep-set")]
    [InlineData("76248-4", "cm[H2O]", "measurement", "peep")]
    [InlineData("76248-4", "cm[H2O]", "calculation", "peep")]
    [InlineData("76222-9", "mL", "setting", "tidal-volume-set")]
    [InlineData("76222-9", "mL", "measurement", "tidal-volume")]
    [InlineData("33438-3", "/min", "setting", "respiratory-rate-set")]
    [InlineData("76531-3", "cm[H2O]", "measurement", "peak-inspiratory-pressure")]
    public void The_metric_tells_set_from_measured(string code, string unit, string category, string kind)
    {
        var reading = One(Observation(Loinc(code), Quantity("15", unit), OfMetric), Metric(category));

        Assert.Equal((kind, (string?)null), (reading.Kind.Key, reading.Refused));
        Assert.Equal("Device/v1", reading.Device);
    }

    [Theory]
    [InlineData("76531-3", "setting", "peak-pressure-limit")]
    [InlineData("76531-3", "unspecified", "peak-pressure-or-limit")]
    public void A_pressure_limit_is_never_a_peak_pressure(string code, string category, string key) =>
        Assert.Equal(new IgnoredPart("", Refusals.NotUsed, key), Assert.Single(Read(Observation(Loinc(code), Quantity("40", "cm[H2O]"), OfMetric), Metric(category)).Ignored));

    [Fact]
    public void Without_its_metric_a_maximum_is_not_used_and_the_metric_is_asked_for()
    {
        var result = Read(Observation(Loinc("76248-4"), Quantity("8", "cm[H2O]"), OfMetric));

        Assert.Contains("DeviceMetric/m1", result.Unresolved);
        Assert.Equal("peep", Assert.Single(result.Readings).Kind.Key);
        Assert.Empty(Read(Observation(Loinc("76531-3"), Quantity("40", "cm[H2O]"))).Readings);
        Assert.Contains("DeviceMetric/m1", Read(Observation(Loinc("76531-3"), Quantity("40", "cm[H2O]"), OfMetric)).Unresolved);
        Assert.Empty(Read(Observation(Loinc("8867-4"), Quantity("40", "/min"), OfMetric)).Unresolved);
    }

    [Fact]
    public void A_setting_under_the_code_of_a_plateau_is_refused() =>
        Assert.Equal(Withheld.InputInvalid, One(Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"), OfMetric), Metric("setting")).Refused);

    [Theory]
    [InlineData("60802-6")]
    [InlineData("20060-0")]
    [InlineData("60952-9")]
    [InlineData("33436-7")]
    public void Look_alikes_of_plateau_mean_and_driving_pressure_are_kept_apart(string code) =>
        Assert.Equal(Refusals.NotUsed, Assert.Single(Read(Observation(Loinc(code), Quantity("15", "cm[H2O]"))).Ignored).Reason);

    [Fact]
    public void A_mean_over_the_cycle_coded_also_as_a_mean_of_inspiration_is_refused() =>
        Assert.Equal(Withheld.InputInvalid, One(Observation(Loinc("76530-5") + "," + Coding(CodeSystems.Snomed, "698821009"), Quantity("15", "cm[H2O]"))).Refused);

    [Theory]
    [InlineData("59408-5,2708-6", "vital-signs", "spo2")]
    [InlineData("59408-5,2708-6", "laboratory", "spo2")]
    [InlineData("59408-5", "", "spo2")]
    [InlineData("2708-6", "vital-signs", "spo2")]
    public void A_saturation_is_of_pulse_oximetry_by_code_or_by_vital_sign(string codes, string category, string kind) =>
        Assert.Equal(kind, One(Observation(string.Join(',', codes.Split(',').Select(Loinc)), Quantity("94", "%"), category.Length == 0 ? "" : Category(category))).Kind.Key);

    [Fact]
    public void A_monitor_code_beside_the_arterial_one_is_pulse_oximetry() =>
        Assert.Equal(Kinds.SpO2, One(Observation(Loinc("2708-6") + "," + Coding(CodeSystems.Mdc, "150456"), Quantity("94", "%"))).Kind);

    [Fact]
    public void A_laboratory_saturation_is_never_pulse_oximetry()
    {
        var lab = Read(Observation(Loinc("2708-6"), Quantity("94", "%"), Category("laboratory")));

        Assert.DoesNotContain(lab.Readings, reading => reading.Kind == Kinds.SpO2);
        Assert.DoesNotContain(Read(Observation(Loinc("2708-6"), Quantity("94", "%"), OfSpecimen), Specimen("BLDA")).Readings, reading => reading.Kind == Kinds.SpO2);
    }

    [Fact]
    public void A_saturation_that_could_be_either_is_neither() =>
        Assert.Equal(Refusals.CodeAmbiguous, Assert.Single(Read(Observation(Loinc("2708-6"), Quantity("94", "%"))).Ignored).Reason);

    [Fact]
    public void A_snomed_system_with_an_edition_matches() =>
        Assert.Equal(Kinds.Plateau, One(Observation("""
            {"system":"http://snomed.info/sct","version":"http://snomed.info/sct/900000000000207008","code":"698822002"}
            """, Quantity("24", "cm[H2O]"))).Kind);

    [Fact]
    public void The_name_of_a_muscle_test_is_no_peak_pressure() =>
        Assert.Equal(Refusals.NotUsed, Assert.Single(Read(Observation(Coding(CodeSystems.Snomed, "27913002"), Quantity("24", "cm[H2O]"))).Ignored).Reason);

    [Fact]
    public void An_unmapped_code_is_counted_and_nothing_else() =>
        Assert.Equal(new IgnoredPart("", Refusals.CodeNotMapped, null), Assert.Single(Read(Observation(Loinc("2345-7"), Quantity("5", "mmol/L"))).Ignored));

    [Fact]
    public void Readings_of_a_device_are_streamed_unless_the_source_says_otherwise()
    {
        var json = Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"), "\"device\":{\"reference\":\"Device/v1\"}");

        Assert.True(One(json).Streamed);
        Assert.False(Assert.Single(Read(new ReadingOptions { Default = new() { Streamed = false } }, json).Readings).Streamed);
        Assert.False(One(Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"))).Streamed);
        Assert.False(One(Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), "\"device\":{\"reference\":\"Device/v1\"}")).Streamed);
        Assert.True(Assert.Single(Read(new ReadingOptions { Sources = new Dictionary<string, SourceReading> { ["ehr"] = new() { Streamed = true } } },
            Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"))).Readings).Streamed);
    }
}
