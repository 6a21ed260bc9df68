using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class StatusTests
{
    private static string Gas(string status) => Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), status: status);

    [Theory]
    [InlineData("final", false, false)]
    [InlineData("amended", false, true)]
    [InlineData("corrected", false, true)]
    [InlineData("preliminary", true, false)]
    public void Usable_statuses_are_read_and_kept_apart(string status, bool preliminary, bool corrected)
    {
        var reading = One(Gas(status));

        Assert.Equal((Kinds.PaO2, 80, null, preliminary, corrected), (reading.Kind, reading.Value, reading.Refused, reading.Preliminary, reading.Corrected));
    }

    [Theory]
    [InlineData("registered")]
    [InlineData("unknown")]
    [InlineData("nonsense")]
    public void Other_statuses_are_refused_and_keep_their_place(string status)
    {
        var reading = One(Gas(status));

        Assert.Equal(Withheld.InputInvalid, reading.Refused);
        Assert.True(double.IsNaN(reading.Value));
        Assert.Equal(80m, reading.Given);
    }

    [Theory]
    [InlineData("entered-in-error")]
    [InlineData("cancelled")]
    public void Withdrawn_observations_leave_no_reading(string status)
    {
        var result = Read(Gas(status));

        Assert.True(result.Withdrawn);
        Assert.Empty(result.Readings);
    }

    [Fact]
    public void Own_results_are_recognised_and_never_read()
    {
        var json = Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), """
            "identifier":[{"system":"urn:mine","value":"a"}]
            """);

        var result = Read(new ReadingOptions { ResultIdentifierSystem = "urn:mine" }, json);

        Assert.True(result.Own);
        Assert.Empty(result.Readings);
        Assert.Single(Read(json).Readings);
    }

    [Fact]
    public void An_observation_of_nobody_or_of_a_device_is_refused()
    {
        var gas = Gas("final");

        Assert.Equal(Withheld.NoPatient, One(gas.Replace("Patient/p1", "Device/d1", StringComparison.Ordinal)).Refused);
        Assert.Equal(Withheld.NoPatient, One(gas.Replace("\"subject\":{\"reference\":\"Patient/p1\"},", "", StringComparison.Ordinal)).Refused);
    }

    [Fact]
    public void Without_version_and_time_of_change_the_order_is_flagged_unknown()
    {
        var json = Gas("final").Replace("\"meta\":{\"versionId\":\"3\",\"lastUpdated\":\"2031-05-06T11:00:00Z\"},", "", StringComparison.Ordinal);

        var reading = One(json);

        Assert.Contains(Flags.OrderUnknown, reading.Flags);
        Assert.Equal(16, reading.Version.Length);
        Assert.DoesNotContain(Flags.OrderUnknown, One(Gas("final")).Flags);
    }
}
