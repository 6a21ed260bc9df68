using System.Text.Json;
using RespDerive.Physiology.Inputs;
using RespDerive.Timeline;

namespace RespDerive.Storage.Tests;

public sealed class RecordsTests
{
    private readonly Records _records = new(Some.Kind);

    [Fact]
    public void A_reading_comes_back_as_it_was()
    {
        var reading = Some.Reading("Observation/1", Kinds.PaO2, new DateTimeOffset(2026, 3, 1, 9, 0, 0, TimeSpan.FromHours(5.5)), 0.1 + 0.2, "2703-7~2") with
        {
            Base = "https://ehr.example/fhir",
            Given = 11.20m,
            GivenUnit = "kPa",
            Preliminary = true,
            Corrected = true,
            Encounter = "Encounter/e",
            Specimen = "Specimen/s",
            Panels = ["Observation/p", "DiagnosticReport/r"],
            Device = "Device/d",
            Streamed = true,
            Flags = ["zone-assumed"],
        };

        var back = _records.Reading(_records.Bytes(reading));

        Assert.Same(Kinds.PaO2, back.Kind);
        Assert.Equal(reading.At.Offset, back.At.Offset);
        Assert.Equal("11.20", back.Given!.Value.ToString());
        Assert.Equal(reading.Panels, back.Panels);
        Assert.Equal(reading.Flags, back.Flags);
        Assert.Equal(reading with { Panels = [], Flags = [] }, back with { Panels = [], Flags = [] });
    }

    [Fact]
    public void A_refused_reading_and_an_event_come_back()
    {
        var reading = Some.Reading("Procedure/1", Events.SupportEnd, Some.At(0)) with { Value = double.NaN, Refused = "unit-unknown" };

        var back = _records.Reading(_records.Bytes(reading));

        Assert.Same(Events.SupportEnd, back.Kind);
        Assert.True(double.IsNaN(back.Value));
        Assert.False(back.Usable);
        Assert.Equal(("", 0, 0), (back.Base, back.Panels.Count, back.Flags.Count));
    }

    // A property that is not in an older row is read as null or zero, whatever its initial value: whoever adds one here
    // either makes it nullable or adds a schema script that writes it into the rows.
    [Theory]
    [InlineData(typeof(Reading), "Id Version Base Kind Value Given GivenUnit At AtText Refused Preliminary Corrected Patient Encounter Specimen Panels Device Streamed Flags")]
    [InlineData(typeof(ReadingId), "Resource Part")]
    [InlineData(typeof(ResourceKey), "Source Type Id")]
    [InlineData(typeof(Person), "Resource Version Sex BirthDate Base")]
    [InlineData(typeof(Outcome), "Identity Definition Revision Source Patient Encounter Anchor AnchorReference At AtText Value Published Unit Uncertainty SiteTolerance SharedOffsetShare Code Flags Variant Inputs Person Intermediates Preliminary InputCorrected Withheld Policy")]
    [InlineData(typeof(UsedReading), "Resource Part Version Base At Value")]
    [InlineData(typeof(UsedInput), "Kind Value Unit Code Readings GapMinutes Share Assumed GateOnly")]
    [InlineData(typeof(Intermediate), "Definition Value Unit")]
    public void Stored_properties_are_the_approved_ones(Type type, string approved) =>
        Assert.Equal(approved.Split(' ').Order(), RecordsJson.Default.GetTypeInfo(type)!.Properties.Where(property => property.Set is not null).Select(property => property.Name).Order());

    [Fact]
    public void An_outcome_comes_back_without_its_candidates()
    {
        var used = new UsedReading(Some.Key("Observation/1"), "x", "3", "https://ehr.example/fhir", Some.At(0), 1.0 / 3);
        var outcome = Some.Outcome("a", Some.At(0), 193.75) with
        {
            Uncertainty = 12.5,
            Published = 194.0m,
            Flags = ["settling"],
            Inputs = [new UsedInput { Kind = "pao2", Value = 1.0 / 3, Unit = "mm[Hg]", Readings = [used], GapMinutes = 0, Share = 0.25 }],
            Intermediates = [new Intermediate("alveolar-po2", 1e-17, "mm[Hg]")],
            Person = used,
            Considered = [new Candidate("fio2", "Observation/9", "2026", 0.4m, "1", "too old")],
        };

        var back = _records.Outcome(_records.Bytes(outcome));

        Assert.Empty(back.Considered);
        Assert.Equal(used, Assert.Single(Assert.Single(back.Inputs).Readings));
        Assert.Equal(JsonSerializer.Serialize(outcome with { Considered = [] }), JsonSerializer.Serialize(back));
    }

    [Fact]
    public async Task Readings_of_a_kind_that_is_no_longer_known_are_passed_over()
    {
        await using var temporary = new TemporaryStore();
        var patient = await temporary.PatientAsync();
        var key = Some.Key("Observation/1");
        await temporary.CommitAsync(patient, new TurnChanges
        {
            Replaced = [key],
            Readings = [Some.Reading("Observation/1", Kinds.PaO2, Some.At(0)), Some.Reading("Observation/1", Kinds.PaCO2, Some.At(0), part: "x")],
        });

        await temporary.ReopenAsync(kind => kind == "pao2" ? null : Some.Kind(kind));

        using var history = temporary.Store.History(patient);
        Assert.Same(Kinds.PaCO2, Assert.Single(history.ReadingsOf(key)).Kind);
    }
}
