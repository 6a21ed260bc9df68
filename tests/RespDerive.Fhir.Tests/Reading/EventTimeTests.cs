using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class EventTimeTests
{
    private static readonly ReadingOptions Berlin = new() { Default = new() { Zone = TimeZoneInfo.FindSystemTimeZoneById("Europe/Berlin") } };

    private static string Gas(string effective, string more = "") => Observation(Loinc("2703-7"), Quantity("80", "mm[Hg]"), more, effective: effective);

    private static string Plateau(string effective) => Observation(Loinc("76259-1"), Quantity("24", "cm[H2O]"), effective: effective);

    private static DateTimeOffset Utc(int hour, int minute, int second = 0) => new(2031, 5, 6, hour, minute, second, TimeSpan.Zero);

    private static string At(string time) => $"\"effectiveDateTime\":\"{time}\"";

    [Fact]
    public void The_time_is_kept_as_sent()
    {
        var reading = One(Gas(At("2031-05-06T12:00:30.5+02:00")));

        Assert.Equal(Utc(10, 0, 30).AddMilliseconds(500), reading.At);
        Assert.Equal("2031-05-06T12:00:30.5+02:00", reading.AtText);
    }

    [Fact]
    public void A_gas_counts_from_its_collection()
    {
        var reading = One(Gas(At("2031-05-06T10:40:00Z"), OfSpecimen), Specimen("BLDA", Collected("2031-05-06T10:10:00Z")));

        Assert.Equal((Utc(10, 10), "2031-05-06T10:10:00Z"), (reading.At, reading.AtText));
        Assert.Empty(reading.Flags);
        Assert.Equal("Specimen/s1", reading.Specimen);
    }

    [Fact]
    public void A_collection_more_than_an_hour_before_is_flagged() =>
        Assert.Contains(Flags.TimeUncertain, One(Gas(At("2031-05-06T10:40:00Z"), OfSpecimen), Specimen("BLDA", Collected("2031-05-06T09:30:00Z"))).Flags);

    [Fact]
    public void A_collection_after_the_charted_time_is_not_believed() =>
        Assert.Equal(Utc(10, 0), One(Gas(At("2031-05-06T10:00:00Z"), OfSpecimen), Specimen("BLDA", Collected("2031-05-06T10:20:00Z"))).At);

    [Fact]
    public void A_collection_without_a_time_of_day_is_not_used() =>
        Assert.Equal(Utc(10, 0), One(Gas(At("2031-05-06T10:00:00Z"), OfSpecimen), Specimen("BLDA", Collected("2031-05-06"))).At);

    [Fact]
    public void A_collection_gives_the_minute_that_a_charted_date_lacks()
    {
        var reading = One(Gas(At("2031-05-06"), OfSpecimen), Specimen("BLDA", Collected("2031-05-06T09:15:00Z")));

        Assert.Equal((Utc(9, 15), (string?)null), (reading.At, reading.Refused));
    }

    [Fact]
    public void A_specimen_that_cannot_be_read_is_listed_and_flagged_and_the_charted_time_used()
    {
        var result = Read(Gas(At("2031-05-06T10:00:00Z"), OfSpecimen));
        var reading = Assert.Single(result.Readings);

        Assert.Contains("Specimen/s1", result.Unresolved);
        Assert.Contains(Flags.SpecimenUnread, reading.Flags);
        Assert.Equal((Utc(10, 0), (string?)null), (reading.At, reading.Refused));
    }

    [Fact]
    public void A_draw_counts_from_the_start_of_its_period_and_a_measured_interval_from_its_end()
    {
        const string period = "\"effectivePeriod\":{\"start\":\"2031-05-06T10:00:00Z\",\"end\":\"2031-05-06T10:05:00Z\"}";

        Assert.Equal(Utc(10, 0), One(Gas(period)).At);
        Assert.Equal(Utc(10, 5), One(Plateau(period)).At);
        Assert.Equal(Utc(10, 0), One(Observation(Loinc("20077-4"), Quantity("8", "cm[H2O]"), effective: period)).At);
    }

    [Fact]
    public void A_measured_interval_without_an_end_is_uncertain() =>
        Assert.Equal(Withheld.TimeUncertain, One(Plateau("\"effectivePeriod\":{\"start\":\"2031-05-06T10:00:00Z\"}")).Refused);

    [Theory]
    [InlineData("\"effectiveDateTime\":\"2031-05-06\"")]
    [InlineData("\"effectiveDateTime\":\"2031-05\"")]
    [InlineData("\"issued\":\"2031-05-06T10:00:00Z\"")]
    [InlineData("\"effectiveDateTime\":\"2031-13-45T10:00:00Z\"")]
    [InlineData("\"effectiveDateTime\":\"2031-05-06 10:00:00Z\"")]
    [InlineData("\"effectiveDateTime\":\"2031-05-06T10:00:00+0100\"")]
    [InlineData("")]
    public void A_time_not_known_to_the_minute_is_refused(string effective) => Assert.Equal(Withheld.TimeUncertain, One(Gas(effective)).Refused);

    [Theory]
    [InlineData("\"effectiveDateTime\":\"2031-05-06\"")]
    [InlineData("\"effectiveDateTime\":\"2031-05\"")]
    [InlineData("\"issued\":\"2031-05-06T10:00:00Z\"")]
    public void A_height_needs_no_time_of_day(string effective) =>
        Assert.Null(One(Observation(Loinc("8302-2"), Quantity("172", "cm"), effective: effective)).Refused);

    [Fact]
    public void A_time_without_a_zone_is_refused_unless_the_site_has_one()
    {
        var json = Gas(At("2031-05-06T12:00:00"));

        Assert.Equal(Withheld.TimeUncertain, One(json).Refused);

        var reading = Assert.Single(Read(Berlin, json).Readings);
        Assert.Equal((Utc(10, 0), (string?)null), (reading.At, reading.Refused));
        Assert.Contains(Flags.ZoneAssumed, reading.Flags);
        Assert.Equal("2031-05-06T12:00:00+02:00", reading.AtText);
    }

    [Theory]
    [InlineData("2030-10-27T02:30:00")] // twice
    [InlineData("2031-03-30T02:30:00")] // never
    public void The_hour_that_a_change_of_clocks_repeats_or_skips_stays_uncertain(string time) =>
        Assert.Equal(Withheld.TimeUncertain, Assert.Single(Read(Berlin, Gas(At(time))).Readings).Refused);

    [Fact]
    public void The_future_begins_two_minutes_after_the_version_was_stored()
    {
        Assert.Null(One(Gas(At("2031-05-06T11:02:00Z"))).Refused);
        Assert.Equal(Withheld.TimeUncertain, One(Gas(At("2031-05-06T11:02:01Z"))).Refused);
    }

    [Fact]
    public void Without_a_time_of_storage_the_future_is_judged_by_arrival()
    {
        static string Unversioned(string time) => Gas(At(time)).Replace("\"lastUpdated\":\"2031-05-06T11:00:00Z\"", "\"x\":1", StringComparison.Ordinal);

        Assert.Null(One(Unversioned("2031-05-06T12:01:00Z")).Refused);
        Assert.Equal(Withheld.TimeUncertain, One(Unversioned("2031-05-06T12:03:00Z")).Refused);
    }

    [Fact]
    public void A_leap_second_and_nine_digits_are_times()
    {
        Assert.Equal(new DateTimeOffset(2031, 5, 6, 11, 0, 0, TimeSpan.Zero), One(Gas(At("2031-05-06T10:59:60Z"))).At);
        Assert.Null(One(Gas(At("2031-05-06T10:59:59.123456789Z"))).Refused);
    }

    [Fact]
    public void The_end_of_a_finished_encounter_is_an_event()
    {
        const string encounter = """
            {"resourceType":"Encounter","id":"e1","meta":{"versionId":"2"},"status":"finished","class":{"code":"IMP"},"subject":{"reference":"Patient/p1"},
             "period":{"start":"2031-05-01T08:00:00Z","end":"2031-05-06T09:00:00Z"} }
            """;

        var end = One(encounter);

        Assert.Equal((Events.EncounterEnd, Utc(9, 0), "Patient/p1", "Encounter/e1"), (end.Kind, end.At, end.Patient, end.Encounter));
        Assert.Empty(Read(encounter.Replace("finished", "in-progress", StringComparison.Ordinal)).Readings);
        Assert.True(Read(encounter.Replace("finished", "entered-in-error", StringComparison.Ordinal)).Withdrawn);
        Assert.Equal(Refusals.EventWithoutTime, Assert.Single(Read(encounter.Replace("2031-05-06T09:00:00Z", "2031-05-06", StringComparison.Ordinal)).Ignored).Reason);
    }

    [Fact]
    public void The_end_of_ventilation_is_an_event()
    {
        var end = One("""
            {"resourceType":"Procedure","id":"v","meta":{"versionId":"2"},"status":"completed","code":{"coding":[{"system":"http://snomed.info/sct","code":"40617009"}]},
             "subject":{"reference":"Patient/p1"},"performedPeriod":{"start":"2031-05-01T08:00:00Z","end":"2031-05-06T09:00:00Z"} }
            """);

        Assert.Equal((Events.SupportEnd, Utc(9, 0)), (end.Kind, end.At));
    }
}
