using System.Text;
using CsCheck;
using Hl7.Fhir.Model;
using Hl7.Fhir.Serialization;

namespace RespDerive.Fhir.Tests;

/// <summary>
/// Facts against an independent reader and writer: resources are made and serialised by the Hl7.Fhir.R4 library (6.8.0) and
/// must be understood here as they are there.
/// </summary>
public class AgainstLibraryTests
{
    private static readonly FhirJsonSerializer Serializer = new();

    private static readonly Gen<Observation> Observations =
        Gen.Select(Gen.Enum<ObservationStatus>(), Gen.Int[1, 4], Gen.Decimal[-1000m, 1000m], Gen.Bool, Gen.Bool, Gen.Int[0, 20_000_000], Gen.Int[-14, 14])
            .Select((status, codes, number, comparator, period, seconds, zone) => new Observation
            {
                Id = "o1",
                Meta = new Meta { VersionId = "4", LastUpdated = new DateTimeOffset(2031, 5, 6, 11, 0, 0, TimeSpan.Zero) },
                Status = status,
                Code = new CodeableConcept { Coding = [.. Enumerable.Range(1, codes).Select(i => new Coding($"urn:s{i}", $"c{i}"))], Text = "x" },
                Category = [new CodeableConcept("urn:cat", "lab"), new CodeableConcept("urn:cat", "vital")],
                Subject = new ResourceReference("Patient/p1"),
                Specimen = new ResourceReference("Specimen/s1"),
                Device = new ResourceReference("DeviceMetric/m1"),
                HasMember = [new ResourceReference("Observation/a"), new ResourceReference("Observation/b")],
                Value = new Quantity(Math.Round(number, 4), "mm[Hg]") { Comparator = comparator ? Quantity.QuantityComparator.LessThan : null },
                Effective = period ? new Period(Time(seconds, zone), Time(seconds + 60, zone)) : Time(seconds, zone),
                Component = [new Observation.ComponentComponent { Code = new CodeableConcept("urn:s", "k"), DataAbsentReason = new CodeableConcept("urn:d", "error") }],
            });

    [Fact]
    public void An_observation_says_the_same_as_to_the_library() => Observations.Sample(observation =>
    {
        var facts = FactReader.Read(Encoding.UTF8.GetBytes(Serializer.SerializeToString(observation)), "ehr", "", null, Sample.Arrived).Facts!;
        var read = Assert.IsType<ObservationFacts>(facts.Content);
        var quantity = Assert.IsType<QuantityFact>(read.Own.Value);
        var sent = (Quantity)observation.Value!;

        Assert.Equal((observation.Id, "4", observation.Meta!.LastUpdated, 4L), (facts.Key.Id, facts.Version, facts.Order.LastUpdated, facts.Order.Number));
        Assert.Equal(observation.StatusElement!.JsonValue as string, read.Status);
        Assert.Equal(observation.Code!.Coding.Select(coding => new CodeFact(coding.System!, coding.Code!)), read.Own.Codes);
        Assert.Equal(["lab", "vital"], read.Categories.Select(code => code.Code));
        Assert.Equal((sent.Value, sent.Comparator is null, sent.Unit, sent.System, sent.Code), (quantity.Number, quantity.Exact, quantity.Unit, quantity.System, quantity.Code));
        Assert.Equal("error", Assert.Single(read.Components).Absent);
        Assert.Equal((observation.Subject!.Reference, observation.Specimen!.Reference, observation.Device!.Reference), (facts.Patient, read.Specimen, read.Device));
        Assert.Equal(observation.HasMember.Select(member => member.Reference), read.Members);
        var time = observation.Effective is Period period ? period.EndElement! : (FhirDateTime)observation.Effective!;
        Assert.Equal(time.Value, observation.Effective is Period ? read.Effective!.End : read.Effective!.At);
        Assert.True(time.TryToDateTimeOffset(out var moment));
        Assert.Equal(moment, SentTime.Instant(time.Value));
    });

    private static FhirDateTime Time(int seconds, int zone) =>
        new(new DateTimeOffset(2031, 1, 1, 0, 0, 0, TimeSpan.FromHours(zone)).AddSeconds(seconds));
}
