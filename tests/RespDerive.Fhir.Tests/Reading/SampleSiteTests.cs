using RespDerive.Physiology;
using RespDerive.Physiology.Inputs;
using static RespDerive.Fhir.Tests.Sample;

namespace RespDerive.Fhir.Tests;

public class SampleSiteTests
{
    private static string Gas(string code, string more = OfSpecimen) => Observation(Loinc(code), Quantity("60", "mm[Hg]"), more);

    [Theory]
    [InlineData("11556-8", "pao2")]
    [InlineData("11557-6", "paco2")]
    public void A_gas_of_unspecified_blood_is_arterial_when_its_specimen_is(string code, string kind)
    {
        var reading = One(Gas(code), Specimen("BLDA"));

        Assert.Equal((kind, (string?)null), (reading.Kind.Key, reading.Refused));
    }

    [Theory]
    [InlineData("BLDV")]
    [InlineData("BLDC")]
    [InlineData("BLD")]
    public void A_gas_of_unspecified_blood_is_refused_otherwise(string type)
    {
        var reading = One(Gas("11556-8"), Specimen(type));

        Assert.Equal((Kinds.Po2, Withheld.NotArterial), (reading.Kind, reading.Refused));
    }

    [Fact]
    public void A_gas_of_unspecified_blood_without_a_readable_specimen_is_refused_until_it_is()
    {
        Assert.Equal(Withheld.NotArterial, One(Gas("11556-8", "")).Refused);
        Assert.Equal(Withheld.NotArterial, One(Gas("11556-8")).Refused);
        Assert.Contains("Specimen/s1", Read(Gas("11556-8")).Unresolved);
    }

    [Theory]
    [InlineData("BLDV")]
    [InlineData("BLDC")]
    public void An_arterial_code_on_other_blood_is_refused(string type)
    {
        var reading = One(Gas("2703-7"), Specimen(type));

        Assert.Equal((Kinds.PaO2, Withheld.NotArterial), (reading.Kind, reading.Refused));
    }

    [Theory]
    [InlineData("122552005", null)]
    [InlineData("122555007", Withheld.NotArterial)]
    [InlineData("122554006", Withheld.NotArterial)]
    public void Snomed_specimen_types_count_too(string type, string? refused)
    {
        var specimen = Specimen(type).Replace(CodeSystems.SpecimenType, CodeSystems.Snomed, StringComparison.Ordinal);

        Assert.Equal(refused, One(Gas("2703-7"), specimen).Refused);
        Assert.Null(Assert.Single(Read(new ReadingOptions(), new CodeMap(snomed: false), Gas("2703-7"), specimen).Readings).Refused);
    }

    [Fact]
    public void A_specimen_entered_in_error_says_nothing() =>
        Assert.Equal(Withheld.NotArterial, One(Gas("11556-8"), Specimen("BLDA", status: "entered-in-error")).Refused);

    [Theory]
    [InlineData("2705-2", "po2-venous")]
    [InlineData("2704-5", "po2-capillary")]
    [InlineData("2021-4", "pco2-venous")]
    [InlineData("19255-9", "pao2-temp-corrected")]
    [InlineData("32771-8", "paco2-temp-corrected")]
    public void Other_gases_are_recognised_and_kept_apart(string code, string key)
    {
        var result = Read(Gas(code, ""));

        Assert.Empty(result.Readings);
        Assert.Equal(new IgnoredPart("", Refusals.NotUsed, key), Assert.Single(result.Ignored));
    }

    [Fact]
    public void An_arterial_code_beside_the_unspecified_one_is_arterial() =>
        Assert.Equal(Kinds.PaO2, One(Observation(Loinc("11556-8") + "," + Loinc("2703-7"), Quantity("60", "mm[Hg]"))).Kind);

    [Fact]
    public void Two_codes_that_contradict_each_other_are_refused() =>
        Assert.Equal(Withheld.InputInvalid, One(Observation(Loinc("2703-7") + "," + Loinc("2705-2"), Quantity("60", "mm[Hg]"))).Refused);

    [Fact]
    public void The_site_can_say_that_an_analyser_is_arterial()
    {
        var codes = new CodeMap([new(CodeSystems.Loinc, "11556-8", "", "pao2")]);

        var reading = Assert.Single(Read(new ReadingOptions(), codes, Gas("11556-8", "")).Readings);

        Assert.Equal((Kinds.PaO2, (string?)null), (reading.Kind, reading.Refused));
    }

    [Fact]
    public void The_site_can_say_what_its_own_specimen_types_are()
    {
        var codes = new CodeMap([new("http://hospital.example/specimen", "ABG", "", "arterial-blood")]);
        var specimen = Specimen("ABG").Replace(CodeSystems.SpecimenType, "http://hospital.example/specimen", StringComparison.Ordinal);

        Assert.Null(Assert.Single(Read(new ReadingOptions(), codes, Gas("11556-8"), specimen).Readings).Refused);
    }

    [Fact]
    public void A_contained_specimen_is_read_where_it_stands()
    {
        var reading = One(Gas("11556-8", """
            "specimen":{"reference":"#s"},"contained":[{"resourceType":"Specimen","id":"s","type":{"coding":[{"system":"http://terminology.hl7.org/CodeSystem/v2-0487","code":"BLDA"}]},
             "collection":{"collectedDateTime":"2031-05-06T09:50:00Z"} }]
            """));

        Assert.Equal((Kinds.PaO2, (string?)null, "2031-05-06T09:50:00Z"), (reading.Kind, reading.Refused, reading.AtText));
    }

    [Fact]
    public void The_specimen_of_a_report_is_that_of_its_results()
    {
        const string report = """
            {"resourceType":"DiagnosticReport","id":"r1","meta":{"versionId":"1"},"status":"final","subject":{"reference":"Patient/p1"},
             "result":[{"reference":"Observation/o1"}],"specimen":[{"reference":"Specimen/s1"}]}
            """;

        var reading = One(Gas("11556-8", ""), Specimen("BLDA"), report);

        Assert.Equal((Kinds.PaO2, "Specimen/s1"), (reading.Kind, reading.Specimen));
        Assert.Equal(["DiagnosticReport/r1"], reading.Panels);
        Assert.Equal(Withheld.NotArterial, One(Gas("11556-8", ""), Specimen("BLDA"), report.Replace("final", "entered-in-error", StringComparison.Ordinal)).Refused);
    }

    [Fact]
    public void The_specimen_of_a_panel_is_that_of_its_members()
    {
        var panel = Observation(Loinc("24336-0"), "", OfSpecimen + ",\"hasMember\":[{\"reference\":\"Observation/o1\"}]").Replace("\"o1\"", "\"panel\"", StringComparison.Ordinal);

        var reading = One(Gas("11556-8", ""), Specimen("BLDA"), panel);

        Assert.Equal((Kinds.PaO2, "Specimen/s1"), (reading.Kind, reading.Specimen));
        Assert.Equal(["Observation/panel"], reading.Panels);
        Assert.Empty(Read(panel).Ignored);
    }
}
